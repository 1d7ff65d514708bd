import { fieldSunHidden, prepareField, type Field } from '../field';
import type { RunInput, ShadeResult, TrackerShade } from '../results';
import { BEAM_MODEL } from '../energy/beam';
import { shortestDate } from '../sun/day';
import { CORE_VERSION } from '../version';
import { dayShadePart, joinDayShade, type DayRange, type DayShadePart } from './day-shade';
import { shadeSums, type FieldSums } from './shade-sums';
import { assertStep, SunSky } from './sun-steps';
import { sunTable, type SunTable, type TableSun } from './sun-table';
import { winterVerdict } from './winter';

/** How the sun is named in results. */
export const SUN_MODEL =
	'Apparent sun: VSOP87 series as shortened by Meeus and by Reda and Andreas 2003, refraction of Saemundsson 1986 at 1010 mbar and 10 °C';

/** Steps of the shortest day, minutes. */
export const WINTER_STEP_MINUTES = 2;
const MONTHS = 12;
const HOURS = 24;
const BINS = MONTHS * HOURS;
const loss = (without: number, lit: number): number => (without > 0 ? Math.max(0, 1 - lit / without) : 0);

/** Sums and losses of one run of 288 bins. */
function binLosses(without: Float64Array, lit: Float64Array) {
	const monthHourLoss: (number | null)[][] = [];
	const monthLoss: number[] = [];
	let allWithout = 0;
	let allLit = 0;
	for (let m = 0; m < MONTHS; m++) {
		let monthWithout = 0;
		let monthLit = 0;
		const hours: (number | null)[] = [];
		for (let h = 0; h < HOURS; h++) {
			const k = m * HOURS + h;
			hours.push(without[k] > 0 ? loss(without[k], lit[k]) : null);
			monthWithout += without[k];
			monthLit += lit[k];
		}
		monthHourLoss.push(hours);
		monthLoss.push(loss(monthWithout, monthLit));
		allWithout += monthWithout;
		allLit += monthLit;
	}
	return { monthHourLoss, monthLoss, allWithout, allLit, beamLoss: loss(allWithout, allLit) };
}

/** The year of some trackers of a field: what `joinShadeYear` puts together. Plain data and typed arrays. */
export interface ShadeYearPart {
	sums: FieldSums;
	steps: number;
	daylight: number;
	/** Group of each tracker of the layout. */
	groupOf: Int32Array;
	shortestDay: DayShadePart;
}

/**
 * Shade of a whole site year. Steps of `stepMinutes` (1..20) at mid-interval; beam of the clear sky named in the
 * result, on the table's front, times the exact lit share. Steps with the sun below horizon or skyline count for
 * nothing: the skyline takes its beam from both sides of the loss. Trees as they stand after `treeYears`.
 *
 * `onProgress` hears the part done, 0..1, about a hundred times; when it answers false the run stops and the result
 * is null. 100 alike trackers at 10 minutes take a tenth of a second.
 */
export function shadeYear(input: RunInput, onProgress?: (done01: number) => boolean): ShadeResult | null {
	const part = shadeYearPart(input, onProgress, { from: 0, to: input.layout.trackers.length });
	return part && joinShadeYear(input, [part]);
}

/** The part of `shadeYear` that is about some trackers; all of the field throw their shade. */
export function shadeYearPart(
	input: RunInput,
	onProgress: ((done01: number) => boolean) | undefined,
	range: DayRange
): ShadeYearPart | null {
	assertStep(input.stepMinutes);
	const field = prepareField(input);
	const { suns, steps, daylight } = yearSuns(field, input);
	const heard = onProgress && ((done01: number) => onProgress(done01 * 0.97));
	const sums = shadeSums(field.engine, suns, BINS, range.from, range.to, heard);
	if (sums === null) return null;
	const shortestDay = dayShadePart(
		field,
		shortestDate(input.place.latitudeDeg, input.year),
		WINTER_STEP_MINUTES,
		input.utcOffsetMinutes,
		range
	);
	if (onProgress?.(1) === false) return null;
	return { sums, steps, daylight, groupOf: field.engine.groupOf, shortestDay };
}

/** Every sun of the site's year above horizon and skyline, weighted by its beam in kWh/m². */
function yearSuns(field: Field, input: RunInput): { suns: SunTable; steps: number; daylight: number } {
	const sky = new SunSky(input.place);
	const offsetMs = input.utcOffsetMinutes * 60000;
	const stepMs = input.stepMinutes * 60000;
	const startMs = Date.UTC(input.year, 0, 1) - offsetMs;
	const endMs = Date.UTC(input.year + 1, 0, 1) - offsetMs;
	const suns: TableSun[] = [];
	let steps = 0;
	let daylight = 0;
	for (let timeMs = startMs + stepMs / 2; timeMs < endMs; timeMs += stepMs) {
		steps++;
		const sun = sky.at(timeMs);
		if (sun.elevationDeg <= 0) continue;
		daylight++;
		if (fieldSunHidden(field, sun)) continue;
		const local = new Date(timeMs + offsetMs);
		suns.push({
			azimuthDeg: sun.azimuthDeg,
			elevationDeg: sun.elevationDeg,
			weight: (sun.beam * input.stepMinutes) / 60000,
			bin: local.getUTCMonth() * HOURS + local.getUTCHours(),
			day: Math.floor((timeMs - startMs) / 86400000) + 1
		});
	}
	return { suns: sunTable(suns), steps, daylight };
}

/** Puts parts of one year that follow each other together, in the layout's order: however it was cut, the same bytes. */
export function joinShadeYear(input: RunInput, parts: readonly ShadeYearPart[]): ShadeResult {
	const [{ steps, daylight, groupOf }] = parts;
	const hoursPerStep = input.stepMinutes / 60;
	const count = input.layout.trackers.length;
	const shortestDay = joinDayShade(parts.map((part) => part.shortestDay));
	const winterRule = winterVerdict(shortestDay, input.layout, input.place, input.winterRule);
	const breakers = new Set(winterRule.brokenBy.map((b) => b.trackerId));
	const fieldWithout = new Float64Array(BINS);
	const fieldLit = new Float64Array(BINS);
	const lit = new Float64Array(BINS);
	const trackers = parts.flatMap(({ sums }) =>
		input.layout.trackers.slice(sums.from, sums.to).map((tracker, row): TrackerShade => {
			const i = sums.from + row;
			const group = groupOf[i];
			const without = sums.without.subarray(group * BINS, (group + 1) * BINS);
			for (let k = 0; k < BINS; k++) {
				lit[k] = Math.max(0, without[k] - sums.lost[row * BINS + k]);
				fieldWithout[k] += without[k];
				fieldLit[k] += lit[k];
			}
			const { monthHourLoss, monthLoss, allWithout, allLit, beamLoss } = binLosses(without, lit);
			const facing = sums.facingSteps[group];
			return {
				trackerId: tracker.id,
				tag: tracker.tag,
				beamLoss,
				meanShadedShare: facing > 0 ? sums.share[row] / facing : 0,
				shadedHours: sums.shadedSteps[row] * hoursPerStep,
				beamKwhM2: allWithout,
				beamLitKwhM2: allLit,
				monthHourLoss,
				monthLoss,
				shadedUpToDeg: shortestDay.shadedUpToDeg[i],
				meetsWinterRule: !breakers.has(tracker.id)
			};
		})
	);
	// Kept with the result for pictures: the verdict is made from the full digits, which would only make it long.
	shortestDay.shares = shortestDay.shares.map((shares) =>
		shares.map((share) => Math.round(share * 1e5) / 1e5)
	);
	const whole = binLosses(fieldWithout, fieldLit);
	let worst: TrackerShade | null = null;
	for (const tracker of trackers) if (worst === null || tracker.beamLoss > worst.beamLoss) worst = tracker;
	return {
		coreVersion: CORE_VERSION,
		model: { sun: SUN_MODEL, beam: BEAM_MODEL, steps, daylightHours: daylight * hoursPerStep },
		field: {
			beamLoss: whole.beamLoss,
			meanShadedShare: count > 0 ? trackers.reduce((sum, t) => sum + t.meanShadedShare, 0) / count : 0,
			worstTrackerId: worst !== null && worst.beamLoss > 0 ? worst.trackerId : null,
			monthLoss: whole.monthLoss,
			monthHourLoss: whole.monthHourLoss,
			// Mean over the trackers, so that fields of unlike size compare.
			beamKwhM2: count > 0 ? whole.allWithout / count : 0,
			beamLitKwhM2: count > 0 ? whole.allLit / count : 0
		},
		trackers,
		shortestDay,
		winterRule
	};
}
