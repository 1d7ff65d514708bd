import { RADIANS_PER_DEGREE } from '../conventions';

/** Equatorial radius of WGS84, metres (defining constant). */
export const WGS84_A = 6378137;
/** Flattening of WGS84, 1 / 298.257223563 (defining constant). */
export const WGS84_F = 1 / 298.257223563;

/**
 * Length of one degree of latitude and of longitude at a latitude in degrees, metres, on WGS84: pi/180 times the radius
 * of curvature in the meridian M = a (1 - e²) / (1 - e² sin² phi)^(3/2), and N cos phi with N = a / sqrt(1 - e² sin² phi)
 * across it. Exact at the point; over a whole degree of latitude the first changes by up to 20 m. At a pole eastM is 0.
 * Source: any textbook of geodesy, for example Bomford 1980.
 */
export function metresPerDegree(latitudeDeg: number): { northM: number; eastM: number } {
	const phi = latitudeDeg * RADIANS_PER_DEGREE;
	const e2 = WGS84_F * (2 - WGS84_F);
	const w2 = 1 - e2 * Math.sin(phi) ** 2;
	const meridian = (WGS84_A * (1 - e2)) / (w2 * Math.sqrt(w2));
	const across = WGS84_A / Math.sqrt(w2);
	return {
		northM: meridian * RADIANS_PER_DEGREE,
		eastM: Math.max(0, across * Math.cos(phi)) * RADIANS_PER_DEGREE
	};
}
