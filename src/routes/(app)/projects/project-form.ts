import { z } from 'zod';
import type { Place, WinterRule } from '$lib/core';
import { outsideRange, parseCoordinates, parseQuantity } from '$lib/i18n';
import { idSchema, isTimeZone, projectNameSchema } from '$lib/schema';

/** A typed quantity as a number in its unit; the same sentences as the field itself gives. */
function typedQuantity(unit: string, min: number, max: number, empty?: number) {
	return z
		.string()
		.default('')
		.transform((text, context) => {
			if (text.trim() === '' && empty !== undefined) return empty;
			const parsed = parseQuantity(text, unit);
			const message = parsed.ok ? outsideRange(parsed.value, unit, min, max) : parsed.message;
			if (parsed.ok && !message) return parsed.value;
			context.addIssue({ code: 'custom', message: message ?? 'Write a number.' });
			return z.NEVER;
		});
}

const typedCoordinates = z
	.string()
	.default('')
	.transform((text, context) => {
		const parsed = parseCoordinates(text);
		if (parsed.ok) return { latitudeDeg: parsed.latitudeDeg, longitudeDeg: parsed.longitudeDeg };
		context.addIssue({ code: 'custom', message: parsed.message });
		return z.NEVER;
	});

const placeFields = {
	name: projectNameSchema,
	coordinates: typedCoordinates,
	altitude: typedQuantity('m', -450, 6500, 0),
	timeZone: z.string().default(''),
	declination: typedQuantity('°', -180, 180, 0)
};

const ruleFields = {
	ruleKind: z.enum(['clear-above', 'clear-window'], { error: 'Choose one of the two rules.' }),
	ruleElevation: z.string().default(''),
	ruleFrom: z.string().default(''),
	ruleTo: z.string().default('')
};

type RuleForm = { ruleKind: WinterRule['kind']; ruleElevation: string; ruleFrom: string; ruleTo: string };

function readRule(form: RuleForm, refuse: (path: string, message: string) => void): WinterRule | null {
	const read = (path: 'ruleElevation' | 'ruleFrom' | 'ruleTo', unit: string, max: number) => {
		const parsed = typedQuantity(unit, 0, max).safeParse(form[path]);
		if (parsed.success) return parsed.data;
		refuse(path, parsed.error.issues[0].message);
		return null;
	};
	if (form.ruleKind === 'clear-above') {
		const elevationDeg = read('ruleElevation', '°', 90);
		return elevationDeg === null ? null : { kind: 'clear-above', elevationDeg };
	}
	const fromSolarHour = read('ruleFrom', 'h', 24);
	const toSolarHour = read('ruleTo', 'h', 24);
	if (fromSolarHour === null || toSolarHour === null) return null;
	if (toSolarHour <= fromSolarHour) {
		refuse('ruleTo', 'The window must end after it begins: write a later solar hour.');
		return null;
	}
	return { kind: 'clear-window', fromSolarHour, toSolarHour };
}

type FactsForm = z.output<z.ZodObject<typeof placeFields & typeof ruleFields>>;

function readFacts(form: FactsForm, context: z.RefinementCtx) {
	const refuse = (path: string, message: string) =>
		context.addIssue({ code: 'custom', path: [path], message });
	const winterRule = readRule(form, refuse);
	if (form.timeZone && !isTimeZone(form.timeZone)) {
		refuse('timeZone', 'This time zone is not known: choose one from the list.');
	}
	if (!winterRule) return z.NEVER;
	const place: Omit<Place, 'timeZone'> & { timeZone?: string } = {
		...form.coordinates,
		altitudeM: form.altitude,
		magneticDeclinationDeg: form.declination,
		...(form.timeZone ? { timeZone: form.timeZone } : {})
	};
	return { name: form.name, place, winterRule };
}

/** The form of a project's facts. An empty time zone means: find it from the place. */
export const projectFormSchema = z.object({ ...placeFields, ...ruleFields }).transform(readFacts);

/** The same of a new project, which says in which team when there are several. */
export const newProjectFormSchema = z
	.object({ ...placeFields, ...ruleFields, teamId: z.union([z.literal(''), idSchema]).optional() })
	.transform((form, context) => ({ ...readFacts(form, context), teamId: form.teamId }));

/** What the form shows of a project that stands. */
export interface ProjectFields {
	name: string;
	coordinates: string;
	altitude: number | null;
	timeZone: string;
	declination: number | null;
	rule: WinterRule;
}
