import { transverseForward, transverseInverse } from './transverse-mercator';

/**
 * Universal Transverse Mercator on WGS84: sixty zones of 6 degrees, scale 0.9996 on the central meridian, false easting
 * 500 km, in the south false northing 10,000 km. Source: Defense Mapping Agency 1989, TM 8358.2 (from memory).
 */
export interface UtmZone {
	/** 1..60; zone 1 begins at 180 W. */
	zone: number;
	hemisphere: 'north' | 'south';
}

export interface UtmPoint extends UtmZone {
	/** Metres. */
	eastingM: number;
	northingM: number;
	/** True bearing = grid bearing + convergence, degrees. */
	convergenceDeg: number;
	/** Grid length over length on the ellipsoid, near 1. */
	scale: number;
}

const CENTRAL_SCALE = 0.9996;
const FALSE_EASTING_M = 500000;
const FALSE_NORTHING_M = 10000000;

/** Latitudes that the grid is made for, degrees; the poles have a grid of their own. */
export const UTM_LATITUDES = [-80, 84] as const;

/** Longitude of a zone's central meridian, degrees. */
export const centralMeridianDeg = (zone: number): number => 6 * zone - 183;

/** The longitude turned into -180 (included) .. 180. */
const turned = (longitudeDeg: number): number => ((((longitudeDeg + 180) % 360) + 360) % 360) - 180;

/**
 * The zone of a place, degrees north and east positive, any turn of longitude. South-western Norway lies in a zone 32 that
 * is widened to 3 E, and Svalbard in four zones: 31, 33, 35 and 37. The equator counts as north. Null outside 80 S .. 84 N,
 * where there is no zone.
 */
export function utmZoneOf(latitudeDeg: number, longitudeDeg: number): UtmZone | null {
	if (!(latitudeDeg >= UTM_LATITUDES[0] && latitudeDeg <= UTM_LATITUDES[1])) return null;
	const longitude = turned(longitudeDeg);
	const hemisphere = latitudeDeg >= 0 ? 'north' : 'south';
	return { zone: zoneNumber(latitudeDeg, longitude), hemisphere };
}

function zoneNumber(latitudeDeg: number, longitude: number): number {
	// Band V, 56 to 64 north: zone 31 ends at 3 E.
	if (latitudeDeg >= 56 && latitudeDeg < 64 && longitude >= 3 && longitude < 12) return 32;
	// Band X, 72 to 84 north: zones 32, 34 and 36 are not used.
	if (latitudeDeg >= 72 && longitude >= 0 && longitude < 42) {
		if (longitude < 9) return 31;
		if (longitude < 21) return 33;
		return longitude < 33 ? 35 : 37;
	}
	return Math.floor((longitude + 180) / 6) + 1;
}

function assertZone({ zone }: UtmZone): void {
	if (!(Number.isInteger(zone) && zone >= 1 && zone <= 60))
		throw new RangeError(`There is no UTM zone ${zone}`);
}

/**
 * Easting and northing of a place in a zone, its own or a neighbour's, with convergence and scale there. Degrees in. Good
 * to 1 mm within 60 degrees of the central meridian (Karney 2011); throws on a zone that does not exist.
 */
export function utmFromGeographic(latitudeDeg: number, longitudeDeg: number, zone: UtmZone): UtmPoint {
	assertZone(zone);
	const point = transverseForward(latitudeDeg, turned(longitudeDeg - centralMeridianDeg(zone.zone)));
	const falseNorthing = zone.hemisphere === 'south' ? FALSE_NORTHING_M : 0;
	return {
		zone: zone.zone,
		hemisphere: zone.hemisphere,
		eastingM: FALSE_EASTING_M + CENTRAL_SCALE * point.eastM,
		northingM: falseNorthing + CENTRAL_SCALE * point.northM,
		convergenceDeg: point.convergenceDeg,
		scale: CENTRAL_SCALE * point.scale
	};
}

/** The way back: degrees, convergence and scale of a grid point in metres. Same accuracy and errors. */
export function geographicFromUtm(
	zone: UtmZone,
	eastingM: number,
	northingM: number
): { latitudeDeg: number; longitudeDeg: number; convergenceDeg: number; scale: number } {
	assertZone(zone);
	const falseNorthing = zone.hemisphere === 'south' ? FALSE_NORTHING_M : 0;
	const point = transverseInverse(
		(eastingM - FALSE_EASTING_M) / CENTRAL_SCALE,
		(northingM - falseNorthing) / CENTRAL_SCALE
	);
	return {
		latitudeDeg: point.latitudeDeg,
		longitudeDeg: turned(point.longitudeDeg + centralMeridianDeg(zone.zone)),
		convergenceDeg: point.convergenceDeg,
		scale: CENTRAL_SCALE * point.scale
	};
}
