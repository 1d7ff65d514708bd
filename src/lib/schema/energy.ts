import { z } from 'zod';
import type { EnergySettings, EnergySky } from '../core/results';
import { optionalLabel, quantity, wholeNumber } from './quantity';

/** Hours of a year with its leap day; a weather file has no more. */
const MOST_HOURS = 8784;

function twelve(value: z.ZodNumber, what: string) {
	const sentence = `Give twelve ${what}, January first.`;
	return z.array(value, { error: sentence }).length(12, { error: sentence });
}

const albedo = quantity(0, 1);
const hourly = z
	.array(quantity(0, 2000, 'W/m²').nullable(), { error: 'Give one value for each hour, or null.' })
	.max(MOST_HOURS, { error: `Give at most ${MOST_HOURS} hours.` });

/**
 * Hours that two spans share would be counted twice. The months of a typical year come from different years, so a span may
 * well lie before the one that is listed ahead of it.
 */
function refuseDoubledHours(
	spans: readonly { startMs: number; hours: number }[],
	context: z.core.$RefinementCtx
): void {
	const hourMs = 3600000;
	const end = (k: number) => spans[k].startMs + spans[k].hours * hourMs;
	const order = spans.map((_, k) => k).sort((a, b) => spans[a].startMs - spans[b].startMs || a - b);
	/** The one so far that ends last. */
	let longest = order[0];
	for (const now of order.slice(1)) {
		if (spans[now].startMs < end(longest)) {
			const [first, second] = [Math.min(longest, now), Math.max(longest, now)];
			context.addIssue({
				code: 'custom',
				path: [second],
				message: `These hours overlap those of spans.${first}. Give every hour once: start each run of hours at or after the end of the one before it in time.`
			});
		}
		if (end(now) > end(longest)) longest = now;
	}
}

export const energySkySchema = z.discriminatedUnion(
	'source',
	[
		z.strictObject({
			source: z.literal('clear'),
			linkeTurbidity: twelve(quantity(1, 15), 'turbidities').optional()
		}),
		z.strictObject({
			source: z.literal('average'),
			monthlyHorizontalKwhM2: twelve(quantity(0, 400, 'kWh/m²'), 'monthly sums on level ground in kWh/m²')
		}),
		z.strictObject({
			source: z.literal('weather'),
			name: optionalLabel(120),
			latitudeDeg: quantity(-90, 90, 'degrees, north positive'),
			longitudeDeg: quantity(-180, 180, 'degrees, east positive'),
			altitudeM: quantity(-450, 9000, 'm'),
			utcOffsetHours: quantity(-14, 14, 'hours'),
			spans: z
				.array(
					z.strictObject({
						startMs: quantity(-4e12, 4e12, 'ms since 1970, UTC'),
						hours: wholeNumber(1, MOST_HOURS)
					}),
					{ error: 'Give the runs of hours without a gap as a list.' }
				)
				.min(1, { error: 'Give at least one run of hours.' })
				.max(400, { error: 'Give at most 400 runs of hours.' })
				.superRefine(refuseDoubledHours),
			ghi: hourly,
			dni: hourly,
			dhi: hourly
		})
	],
	{ error: 'Give the source of the light as "clear", "average" or "weather".' }
) satisfies z.ZodType<EnergySky>;

export const energySkyModelSchema = z.enum(['hay-davies', 'perez', 'isotropic'], {
	error: 'Give the sky model as "hay-davies", "perez" or "isotropic".'
});

const albedoSchema = z.union([albedo, twelve(albedo, 'albedos from 0 to 1')], {
	error: 'Give the albedo as a number from 0 to 1, or twelve of them, January first.'
});

/** Settings as a run keeps them. */
export const energySettingsSchema = z.strictObject({
	sky: energySkySchema,
	skyModel: energySkyModelSchema,
	albedo: albedoSchema
}) satisfies z.ZodType<EnergySettings>;

/** Settings as they are asked for: the sky is needed, the rest has its defaults. */
export const energyRequestSchema = z.strictObject({
	sky: energySkySchema,
	skyModel: energySkyModelSchema.default('hay-davies'),
	albedo: albedoSchema.default(0.2)
});
export type EnergyRequest = z.input<typeof energyRequestSchema>;

/** What a run's energy was asked for, without the hours of a weather file. */
export const runEnergySchema = z.strictObject({
	source: z.enum(['clear', 'average', 'weather']),
	skyModel: energySkyModelSchema,
	albedo: albedoSchema,
	/** Name of the weather file's place. */
	name: z.string().nullable(),
	linkeTurbidity: z.array(z.number()).nullable(),
	monthlyHorizontalKwhM2: z.array(z.number()).nullable(),
	/** SHA-256 of the settings with all hours. */
	digest: z.string()
});
export type RunEnergy = z.infer<typeof runEnergySchema>;
