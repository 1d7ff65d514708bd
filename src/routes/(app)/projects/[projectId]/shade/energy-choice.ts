import { longMonthNames } from '$lib/charts/months';
import {
	checkEnergy,
	defaultLinkeTurbidity,
	weatherClosure,
	weatherSky,
	type Closure,
	type EnergyReason,
	type EnergyResult,
	type EnergySky,
	type Place
} from '$lib/core';
import { readWeather } from '$lib/exchange/weather';
import { formatNumber, formatPercent } from '$lib/i18n';
import type { EnergyRequest, Run } from '$lib/schema';

type WeatherSky = Extract<EnergySky, { source: 'weather' }>;

/** What a person chose for the year's energy. */
export interface EnergyChoice {
	kind: 'none' | EnergySky['source'];
	turbidity: (number | null)[];
	/** kWh/m² on level ground. */
	sums: (number | null)[];
	/** Name of the place whose weather file the last run took, empty when it had none; null when it took no file. */
	lastFile: string | null;
	weather: { fileName: string; sky: WeatherSky; sentence: string; warnings: string[] } | null;
	skyModel: string;
	albedo: number | null;
}

/** The choice to begin with: as the last run was asked for; the hours of a weather file are not kept on the page. */
export function energyChoice(place: Place, last: Run['energy'] | undefined): EnergyChoice {
	const months = Array<number | null>(12).fill(null);
	return {
		kind: last?.source ?? 'none',
		turbidity: last?.linkeTurbidity ?? defaultLinkeTurbidity(place.latitudeDeg),
		sums: last?.monthlyHorizontalKwhM2 ?? months,
		lastFile: last?.source === 'weather' ? (last.name ?? '') : null,
		weather: null,
		skyModel: last?.skyModel ?? 'hay-davies',
		albedo: typeof last?.albedo === 'number' ? last.albedo : 0.2
	};
}

/** The settings to ask for, or the sentence that says what is missing or wrong; null when no energy is wanted. */
export function energyRequest(
	choice: EnergyChoice,
	place: Place,
	stepMinutes: number
): { ok: true; request: EnergyRequest } | { ok: false; message: string } | null {
	const sky = skyOf(choice);
	if (sky === null) return null;
	if (typeof sky === 'string') return { ok: false, message: sky };
	if (choice.albedo === null) return { ok: false, message: 'Give the albedo of the ground.' };
	const request = {
		sky,
		skyModel: choice.skyModel as 'hay-davies' | 'perez' | 'isotropic',
		albedo: choice.albedo
	};
	const refusal = checkEnergy(place, request, stepMinutes);
	return refusal ? { ok: false, message: refusal.message } : { ok: true, request };
}

function skyOf(choice: EnergyChoice): EnergySky | string | null {
	switch (choice.kind) {
		case 'none':
			return null;
		case 'clear': {
			const linkeTurbidity = whole(choice.turbidity);
			return linkeTurbidity
				? { source: 'clear', linkeTurbidity }
				: `Give the turbidity of ${missingOf(choice.turbidity)}.`;
		}
		case 'average': {
			const monthlyHorizontalKwhM2 = whole(choice.sums);
			return monthlyHorizontalKwhM2
				? { source: 'average', monthlyHorizontalKwhM2 }
				: `Give the monthly sum of ${missingOf(choice.sums)}.`;
		}
		case 'weather':
			return (
				choice.weather?.sky ??
				(choice.lastFile === null
					? 'Choose a weather file, EPW or TMY3.'
					: 'Give the weather file again: its hours are not kept on this page.')
			);
	}
}

const whole = (values: readonly (number | null)[]): number[] | null => {
	const given = values.filter((value) => value !== null);
	return given.length === 12 ? given : null;
};

const missingOf = (values: readonly (number | null)[]): string =>
	longMonthNames[values.findIndex((value) => value === null)];

/** Reads a dropped or chosen weather file; the sentence says what was read and how well its columns agree. */
export async function takeWeather(
	file: File
): Promise<{ ok: true; weather: NonNullable<EnergyChoice['weather']> } | { ok: false; message: string }> {
	const reading = readWeather(new Uint8Array(await file.arrayBuffer()));
	if (!reading.ok) return { ok: false, message: `${file.name}: ${reading.message} ${reading.remedy}` };
	return {
		ok: true,
		weather: {
			fileName: file.name,
			sky: weatherSky(reading),
			sentence: `${reading.sentence} ${closureWords(weatherClosure(reading))}`,
			warnings: reading.warnings
		}
	};
}

/** Above this a file's hours, zone or place are likely read wrongly, W/m² rms. */
const DOUBTFUL_WM2 = 20;

/** How well global, diffuse and direct light of a file agree with the sun, in a sentence. */
export function closureWords(closure: Closure | null): string {
	if (!closure) return 'No hour has enough light to check it by.';
	const { meanWm2, rmsWm2, maxWm2, hours } = closure;
	const figures = `mean ${formatNumber(meanWm2, 1)}, rms ${formatNumber(rmsWm2, 1)}, at most ${formatNumber(maxWm2, 1)} W/m² over ${formatNumber(hours)} hours`;
	return rmsWm2 > DOUBTFUL_WM2
		? `Global light and the sum of diffuse and direct are far apart (${figures}): look at its time zone and place.`
		: `Global light and the sum of diffuse and direct agree: ${figures}.`;
}

const shortReasons: Record<EnergyReason['id'], string> = {
	strings: 'wiring of the strings',
	'sky-model': 'model of the sky',
	weather: 'weather of one year',
	place: 'weather of another place',
	heights: 'heights',
	ground: 'light from the ground',
	'sky-view': 'sky covered',
	steps: 'time steps'
};

/** How far one reason may move what the field receives, in points of the light without shade. */
export function reasonPoints({ lessPoints, morePoints }: EnergyReason): string {
	const one = (value: number | null, sign: string) =>
		value === null || value < 0.005 ? null : `${sign}${formatNumber(value, value < 0.1 ? 2 : 1)}`;
	const less = one(lessPoints, '−');
	const more = one(morePoints, '+');
	if (less && more) return less.slice(1) === more.slice(1) ? `±${more.slice(1)}` : `${less} / ${more}`;
	if (less || more) return less ?? more ?? '';
	return lessPoints === null || morePoints === null ? 'not known' : 'below 0.01';
}

/** The reasons that the range by wiring leaves out, in a few words each. */
export function otherReasonsWords(reasons: readonly EnergyReason[]): string {
	return reasons
		.filter(({ id }) => id !== 'strings')
		.map((reason) => `${shortReasons[reason.id]} ${reasonPoints(reason)}`)
		.join(', ');
}

/** Why the beam of the energy part and its loss are not those of the year's figures above it. */
export function beamWords(
	{ field: { with: lit, without } }: EnergyResult,
	source: EnergySky['source'] | null,
	yearBeamLoss: number
): string {
	const here =
		source === 'clear'
			? 'another clear sky, with haze by month (Ineichen and Perez 2002)'
			: source === 'average'
				? 'the given monthly sums, clouds included'
				: source === 'weather'
					? 'the hours of the weather file, clouds included'
					: 'the sky named here';
	const loss = without.beam > 0 ? 1 - lit.beam / without.beam : 0;
	return `The year’s figures above take the beam of one clear sky (Meinel and Meinel 1976), this part takes that of ${here}. So ${formatPercent(yearBeamLoss, 2)} of the beam is lost there and ${formatPercent(loss, 2)} of the beam here. All other shares in this part are of all light: beam, sky and ground together.`;
}
