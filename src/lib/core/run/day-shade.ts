import type { DayShade } from '../results';
import { fieldSunHidden, type Field } from '../field';
import { dayStartMs, sunDay } from '../sun/day';
import { SunSky } from './sun-steps';

const DAY_MS = 86400000;
/** Shade of less than this share of a table is no shade to the winter rule: a sliver that nobody can see. */
export const SHADED_FROM = 0.001;
/** Rounds of halving a step when the end of the shade is looked for: 2 minutes become a fifth of a second. */
const HALVINGS = 10;
/** Beyond this many trackers the end of the shade is read linearly between two steps instead of halved. */
const MOST_REFINED = 3000;

/**
 * Shade of one site day: every `stepMinutes` from sunrise to sunset (the middle of each interval), by tracker and
 * for the field. Beam as in the year run. `dateIso` is the site's date at `utcOffsetMinutes` from UTC. Empty lists
 * in the polar night. 100 trackers at 5 minutes take a few milliseconds.
 */
export function dayShade(
	field: Field,
	dateIso: string,
	stepMinutes: number,
	utcOffsetMinutes: number
): DayShade {
	const { engine, place } = field;
	const sky = new SunSky(place);
	const stepMs = stepMinutes * 60000;
	const startMs = dayWindowStart(field, dateIso, utcOffsetMinutes);
	const day: DayShade = {
		date: dateIso,
		timesMs: [],
		sunAzimuthDeg: [],
		sunElevationDeg: [],
		sunHidden: [],
		fieldShare: [],
		shares: Array.from({ length: engine.count }, () => []),
		shadedUpToDeg: [],
		backToSun: [],
		beamLoss: 0,
		trackerBeamLoss: []
	};
	const without = new Float64Array(engine.count);
	const lit = new Float64Array(engine.count);
	for (let timeMs = startMs + stepMs / 2; timeMs < startMs + DAY_MS; timeMs += stepMs) {
		const sun = sky.at(timeMs);
		if (sun.elevationDeg <= 0) continue;
		const k = day.timesMs.length;
		const hidden = fieldSunHidden(field, sun);
		day.timesMs.push(timeMs);
		day.sunAzimuthDeg.push(sun.azimuthDeg);
		day.sunElevationDeg.push(sun.elevationDeg);
		day.sunHidden.push(hidden);
		if (hidden) {
			for (const shares of day.shares) shares.push(1);
			day.fieldShare.push(engine.count > 0 ? 1 : 0);
			continue;
		}
		engine.setSun(sun.azimuthDeg, sun.elevationDeg);
		let total = 0;
		let facing = 0;
		for (let i = 0; i < engine.count; i++) {
			const share = engine.share(i);
			const cosine = engine.cosine(i);
			day.shares[i].push(share);
			if (cosine <= 0) {
				day.backToSun.push([i, k]);
				continue;
			}
			total += share;
			facing++;
			without[i] += sun.beam * cosine;
			lit[i] += sun.beam * cosine * (1 - share);
		}
		day.fieldShare.push(facing > 0 ? total / facing : 0);
	}
	let fieldWithout = 0;
	let fieldLit = 0;
	for (let i = 0; i < engine.count; i++) {
		day.trackerBeamLoss.push(without[i] > 0 ? 1 - lit[i] / without[i] : 0);
		fieldWithout += without[i];
		fieldLit += lit[i];
	}
	day.beamLoss = fieldWithout > 0 ? 1 - fieldLit / fieldWithout : 0;
	const back = new Set(day.backToSun.map(([i, k]) => i * day.timesMs.length + k));
	day.shadedUpToDeg = day.shares.map((shares, i) => shadedUpTo(field, sky, day, shares, i, back, stepMs));
	return day;
}

/** The day is taken around the sun's noon, so that a place far from its time zone's meridian keeps one whole day. */
function dayWindowStart(field: Field, dateIso: string, utcOffsetMinutes: number): number {
	const { transitMs } = sunDay(dateIso, field.place, utcOffsetMinutes);
	const midnight = dayStartMs(dateIso, utcOffsetMinutes);
	const low = transitMs - DAY_MS / 2;
	// Keeps to whole minutes of the site's clock.
	return midnight + Math.round((low - midnight) / 3600000) * 3600000;
}

/** Highest sun of the day with shade on tracker i: the highest shaded step, then the end of the shade beyond it. */
function shadedUpTo(
	field: Field,
	sky: SunSky,
	day: DayShade,
	shares: readonly number[],
	i: number,
	back: ReadonlySet<number>,
	stepMs: number
): number | null {
	const n = day.timesMs.length;
	const shaded = (k: number): boolean =>
		k >= 0 && k < n && !day.sunHidden[k] && shares[k] > SHADED_FROM && !back.has(i * n + k);
	let highest: number | null = null;
	const raise = (elevation: number) => {
		if (highest === null || elevation > highest) highest = elevation;
	};
	for (let k = 0; k < n; k++) {
		if (!shaded(k)) continue;
		raise(day.sunElevationDeg[k]);
		for (const side of [-1, 1]) {
			// Only an end towards the higher sun can raise the figure.
			const j = k + side;
			if (j < 0 || j >= n || shaded(j) || day.sunHidden[j] || back.has(i * n + j)) continue;
			if (day.sunElevationDeg[j] <= (highest ?? -90)) continue;
			raise(endOfShade(field, sky, i, day.timesMs[k], day.timesMs[k] + side * stepMs, day, shares, k, j));
		}
	}
	return highest;
}

function endOfShade(
	field: Field,
	sky: SunSky,
	i: number,
	shadedMs: number,
	clearMs: number,
	day: DayShade,
	shares: readonly number[],
	k: number,
	j: number
): number {
	const { engine } = field;
	if (engine.count > MOST_REFINED) {
		const part = (shares[k] - SHADED_FROM) / Math.max(1e-12, shares[k] - shares[j]);
		return day.sunElevationDeg[k] + (day.sunElevationDeg[j] - day.sunElevationDeg[k]) * Math.min(1, part);
	}
	let inside = shadedMs;
	let outside = clearMs;
	for (let round = 0; round < HALVINGS; round++) {
		const mid = (inside + outside) / 2;
		const sun = sky.at(mid);
		engine.setSun(sun.azimuthDeg, sun.elevationDeg, false);
		if (engine.cosine(i) > 0 && engine.share(i) > SHADED_FROM) inside = mid;
		else outside = mid;
	}
	return sky.at((inside + outside) / 2).elevationDeg;
}
