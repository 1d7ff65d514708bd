import { normaliseDeg, RADIANS_PER_DEGREE } from '../conventions';
import { sunPlace, type SunPlace } from './ephemeris';

export interface SunPosition {
	/** Clockwise from true north, 0..360. */
	azimuthDeg: number;
	/** Of the sun's centre, without air. */
	elevationDeg: number;
	/** With refraction: the direction that the beam and a sensor know. Shading uses this one. */
	apparentElevationDeg: number;
}

/**
 * Refraction in degrees at an airless elevation in degrees, for 1010 mbar and 10 C: Saemundsson 1986 (Meeus 16.4),
 * 1.02 arcmin / tan(h + 10.3 / (h + 5.11)). Below -1 degree it fades in proportion to the distance from the nadir,
 * so that it stays continuous; nobody sees a sun there.
 */
export function refractionDeg(elevationDeg: number): number {
	const h = Math.max(-1, elevationDeg);
	const arcmin = 1.02 / Math.tan((h + 10.3 / (h + 5.11)) * RADIANS_PER_DEGREE);
	// At the zenith the formula dips 0.0019 arcmin below zero.
	const degrees = Math.max(0, arcmin) / 60;
	return elevationDeg < -1 ? (degrees * (elevationDeg + 90)) / 89 : degrees;
}

/** Horizontal position from a geocentric place; parallax in altitude 8.794 arcsec over the distance is included. */
export function positionFromPlace(place: SunPlace, latitudeDeg: number, longitudeDeg: number): SunPosition {
	const phi = latitudeDeg * RADIANS_PER_DEGREE;
	const hourAngle = place.siderealTime + longitudeDeg * RADIANS_PER_DEGREE - place.rightAscension;
	const sinPhi = Math.sin(phi);
	const cosPhi = Math.cos(phi);
	const sinDec = Math.sin(place.declination);
	const cosDec = Math.cos(place.declination);
	const cosHour = Math.cos(hourAngle);
	// East, north, up components: an arc tangent of two of them keeps its accuracy near the zenith.
	const east = -cosDec * Math.sin(hourAngle);
	const north = sinDec * cosPhi - cosDec * sinPhi * cosHour;
	const up = sinDec * sinPhi + cosDec * cosPhi * cosHour;
	const level = Math.hypot(east, north);
	const geocentricDeg = Math.atan2(up, level) / RADIANS_PER_DEGREE;
	const elevationDeg = geocentricDeg - ((8.794 / 3600) * level) / place.distanceAu;
	return {
		azimuthDeg: normaliseDeg(Math.atan2(east, north) / RADIANS_PER_DEGREE),
		elevationDeg,
		apparentElevationDeg: elevationDeg + refractionDeg(elevationDeg)
	};
}

/**
 * Where the sun stands at a UTC time in milliseconds, seen from a place (degrees, north and east positive). Held
 * within 0.001 degrees of arc of the reference positions of the tests; height above the sea changes nothing at
 * this accuracy. Never NaN: at the poles and at the zenith the azimuth is merely one of many.
 */
export function sunPosition(timeMs: number, latitudeDeg: number, longitudeDeg: number): SunPosition {
	return positionFromPlace(sunPlace(timeMs), latitudeDeg, longitudeDeg);
}

/** Apparent solar time at a longitude, hours 0..24; 12 when the sun crosses the meridian. */
export function solarHour(timeMs: number, longitudeDeg: number): number {
	const place = sunPlace(timeMs);
	const hourAngleDeg = (place.siderealTime - place.rightAscension) / RADIANS_PER_DEGREE + longitudeDeg;
	return normaliseDeg(hourAngleDeg + 180) / 15;
}
