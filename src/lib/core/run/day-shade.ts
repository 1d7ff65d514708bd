import type { DayShade } from '../results';
import { fieldSunHidden, type Field } from '../field';
import { dayStartMs, sunDay } from '../sun/day';
import { assertStep, SunSky } from './sun-steps';

const DAY_MS = 86400000;
/** Shade of less than this share of a table is no shade to the winter rule: a sliver that nobody can see. */
export const SHADED_FROM = 0.001;
/** An interval in which shade ends is looked at in so many parts. */
const PARTS = 16;

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
	assertStep(stepMinutes);
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
	day.shadedUpToDeg = shadedUpTo(field, sky, day, stepMs);
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

/**
 * Highest sun of the day with shade on each tracker: its highest shaded step, then the end of the shade between that
 * and the clear step above. All trackers whose shade ends in one interval are asked together.
 */
function shadedUpTo(field: Field, sky: SunSky, day: DayShade, stepMs: number): (number | null)[] {
	const n = day.timesMs.length;
	const elevations = day.sunElevationDeg;
	const back = new Set(day.backToSun.map(([i, k]) => i * n + k));
	const ends = new Map<string, { k: number; j: number; trackers: number[] }>();
	const highest = day.shares.map((shares, i): number | null => {
		const counts = (k: number): boolean => !day.sunHidden[k] && !back.has(i * n + k);
		const shaded = (k: number): boolean => shares[k] > SHADED_FROM && counts(k);
		let top: number | null = null;
		for (let k = 0; k < n; k++) if (shaded(k) && (top === null || elevations[k] > top)) top = elevations[k];
		if (top === null) return null;
		for (let k = 0; k < n; k++) {
			if (!shaded(k)) continue;
			for (const j of [k - 1, k + 1]) {
				if (j < 0 || j >= n || !counts(j) || shaded(j) || elevations[j] <= top) continue;
				const key = `${k} ${j}`;
				const end = ends.get(key);
				if (end) end.trackers.push(i);
				else ends.set(key, { k, j, trackers: [i] });
			}
		}
		return top;
	});
	for (const { k, j, trackers } of ends.values()) {
		refineEnd(field, sky, day.timesMs[k], Math.sign(j - k) * stepMs, trackers, (i, elevation) => {
			if (elevation > (highest[i] ?? -90)) highest[i] = elevation;
		});
	}
	return highest;
}

/**
 * Walks one interval in sixteenths from its shaded to its clear side; where a tracker's shade ends, the end is read
 * linearly between two sixteenths.
 */
function refineEnd(
	field: Field,
	sky: SunSky,
	shadedMs: number,
	wayMs: number,
	trackers: readonly number[],
	found: (tracker: number, elevationDeg: number) => void
): void {
	const { engine } = field;
	const last = new Map<number, { share: number; elevation: number }>();
	for (let part = 0; part <= PARTS; part++) {
		const sun = sky.at(shadedMs + (wayMs * part) / PARTS);
		engine.setSun(sun.azimuthDeg, sun.elevationDeg, trackers.length > 4);
		for (const i of trackers) {
			const share = engine.cosine(i) > 0 ? engine.share(i) : 0;
			const before = last.get(i);
			if (before && before.share > SHADED_FROM && share <= SHADED_FROM) {
				const to = (before.share - SHADED_FROM) / (before.share - share);
				found(i, before.elevation + (sun.elevationDeg - before.elevation) * to);
			}
			last.set(i, { share, elevation: sun.elevationDeg });
		}
	}
}
