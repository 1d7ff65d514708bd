import type { DayShade } from '../results';
import { fieldSunHidden, type Field } from '../field';
import { dayStartMs, sunDay } from '../sun/day';
import { dayOfYear } from '../energy/extraterrestrial';
import { assertStep, SunSky, type SunStep } from './sun-steps';

const DAY_MS = 86400000;
/** Shade of less than this share of a table is no shade to the winter rule: a sliver that nobody can see. */
export const SHADED_FROM = 0.001;
/** An interval in which shade ends is looked at in so many parts. */
const PARTS = 16;

/** Trackers `from` to `to` (not itself) of a layout. */
export interface DayRange {
	from: number;
	to: number;
}

/** The day of some trackers of a field: what `joinDayShade` puts together. Plain data and typed arrays. */
export interface DayShadePart extends DayRange {
	date: string;
	timesMs: number[];
	sunAzimuthDeg: number[];
	sunElevationDeg: number[];
	sunHidden: boolean[];
	/** [tracker - from][time] */
	shares: Float64Array;
	/** Trackers of the layout and times. */
	backToSun: [tracker: number, time: number][];
	/** Beam without and with shade by tracker, summed over the steps, W/m². */
	without: Float64Array;
	lit: Float64Array;
	shadedUpToDeg: (number | null)[];
}

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
	return joinDayShade([
		dayShadePart(field, dateIso, stepMinutes, utcOffsetMinutes, { from: 0, to: field.engine.count })
	]);
}

/** The part of `dayShade` that is about some trackers; all of the field throw their shade. */
export function dayShadePart(
	field: Field,
	dateIso: string,
	stepMinutes: number,
	utcOffsetMinutes: number,
	{ from, to }: DayRange
): DayShadePart {
	assertStep(stepMinutes);
	const { engine, place } = field;
	const sky = new SunSky(place);
	const stepMs = stepMinutes * 60000;
	const startMs = dayWindowStart(field, dateIso, utcOffsetMinutes);
	engine.setDay(dayOfYear(startMs + DAY_MS / 2, utcOffsetMinutes / 60));
	const suns: SunStep[] = [];
	for (let timeMs = startMs + stepMs / 2; timeMs < startMs + DAY_MS; timeMs += stepMs) {
		const sun = sky.at(timeMs);
		if (sun.elevationDeg > 0) suns.push(sun);
	}
	const n = suns.length;
	const part: DayShadePart = {
		from,
		to,
		date: dateIso,
		timesMs: suns.map((sun) => sun.timeMs),
		sunAzimuthDeg: suns.map((sun) => sun.azimuthDeg),
		sunElevationDeg: suns.map((sun) => sun.elevationDeg),
		sunHidden: suns.map((sun) => fieldSunHidden(field, sun)),
		shares: new Float64Array((to - from) * n),
		backToSun: [],
		without: new Float64Array(to - from),
		lit: new Float64Array(to - from),
		shadedUpToDeg: []
	};
	const now = new Float64Array(engine.count);
	for (let k = 0; k < n; k++) {
		if (part.sunHidden[k]) {
			for (let row = 0; row < to - from; row++) part.shares[row * n + k] = 1;
			continue;
		}
		const sun = suns[k];
		engine.setSun(sun.azimuthDeg, sun.elevationDeg);
		engine.shares(now, from, to);
		for (let i = from; i < to; i++) {
			const row = i - from;
			const cosine = engine.cosine(i);
			part.shares[row * n + k] = now[i];
			if (cosine <= 0) {
				part.backToSun.push([i, k]);
				continue;
			}
			part.without[row] += sun.beam * cosine;
			part.lit[row] += sun.beam * cosine * (1 - now[i]);
		}
	}
	part.shadedUpToDeg = shadedUpTo(field, sky, part, stepMs);
	return part;
}

/** Puts parts of one day that follow each other together; the field's figures are made here, in the layout's order. */
export function joinDayShade(parts: readonly DayShadePart[]): DayShade {
	const { date, timesMs, sunAzimuthDeg, sunElevationDeg, sunHidden } = parts[0];
	const n = timesMs.length;
	const total = new Float64Array(n);
	const facing = new Float64Array(n);
	const shares: number[][] = [];
	const trackerBeamLoss: number[] = [];
	let without = 0;
	let lit = 0;
	for (const part of parts) {
		const back = new Set(part.backToSun.map(([i, k]) => (i - part.from) * n + k));
		for (let row = 0; row < part.to - part.from; row++) {
			const own = part.shares.subarray(row * n, (row + 1) * n);
			shares.push(Array.from(own));
			for (let k = 0; k < n; k++) {
				if (back.has(row * n + k)) continue;
				total[k] += own[k];
				facing[k]++;
			}
			trackerBeamLoss.push(part.without[row] > 0 ? 1 - part.lit[row] / part.without[row] : 0);
			without += part.without[row];
			lit += part.lit[row];
		}
	}
	return {
		date,
		timesMs,
		sunAzimuthDeg,
		sunElevationDeg,
		sunHidden,
		fieldShare: Array.from(total, (sum, k) => (facing[k] > 0 ? sum / facing[k] : 0)),
		shares,
		shadedUpToDeg: parts.flatMap((part) => part.shadedUpToDeg),
		backToSun: parts.flatMap((part) => part.backToSun),
		beamLoss: without > 0 ? 1 - lit / without : 0,
		trackerBeamLoss
	};
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
function shadedUpTo(field: Field, sky: SunSky, day: DayShadePart, stepMs: number): (number | null)[] {
	const n = day.timesMs.length;
	const elevations = day.sunElevationDeg;
	const back = new Set(day.backToSun.map(([i, k]) => (i - day.from) * n + k));
	const ends = new Map<string, { k: number; j: number; trackers: number[] }>();
	const highest = Array.from({ length: day.to - day.from }, (_, row): number | null => {
		const shares = day.shares.subarray(row * n, (row + 1) * n);
		const counts = (k: number): boolean => !day.sunHidden[k] && !back.has(row * n + k);
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
				if (end) end.trackers.push(day.from + row);
				else ends.set(key, { k, j, trackers: [day.from + row] });
			}
		}
		return top;
	});
	for (const { k, j, trackers } of ends.values()) {
		refineEnd(field, sky, day.timesMs[k], Math.sign(j - k) * stepMs, trackers, (i, elevation) => {
			if (elevation > (highest[i - day.from] ?? -90)) highest[i - day.from] = elevation;
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
