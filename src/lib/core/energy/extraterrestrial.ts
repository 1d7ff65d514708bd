import { RADIANS_PER_DEGREE } from '../conventions';
import { SOLAR_CONSTANT } from './beam';

/** Angle of the day in the year, radians: 2 pi (n - 1) / 365 with n = 1 on 1 January (Spencer 1971). */
function dayAngle(dayOfYear: number): number {
	return (2 * Math.PI * (dayOfYear - 1)) / 365;
}

/** Day of the year 1..366 of a UTC instant shifted to local standard time. */
export function dayOfYear(timeMs: number, utcOffsetHours = 0): number {
	const local = timeMs + utcOffsetHours * 3600000;
	const yearStart = Date.UTC(new Date(local).getUTCFullYear(), 0, 1);
	return Math.floor((local - yearStart) / 86400000) + 1;
}

/** Mean distance of the sun over its distance, squared: Fourier series of Spencer 1971. Dimensionless, 0.966..1.035. */
export function distanceFactor(day: number): number {
	const b = dayAngle(day);
	return (
		1.00011 +
		0.034221 * Math.cos(b) +
		0.00128 * Math.sin(b) +
		0.000719 * Math.cos(2 * b) +
		0.000077 * Math.sin(2 * b)
	);
}

/** Irradiance on a plane square to the sun outside the air, W/m²: solar constant x distance factor of Spencer 1971. */
export function extraterrestrialNormal(day: number, solarConstant = SOLAR_CONSTANT): number {
	return solarConstant * distanceFactor(day);
}

/**
 * Declination of the sun in degrees: Spencer 1971. Up to 0.54 degrees off within a year, so it serves average days and
 * daily sums only; where a shadow falls is computed with `sunPosition`.
 */
export function seriesDeclinationDeg(day: number): number {
	const b = dayAngle(day);
	const radians =
		0.006918 -
		0.399912 * Math.cos(b) +
		0.070257 * Math.sin(b) -
		0.006758 * Math.cos(2 * b) +
		0.000907 * Math.sin(2 * b) -
		0.002697 * Math.cos(3 * b) +
		0.00148 * Math.sin(3 * b);
	return radians / RADIANS_PER_DEGREE;
}

/** Equation of time in minutes (sundial minus clock): Spencer 1971 as corrected. Up to 0.9 minutes off within a year. */
export function seriesEquationOfTimeMin(day: number): number {
	const b = dayAngle(day);
	return (
		229.18 *
		(0.0000075 +
			0.001868 * Math.cos(b) -
			0.032077 * Math.sin(b) -
			0.014615 * Math.cos(2 * b) -
			0.040849 * Math.sin(2 * b))
	);
}

/** Hour angle of the geometric sunset in degrees, acos(-tan phi tan delta): 0 when the sun stays down, 180 when up. */
export function sunsetHourAngleDeg(latitudeDeg: number, declinationDeg: number): number {
	const cosine = -Math.tan(latitudeDeg * RADIANS_PER_DEGREE) * Math.tan(declinationDeg * RADIANS_PER_DEGREE);
	return Math.acos(Math.min(1, Math.max(-1, cosine))) / RADIANS_PER_DEGREE;
}

/** Hours from geometric sunrise to sunset, without refraction: 2/15 of the sunset hour angle. */
export function dayLengthHours(latitudeDeg: number, declinationDeg: number): number {
	return (2 / 15) * sunsetHourAngleDeg(latitudeDeg, declinationDeg);
}

/**
 * Extraterrestrial irradiation of a level plane between two hour angles in degrees (within sunrise to sunset), Wh/m²:
 * Duffie and Beckman eq. 1.10.4.
 */
export function extraterrestrialHorizontalWh(
	latitudeDeg: number,
	day: number,
	fromHourAngleDeg: number,
	toHourAngleDeg: number,
	declinationDeg = seriesDeclinationDeg(day),
	solarConstant = SOLAR_CONSTANT
): number {
	const phi = latitudeDeg * RADIANS_PER_DEGREE;
	const delta = declinationDeg * RADIANS_PER_DEGREE;
	const sunset = sunsetHourAngleDeg(latitudeDeg, declinationDeg);
	const from = Math.max(-sunset, fromHourAngleDeg) * RADIANS_PER_DEGREE;
	const to = Math.min(sunset, toHourAngleDeg) * RADIANS_PER_DEGREE;
	if (to <= from) return 0;
	const swing =
		Math.cos(phi) * Math.cos(delta) * (Math.sin(to) - Math.sin(from)) +
		(to - from) * Math.sin(phi) * Math.sin(delta);
	return (12 / Math.PI) * extraterrestrialNormal(day, solarConstant) * Math.max(0, swing);
}

/** Extraterrestrial irradiation of a level plane in one day, Wh/m²: Duffie and Beckman eq. 1.10.3. */
export function extraterrestrialDayWh(
	latitudeDeg: number,
	day: number,
	declinationDeg = seriesDeclinationDeg(day),
	solarConstant = SOLAR_CONSTANT
): number {
	return extraterrestrialHorizontalWh(latitudeDeg, day, -180, 180, declinationDeg, solarConstant);
}
