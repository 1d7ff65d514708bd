import {
	dayStartMs,
	prepareSkyline,
	skylineHeightDeg,
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

const STEP_MINUTES = 2;

/** The sun's way over one day of the site and what the skyline takes of it; apparent elevation, mid-interval steps of 2 minutes. */
export function sunPath(
	date: string,
	place: Place,
	utcOffsetMinutes: number,
	skyline: readonly SkylinePoint[]
): SunPath {
	const prepared = prepareSkyline(skyline);
	const startMs = dayStartMs(date, utcOffsetMinutes);
	const points: PathPoint[] = [];
	let lost = 0;
	for (let minute = STEP_MINUTES / 2; minute < 1440; minute += STEP_MINUTES) {
		const sun = sunPosition(startMs + minute * 60_000, place.latitudeDeg, place.longitudeDeg);
		if (sun.apparentElevationDeg <= 0) continue;
		const hidden = sun.apparentElevationDeg < skylineHeightDeg(prepared, sun.azimuthDeg);
		if (hidden) lost += 1;
		points.push({ azimuthDeg: sun.azimuthDeg, elevationDeg: sun.apparentElevationDeg, hidden });
	}
	return { date, points, upMinutes: points.length * STEP_MINUTES, lostMinutes: lost * STEP_MINUTES };
}

export interface NamedPath {
	name: string;
	path: SunPath;
}
