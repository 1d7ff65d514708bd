import { normaliseDeg, RADIANS_PER_DEGREE } from '../conventions';
import { fieldSunHidden, type Field } from '../field';
import { SHADED_FROM } from '../run/day-shade';
import { refractionDeg } from '../sun/position';

/** Bearings that are looked at, degrees apart. */
const BEARING_STEP_DEG = 3;
const BEARINGS = 360 / BEARING_STEP_DEG;
/** Sectors of bearings, from north: 0..30, 30..60, .. degrees. */
export const SECTORS = 12;
/** Heights that are looked at, degrees apart; the lowest stands just above the horizon. */
const HEIGHT_STEP_DEG = 0.5;
const LOWEST_DEG = 0.1;
/** Halvings of a step: to less than 0.01 degrees. */
const HALVINGS = 6;
/** Greatest declination of the sun in this age, degrees. */
const MOST_DECLINATION_DEG = 23.44;
const NEVER = -1;

/** What one range of trackers tells of clear heights: plain arrays, so that they can be handed between threads. */
export interface ClearHeightPart {
	/** Highest step of the heights with any of them shaded, by bearing; -1 where none. */
	topByBearing: Int16Array;
	/** By tracker: height above which it is never shaded and the bearing there, degrees; NaN when never shaded. */
	aboveDeg: Float64Array;
	azimuthDeg: Float64Array;
	/** [tracker][sector]: highest step of the heights with shade; -1 where none. */
	topBySector: Int16Array;
}

const heightDeg = (step: number): number => (step === 0 ? LOWEST_DEG : step * HEIGHT_STEP_DEG);
const sectorOf = (bearing: number): number => Math.floor((bearing * SECTORS) / BEARINGS);

/** Whether the sun ever stands there at this latitude: its declination is one that the sun takes. Apparent height. */
function sunComesTo(latitudeDeg: number, azimuthDeg: number, elevationDeg: number): boolean {
	const phi = latitudeDeg * RADIANS_PER_DEGREE;
	const a = azimuthDeg * RADIANS_PER_DEGREE;
	// Refraction is that of the airless height, here of the apparent one: 0.1 degrees wrong at the horizon at most.
	const e = (elevationDeg - refractionDeg(elevationDeg)) * RADIANS_PER_DEGREE;
	const sine = Math.sin(phi) * Math.sin(e) + Math.cos(phi) * Math.cos(e) * Math.cos(a);
	return Math.abs(sine) <= Math.sin(MOST_DECLINATION_DEG * RADIANS_PER_DEGREE);
}

/**
 * Apparent height of the highest sun of any year at a latitude (degrees, -90..90), degrees: 90 between the tropics. Within
 * 0.01 degrees in this age. Neglected: the day's steps of the sun, which meets its highest at noon to within 0.01 degrees.
 */
export function highestSunDeg(latitudeDeg: number): number {
	const airless = 90 - Math.max(0, Math.abs(latitudeDeg) - MOST_DECLINATION_DEG);
	return Math.min(90, airless + refractionDeg(airless));
}

/** Whether the sun ever stands there, and clear of the skyline. */
function isSun(field: Field, azimuthDeg: number, elevationDeg: number): boolean {
	return (
		sunComesTo(field.place.latitudeDeg, azimuthDeg, elevationDeg) &&
		!fieldSunHidden(field, { azimuthDeg, elevationDeg })
	);
}

/** Heights at one bearing to which the sun comes and which the skyline leaves free, from above. */
function* stepsDown(field: Field, azimuthDeg: number): Generator<number> {
	for (let step = Math.floor(90 / HEIGHT_STEP_DEG); step >= 0; step--) {
		const elevationDeg = heightDeg(step);
		if (isSun(field, azimuthDeg, elevationDeg)) yield step;
	}
}

/** Height between a shaded and a clear one at which shade ends, degrees. */
function shadeEndDeg(
	shadedDeg: number,
	clearDeg: number,
	isShaded: (elevationDeg: number) => boolean
): number {
	let low = shadedDeg;
	let high = clearDeg;
	for (let k = 0; k < HALVINGS; k++) {
		const middle = (low + high) / 2;
		if (isShaded(middle)) low = middle;
		else high = middle;
	}
	return high;
}

/**
 * Where the sun, in the whole of its year's band, still shades trackers `from` to `to`: every 3 degrees of bearing, every
 * half degree of height. Trees bare. A table with its back to the sun is not shaded by others.
 */
export function clearHeightPart(
	field: Field,
	range: { from: number; to: number },
	onProgress?: (done01: number) => boolean
): ClearHeightPart | null {
	const { engine } = field;
	const { from, to } = range;
	const n = to - from;
	const topByBearing = new Int16Array(BEARINGS).fill(NEVER);
	const topBySector = new Int16Array(n * SECTORS).fill(NEVER);
	const top = new Int16Array(n).fill(NEVER);
	/** Bearings at which each is shaded at its highest step: any of them may come out highest. */
	const topBearings: number[][] = Array.from({ length: n }, () => []);
	const shares = new Float64Array(engine.count);
	for (let b = 0; b < BEARINGS; b++) {
		if (onProgress && !onProgress(b / BEARINGS)) return null;
		const azimuthDeg = b * BEARING_STEP_DEG;
		for (const step of stepsDown(field, azimuthDeg)) {
			engine.setSun(azimuthDeg, heightDeg(step));
			if (engine.shares(shares, from, to) === 0) continue;
			for (let i = from; i < to; i++) {
				if (shares[i] <= SHADED_FROM || engine.cosine(i) <= 0) continue;
				const at = i - from;
				if (topByBearing[b] === NEVER) topByBearing[b] = step;
				const o = at * SECTORS + sectorOf(b);
				if (step > topBySector[o]) topBySector[o] = step;
				if (step > top[at]) {
					top[at] = step;
					topBearings[at] = [];
				}
				if (step === top[at]) topBearings[at].push(b);
			}
		}
	}
	const aboveDeg = new Float64Array(n).fill(NaN);
	const azimuths = new Float64Array(n).fill(NaN);
	for (let at = 0; at < n; at++) {
		for (const b of topBearings[at]) {
			const azimuthDeg = b * BEARING_STEP_DEG;
			const end = shadeEndDeg(heightDeg(top[at]), heightDeg(top[at] + 1), (elevationDeg) => {
				if (!isSun(field, azimuthDeg, elevationDeg)) return false;
				engine.setSun(azimuthDeg, elevationDeg, false);
				return engine.cosine(from + at) > 0 && engine.share(from + at) > SHADED_FROM;
			});
			// Never so for the first, against NaN.
			if (end <= aboveDeg[at]) continue;
			aboveDeg[at] = end;
			azimuths[at] = azimuthDeg;
		}
	}
	return { topByBearing, aboveDeg, azimuthDeg: azimuths, topBySector };
}

export interface FieldClearHeight {
	aboveDeg: number | null;
	azimuthDeg: number | null;
	bySectorDeg: (number | null)[];
	profile: { azimuthDeg: number; elevationDeg: number }[];
}

/** The field's clear height from its parts: by bearing, refined to 0.01 degrees; 0 in the profile where nothing is ever shaded. */
export function fieldClearHeight(field: Field, parts: readonly ClearHeightPart[]): FieldClearHeight {
	const { engine } = field;
	const shares = new Float64Array(engine.count);
	const bySectorDeg: (number | null)[] = Array.from({ length: SECTORS }, () => null);
	const profile: FieldClearHeight['profile'] = [];
	let aboveDeg: number | null = null;
	let above: number | null = null;
	for (let b = 0; b < BEARINGS; b++) {
		const azimuthDeg = normaliseDeg(b * BEARING_STEP_DEG);
		const step = Math.max(...parts.map((part) => part.topByBearing[b]));
		if (step === NEVER) {
			if (!stepsDown(field, azimuthDeg).next().done) profile.push({ azimuthDeg, elevationDeg: 0 });
			continue;
		}
		const end = shadeEndDeg(heightDeg(step), heightDeg(step + 1), (elevationDeg) => {
			if (!isSun(field, azimuthDeg, elevationDeg)) return false;
			engine.setSun(azimuthDeg, elevationDeg);
			engine.shares(shares);
			return shares.some((share, i) => share > SHADED_FROM && engine.cosine(i) > 0);
		});
		profile.push({ azimuthDeg, elevationDeg: end });
		const sector = sectorOf(b);
		if (end > (bySectorDeg[sector] ?? -1)) bySectorDeg[sector] = end;
		if (aboveDeg === null || end > aboveDeg) {
			aboveDeg = end;
			above = azimuthDeg;
		}
	}
	return { aboveDeg, azimuthDeg: above, bySectorDeg, profile };
}

/** One tracker's sectors as heights, to the half degree above. */
export function sectorsDeg(part: ClearHeightPart, at: number): (number | null)[] {
	return Array.from({ length: SECTORS }, (_, sector) => {
		const step = part.topBySector[at * SECTORS + sector];
		return step === NEVER ? null : heightDeg(step + 1);
	});
}
