import { RADIANS_PER_DEGREE } from '../conventions';

/**
 * Diffuse share of an hour's global irradiation from its clearness (global over extraterrestrial, both level):
 * Erbs, Klein and Duffie 1982. 0..1.
 */
export function erbsDiffuseShare(clearness: number): number {
	const k = Math.max(0, clearness);
	if (k <= 0.22) return 1 - 0.09 * k;
	if (k <= 0.8) return 0.9511 - 0.1604 * k + 4.388 * k ** 2 - 16.638 * k ** 3 + 12.336 * k ** 4;
	return 0.165;
}

/** The same from Orgill and Hollands 1977. 0..1. */
export function orgillHollandsDiffuseShare(clearness: number): number {
	const k = Math.max(0, clearness);
	if (k < 0.35) return 1 - 0.249 * k;
	return k <= 0.75 ? 1.557 - 1.84 * k : 0.177;
}

/**
 * Diffuse share of a month's global irradiation from the month's clearness: Erbs, Klein and Duffie 1982 (Duffie and
 * Beckman eq. 2.12.1; coefficients from memory), in two branches by the sunset hour angle of the month's mean day.
 * Fitted for clearness 0.3..0.8 and held at those ends; 0..1.
 */
export function erbsMonthlyDiffuseShare(clearness: number, sunsetHourAngleDeg: number): number {
	const k = Math.min(0.8, Math.max(0.3, clearness));
	const share =
		sunsetHourAngleDeg <= 81.4
			? 1.391 - 3.56 * k + 4.189 * k ** 2 - 2.137 * k ** 3
			: 1.311 - 3.022 * k + 3.427 * k ** 2 - 1.821 * k ** 3;
	return Math.min(1, Math.max(0, share));
}

/**
 * Share of a day's diffuse irradiation that falls in the hour about an hour angle: Liu and Jordan 1960,
 * pi/24 (cos w - cos ws) / (sin ws - ws cos ws). Degrees in; 0 after sunset. Summed over the hours of a day it is not
 * exactly 1: renormalise.
 */
export function liuJordanHourShare(hourAngleDeg: number, sunsetHourAngleDeg: number): number {
	const w = hourAngleDeg * RADIANS_PER_DEGREE;
	const ws = sunsetHourAngleDeg * RADIANS_PER_DEGREE;
	const whole = Math.sin(ws) - ws * Math.cos(ws);
	if (!(whole > 0) || Math.abs(hourAngleDeg) >= sunsetHourAngleDeg) return 0;
	return ((Math.PI / 24) * (Math.cos(w) - Math.cos(ws))) / whole;
}

/**
 * Share of a day's global irradiation that falls in the hour about an hour angle: Collares-Pereira and Rabl 1979, the
 * share of Liu and Jordan times a + b cos w, a = 0.409 + 0.5016 sin(ws - 60), b = 0.6609 - 0.4767 sin(ws - 60).
 * Degrees in; 0 after sunset, where the formula would turn negative. Renormalise.
 */
export function collaresPereiraRablHourShare(hourAngleDeg: number, sunsetHourAngleDeg: number): number {
	const swing = Math.sin((sunsetHourAngleDeg - 60) * RADIANS_PER_DEGREE);
	const a = 0.409 + 0.5016 * swing;
	const b = 0.6609 - 0.4767 * swing;
	const factor = a + b * Math.cos(hourAngleDeg * RADIANS_PER_DEGREE);
	return Math.max(0, factor * liuJordanHourShare(hourAngleDeg, sunsetHourAngleDeg));
}

/** Numbers brought to the sum 1; all zeros stay zeros. */
export function renormalise(shares: readonly number[]): number[] {
	const sum = shares.reduce((total, share) => total + share, 0);
	return sum > 0 ? shares.map((share) => share / sum) : shares.map(() => 0);
}
