import { fieldSunHidden, prepareField } from '../field';
import type { RunInput, ShadeResult, TrackerShade } from '../results';
import { BEAM_MODEL } from '../energy/beam';
import { shortestDate } from '../sun/day';
import { CORE_VERSION } from '../version';
import { dayShade } from './day-shade';
import { assertStep, SunSky } from './sun-steps';
import { winterVerdict } from './winter';

/** How the sun is named in results. */
export const SUN_MODEL =
	'Apparent sun: VSOP87 series as shortened by Meeus and by Reda and Andreas 2003, refraction of Saemundsson 1986 at 1010 mbar and 10 °C';

/** Steps of the shortest day, minutes. */
export const WINTER_STEP_MINUTES = 2;
const MONTHS = 12;
const HOURS = 24;
const BINS = MONTHS * HOURS;
/** Shares below this are rounding, not shade. */
const ANY_SHADE = 1e-9;

/** Beam in kWh/m² without and with shade, by month and hour, for many trackers. */
class BeamBins {
	readonly without: Float64Array;
	readonly lit: Float64Array;

	constructor(count: number) {
		this.without = new Float64Array(count * BINS);
		this.lit = new Float64Array(count * BINS);
	}
}

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

/**
 * Shade of a whole site year. Steps of `stepMinutes` (1..20) at mid-interval; beam of the clear sky named in the
 * result, on the table's front, times the exact lit share. Steps with the sun below horizon or skyline count for
 * nothing: the skyline takes its beam from both sides of the loss. Trees as they stand after `treeYears`.
 *
 * `onProgress` hears the part done, 0..1, about a hundred times; when it answers false the run stops and the result
 * is null. 100 alike trackers at 10 minutes take a fraction of a second.
 */
export function shadeYear(input: RunInput, onProgress?: (done01: number) => boolean): ShadeResult | null {
	assertStep(input.stepMinutes);
	const field = prepareField(input);
	const { engine } = field;
	const count = engine.count;
	const sky = new SunSky(input.place);
	const offsetMs = input.utcOffsetMinutes * 60000;
	const stepMs = input.stepMinutes * 60000;
	const startMs = Date.UTC(input.year, 0, 1) - offsetMs;
	const endMs = Date.UTC(input.year + 1, 0, 1) - offsetMs;
	const hoursPerStep = input.stepMinutes / 60;
	const bins = new BeamBins(count);
	const shareSum = new Float64Array(count);
	const facingSteps = new Float64Array(count);
	const shadedSteps = new Float64Array(count);
	let steps = 0;
	let daylight = 0;
	const total = Math.round((endMs - startMs) / stepMs);
	const every = Math.max(1, Math.floor(total / 100));

	for (let timeMs = startMs + stepMs / 2; timeMs < endMs; timeMs += stepMs) {
		if (onProgress && steps % every === 0 && onProgress(Math.min(1, steps / total)) === false) return null;
		steps++;
		const sun = sky.at(timeMs);
		if (sun.elevationDeg <= 0) continue;
		daylight++;
		if (fieldSunHidden(field, sun)) continue;
		engine.setSun(sun.azimuthDeg, sun.elevationDeg);
		const local = new Date(timeMs + offsetMs);
		const bin = local.getUTCMonth() * HOURS + local.getUTCHours();
		const kwh = (sun.beam * hoursPerStep) / 1000;
		for (let i = 0; i < count; i++) {
			const cosine = engine.cosine(i);
			if (cosine <= 0) continue;
			const share = engine.share(i);
			const at = i * BINS + bin;
			facingSteps[i]++;
			bins.without[at] += kwh * cosine;
			bins.lit[at] += kwh * cosine * (1 - share);
			if (share > ANY_SHADE) {
				shareSum[i] += share;
				shadedSteps[i]++;
			}
		}
	}

	const shortestDay = dayShade(
		field,
		shortestDate(input.place.latitudeDeg, input.year),
		WINTER_STEP_MINUTES,
		input.utcOffsetMinutes
	);
	const winterRule = winterVerdict(shortestDay, input.layout, input.place, input.winterRule);
	const breakers = new Set(winterRule.brokenBy.map((b) => b.trackerId));
	const fieldWithout = new Float64Array(BINS);
	const fieldLit = new Float64Array(BINS);
	const trackers = input.layout.trackers.map((tracker, i): TrackerShade => {
		const without = bins.without.subarray(i * BINS, (i + 1) * BINS);
		const lit = bins.lit.subarray(i * BINS, (i + 1) * BINS);
		for (let k = 0; k < BINS; k++) {
			fieldWithout[k] += without[k];
			fieldLit[k] += lit[k];
		}
		const { monthHourLoss, monthLoss, allWithout, allLit, beamLoss } = binLosses(without, lit);
		return {
			trackerId: tracker.id,
			tag: tracker.tag,
			beamLoss,
			meanShadedShare: facingSteps[i] > 0 ? shareSum[i] / facingSteps[i] : 0,
			shadedHours: shadedSteps[i] * hoursPerStep,
			beamKwhM2: allWithout,
			beamLitKwhM2: allLit,
			monthHourLoss,
			monthLoss,
			shadedUpToDeg: shortestDay.shadedUpToDeg[i],
			meetsWinterRule: !breakers.has(tracker.id)
		};
	});
	// Kept with the result for pictures: the verdict is made from the full digits, which would only make it long.
	shortestDay.shares = shortestDay.shares.map((shares) =>
		shares.map((share) => Math.round(share * 1e5) / 1e5)
	);
	const whole = binLosses(fieldWithout, fieldLit);
	let worst: TrackerShade | null = null;
	for (const tracker of trackers) if (worst === null || tracker.beamLoss > worst.beamLoss) worst = tracker;
	onProgress?.(1);
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
