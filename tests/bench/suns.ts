import { sunPosition, type SunDirection } from '../../src/lib/core';
import { BENCH_YEAR, place, STEP_MINUTES } from './fields';

const STEP_MS = STEP_MINUTES * 60000;
let year: SunDirection[] | null = null;

/** Every sun above the horizon of a year of 10-minute steps, mid-interval, in the order of time; apparent. */
export function yearSuns(): SunDirection[] {
	if (year) return year;
	year = [];
	const end = Date.UTC(BENCH_YEAR + 1, 0, 1);
	for (let timeMs = Date.UTC(BENCH_YEAR, 0, 1) + STEP_MS / 2; timeMs < end; timeMs += STEP_MS) {
		const { azimuthDeg, apparentElevationDeg } = sunPosition(timeMs, place.latitudeDeg, place.longitudeDeg);
		if (apparentElevationDeg > 0) year.push({ azimuthDeg, elevationDeg: apparentElevationDeg });
	}
	return year;
}

/**
 * Every k-th sun of the year. Days have no fixed number of suns above the horizon, so any k keeps the mix of hours and
 * seasons.
 */
export const everySun = (k: number): SunDirection[] => yearSuns().filter((_, at) => at % k === 0);

/** So many suns spread evenly over the daylight of the shortest day. */
export function shortestDaySuns(count: number): SunDirection[] {
	const suns: SunDirection[] = [];
	const middle = Date.UTC(BENCH_YEAR, 11, 21, 11, 2);
	const half = 4.4 * 3600000;
	for (let k = 0; k < count; k++) {
		const timeMs = middle + half * ((2 * k + 1) / count - 1);
		const { azimuthDeg, apparentElevationDeg } = sunPosition(timeMs, place.latitudeDeg, place.longitudeDeg);
		suns.push({ azimuthDeg, elevationDeg: Math.max(0.2, apparentElevationDeg) });
	}
	return suns;
}
