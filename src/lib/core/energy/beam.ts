import { RADIANS_PER_DEGREE } from '../conventions';

/** Extraterrestrial normal irradiance at the mean distance of the sun, W/m² (value in use since Kopp and Lean 2011). */
export const SOLAR_CONSTANT = 1361;

/** How the pages' beam is named in results. */
export const BEAM_MODEL =
	'Clear sky: Meinel and Meinel 1976 beam with the altitude of Laue 1970, air mass of Kasten and Young 1989, 1361 W/m² at the mean distance of the sun';

/** Relative optical air mass at a zenith angle in degrees 0..90: Kasten and Young 1989. */
export function airMass(zenithDeg: number): number {
	const zenith = Math.min(90, Math.max(0, zenithDeg));
	return 1 / (Math.cos(zenith * RADIANS_PER_DEGREE) + 0.50572 * (96.07995 - zenith) ** -1.6364);
}

/**
 * Direct normal irradiance of a clear sky in W/m²: extraterrestrial x 0.7^(AM^0.678) (Meinel and Meinel 1976), with
 * the altitude form of Laue 1970, (1 - 0.14 h) 0.7^(AM^0.678) + 0.14 h for h in kilometres. 0 at and below the
 * horizon. Altitude is held inside 0..4 km, where the form was fitted.
 */
export function clearBeam(
	elevationDeg: number,
	altitudeM = 0,
	extraterrestrialNormal = SOLAR_CONSTANT
): number {
	if (elevationDeg <= 0) return 0;
	const h = Math.min(4, Math.max(0, altitudeM / 1000));
	const passed = 0.7 ** (airMass(90 - elevationDeg) ** 0.678);
	return extraterrestrialNormal * ((1 - 0.14 * h) * passed + 0.14 * h);
}
