import { RADIANS_PER_DEGREE } from '../conventions';
import { airMass, SOLAR_CONSTANT } from './beam';

/** What a clear sky gives, W/m². */
export interface ClearSky {
	/** On level ground, all of it. */
	globalHorizontal: number;
	/** Beam on a plane square to the sun. */
	directNormal: number;
	/** From the sky alone, on level ground. */
	diffuseHorizontal: number;
}

const DARK: ClearSky = { globalHorizontal: 0, directNormal: 0, diffuseHorizontal: 0 };

/** Constant of Haurwitz 1945 as Sandia's report SAND2012-2389 gives it. */
export const HAURWITZ_REPORTED = 0.057;
/** Constant that most public programs use for the same formula; 0.2 % less at the zenith, 2.5 % less at 85 degrees. */
export const HAURWITZ_CIRCULATING = 0.059;

/**
 * Global horizontal irradiance of a clear sky, W/m²: Haurwitz 1945, 1098 cos z exp(-k / cos z). Two constants k
 * circulate; the reported 0.057 unless another is given. 0 at and below the horizon.
 */
export function haurwitz(zenithDeg: number, k = HAURWITZ_REPORTED): number {
	const cosZenith = zenithDeg < 90 ? Math.cos(zenithDeg * RADIANS_PER_DEGREE) : 0;
	return cosZenith > 0 ? 1098 * cosZenith * Math.exp(-k / cosZenith) : 0;
}

export interface IneichenPerezRequest {
	/** 0..180 */
	zenithDeg: number;
	/** Above sea level, metres. */
	altitudeM: number;
	/** Linke turbidity at air mass 2: about 2 for very clean cold air, 3 clean, 5 to 6 hazy. */
	linkeTurbidity: number;
	/** W/m² */
	extraterrestrialNormal?: number;
}

/**
 * Clear sky of Ineichen and Perez 2002. With h in metres, cg1 = 5.09e-5 h + 0.868, cg2 = 3.92e-5 h + 0.0387,
 * fh1 = e^(-h/8000), fh2 = e^(-h/1250) and the relative air mass of Kasten and Young 1989:
 *   GHI = cg1 I0 cos z exp(-cg2 AM (fh1 + fh2 (TL - 1))),  DNI = (0.664 + 0.163 / fh1) I0 exp(-0.09 AM (TL - 1)).
 * The factor exp(0.01 AM^1.8) that some programs add, and the air mass corrected for pressure that some put in, are left
 * out. Beam never exceeds the global: diffuse is the rest and never below 0.
 */
export function ineichenPerez(request: IneichenPerezRequest): ClearSky {
	const { zenithDeg, altitudeM, linkeTurbidity } = request;
	if (!(zenithDeg < 90)) return DARK;
	const extraterrestrial = request.extraterrestrialNormal ?? SOLAR_CONSTANT;
	const cosZenith = Math.cos(zenithDeg * RADIANS_PER_DEGREE);
	const mass = airMass(zenithDeg);
	const fh1 = Math.exp(-altitudeM / 8000);
	const fh2 = Math.exp(-altitudeM / 1250);
	const cg1 = 5.09e-5 * altitudeM + 0.868;
	const cg2 = 3.92e-5 * altitudeM + 0.0387;
	const globalHorizontal =
		cg1 * extraterrestrial * cosZenith * Math.exp(-cg2 * mass * (fh1 + fh2 * (linkeTurbidity - 1)));
	const beam = (0.664 + 0.163 / fh1) * extraterrestrial * Math.exp(-0.09 * mass * (linkeTurbidity - 1));
	const directNormal = Math.min(beam, globalHorizontal / cosZenith);
	const diffuseHorizontal = Math.max(0, globalHorizontal - directNormal * cosZenith);
	return { globalHorizontal, directNormal, diffuseHorizontal };
}

/** Linke turbidity of a month 0..11 from the twelve values that the user gave, January first. */
export function linkeTurbidityOf(monthly: readonly number[], month: number): number {
	if (monthly.length !== 12)
		throw new RangeError(`Linke turbidity: 12 monthly values, not ${monthly.length}`);
	const value = monthly[month];
	if (!(value >= 1 && value <= 15)) {
		throw new RangeError(`Linke turbidity of month ${month + 1}: ${value}, must lie from 1 to 15`);
	}
	return value;
}

/**
 * Apparent beam A (W/m²), extinction B and diffuse factor C of each month, January first: ASHRAE Handbook of
 * Fundamentals 2005, chapter 31 (fitted to the United States, the 21st of each month). C is given from memory.
 */
export const ASHRAE_2005 = {
	a: [1202, 1187, 1164, 1130, 1106, 1092, 1093, 1107, 1136, 1166, 1190, 1204],
	b: [0.141, 0.142, 0.149, 0.164, 0.177, 0.185, 0.186, 0.182, 0.165, 0.152, 0.144, 0.141],
	c: [0.103, 0.104, 0.109, 0.12, 0.13, 0.137, 0.138, 0.134, 0.121, 0.111, 0.106, 0.103]
} as const;

/** Clear sky of ASHRAE 2005, month 0..11: DNI = A exp(-B / sin e), DHI = C DNI. */
export function ashraeClearSky(elevationDeg: number, month: number): ClearSky {
	if (!(elevationDeg > 0)) return DARK;
	const sine = Math.sin(elevationDeg * RADIANS_PER_DEGREE);
	const directNormal = ASHRAE_2005.a[month] * Math.exp(-ASHRAE_2005.b[month] / sine);
	const diffuseHorizontal = ASHRAE_2005.c[month] * directNormal;
	return { globalHorizontal: directNormal * sine + diffuseHorizontal, directNormal, diffuseHorizontal };
}

/** Corrections r0, r1, rk by climate: Hottel 1976 (Duffie and Beckman table 2.8.1; from memory). */
export const HOTTEL_CLIMATES = {
	tropical: [0.95, 0.98, 1.02],
	'midlatitude-summer': [0.97, 0.99, 1.02],
	'subarctic-summer': [0.99, 0.99, 1.01],
	'midlatitude-winter': [1.03, 1.01, 1.0]
} as const;
export type HottelClimate = keyof typeof HOTTEL_CLIMATES;

/**
 * Transmittance of a clear 23 km visibility atmosphere for beam, 0..1: Hottel 1976, a0 + a1 exp(-k / cos z) with
 * a0* = 0.4237 - 0.00821 (6 - A)², a1* = 0.5055 + 0.00595 (6.5 - A)², k* = 0.2711 + 0.01858 (2.5 - A)² for an altitude
 * A in kilometres, held inside 0..2.5. 0 at and below the horizon.
 */
export function hottelTransmittance(zenithDeg: number, altitudeM: number, climate: HottelClimate): number {
	const { a0, a1, k } = hottelConstants(altitudeM, climate);
	const cosZenith = zenithDeg < 90 ? Math.cos(zenithDeg * RADIANS_PER_DEGREE) : 0;
	return cosZenith > 0 ? a0 + a1 * Math.exp(-k / cosZenith) : 0;
}

/** The three constants of Hottel 1976 after the correction for climate. */
export function hottelConstants(
	altitudeM: number,
	climate: HottelClimate
): { a0: number; a1: number; k: number } {
	const a = Math.min(2.5, Math.max(0, altitudeM / 1000));
	const [r0, r1, rk] = HOTTEL_CLIMATES[climate];
	return {
		a0: r0 * (0.4237 - 0.00821 * (6 - a) ** 2),
		a1: r1 * (0.5055 + 0.00595 * (6.5 - a) ** 2),
		k: rk * (0.2711 + 0.01858 * (2.5 - a) ** 2)
	};
}

/** Clear-sky diffuse transmittance that goes with a beam transmittance: Liu and Jordan 1960, 0.271 - 0.294 tau_b. */
export function liuJordanClearDiffuse(beamTransmittance: number): number {
	return Math.max(0, 0.271 - 0.294 * beamTransmittance);
}
