import {
	prepareSkyline,
	skylineHeightDeg,
	sunDay,
	sunPosition,
	type Place,
	type SkylinePoint
} from '$lib/core';

export interface PathPoint {
	azimuthDeg: number;
	elevationDeg: number;
	hidden: boolean;
}

export interface SunPath {
	date: string;
	points: PathPoint[];
	/** Minutes that the sun is above the level horizon, and those of them behind the skyline. */
	upMinutes: number;
	lostMinutes: number;
}

/** Steps are this long or a little shorter, so that a whole number of them fills the day. */
const STEP_MINUTES = 2;
const MINUTE_MS = 60_000;

/** From rise to set, the upper limb on a level horizon; the whole of a polar day, nothing of a polar night. */
function sunUp(date: string, place: Place, utcOffsetMinutes: number): [fromMs: number, toMs: number] {
	const day = sunDay(date, place, utcOffsetMinutes);
	if (day.kind === 'polar-night') return [day.transitMs, day.transitMs];
	const halfDayMs = 720 * MINUTE_MS;
	return [day.riseMs ?? day.transitMs - halfDayMs, day.setMs ?? day.transitMs + halfDayMs];
}

/**
 * The sun's way over one day of the site, in mid-interval steps, and what the skyline takes of it. The sun counts as hidden by its
 * centre at apparent elevation; in the minutes when only its upper limb is up, the centre is taken to stand on the horizon.
 */
export function sunPath(
	date: string,
	place: Place,
	utcOffsetMinutes: number,
	skyline: readonly SkylinePoint[]
): SunPath {
	const prepared = prepareSkyline(skyline);
	const [fromMs, toMs] = sunUp(date, place, utcOffsetMinutes);
	const upMinutes = (toMs - fromMs) / MINUTE_MS;
	const steps = Math.ceil(upMinutes / STEP_MINUTES);
	const points: PathPoint[] = [];
	let lost = 0;
	for (let step = 0; step < steps; step += 1) {
		const timeMs = fromMs + ((step + 0.5) / steps) * (toMs - fromMs);
		const sun = sunPosition(timeMs, place.latitudeDeg, place.longitudeDeg);
		const elevationDeg = Math.max(0, sun.apparentElevationDeg);
		const hidden = elevationDeg < skylineHeightDeg(prepared, sun.azimuthDeg);
		if (hidden) lost += 1;
		points.push({ azimuthDeg: sun.azimuthDeg, elevationDeg, hidden });
	}
	return { date, points, upMinutes, lostMinutes: steps === 0 ? 0 : (lost / steps) * upMinutes };
}

export interface NamedPath {
	name: string;
	path: SunPath;
}
