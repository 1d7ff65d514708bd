import proj4 from 'proj4';
import type { Place, PlanPoint } from '$lib/core/document';

export type Origin = Pick<Place, 'latitudeDeg' | 'longitudeDeg'>;
/** [longitude, latitude] in degrees, WGS84: the order of RFC 7946, section 3.1.1. */
export type LonLat = [longitudeDeg: number, latitudeDeg: number];

/**
 * Transverse Mercator on the WGS84 ellipsoid with its central meridian and its origin at the project's place and scale
 * 1 there, so that the plan's axes are true east and true north at the origin. Scale error grows with the square of the
 * distance east or west: 1.2e-8 at 1 km, 5e-6 at 20 km; convergence at 1 km stays below 0.02 degrees up to 65° of
 * latitude. Source: Karney (2011), Transverse Mercator with an accuracy of a few nanometers, as computed by proj4.
 */
function definition(origin: Origin): string {
	return `+proj=tmerc +lat_0=${origin.latitudeDeg} +lon_0=${origin.longitudeDeg} +k=1 +x_0=0 +y_0=0 +ellps=WGS84 +units=m +no_defs`;
}

/** From degrees to metres east and north of the place. */
export function localFromLonLat(origin: Origin): (longitudeDeg: number, latitudeDeg: number) => PlanPoint {
	const projection = proj4(definition(origin));
	return (longitudeDeg, latitudeDeg) => {
		const [eastM, northM] = projection.forward([longitudeDeg, latitudeDeg]);
		return [eastM, northM];
	};
}

/** From metres east and north of the place to degrees. */
export function lonLatFromLocal(origin: Origin): (eastM: number, northM: number) => LonLat {
	const projection = proj4(definition(origin));
	return (eastM, northM) => {
		const [longitudeDeg, latitudeDeg] = projection.inverse([eastM, northM]);
		return [longitudeDeg, latitudeDeg];
	};
}

/** Mean radius of the earth, IUGG 1980, metres. */
const EARTH_RADIUS_M = 6_371_008.8;

/** Great-circle distance in metres on a sphere: within 0.6 % of the ellipsoid, good for "how far off is this file". */
export function roughDistanceM(a: LonLat, b: LonLat): number {
	const radians = Math.PI / 180;
	const half = Math.sin(((b[1] - a[1]) * radians) / 2);
	const across = Math.sin(((b[0] - a[0]) * radians) / 2);
	const h = half * half + Math.cos(a[1] * radians) * Math.cos(b[1] * radians) * across * across;
	return 2 * EARTH_RADIUS_M * Math.asin(Math.min(1, Math.sqrt(h)));
}

/** Bearing in degrees from one point towards another near it. */
export function roughBearingDeg(from: LonLat, to: LonLat): number {
	const radians = Math.PI / 180;
	const east = (to[0] - from[0]) * Math.cos(((from[1] + to[1]) / 2) * radians);
	return (Math.atan2(east, to[1] - from[1]) / radians + 360) % 360;
}
