import { RADIANS_PER_DEGREE } from '../conventions';
import { WGS84_A, WGS84_F } from './ellipsoid';

/**
 * Transverse Mercator on WGS84 with scale 1 on the central meridian, by Krueger's series in the third flattening n to
 * its sixth power (Krueger 1912 as extended by Karney 2011, "Transverse Mercator with an accuracy of a few nanometers",
 * J. Geodesy 85:475). Neglected: n^7, 5 nm within 3900 km of the central meridian. Equation numbers and coefficients
 * were written down from memory; tests hold both ways against proj4 to 1 mm.
 */

/** Third flattening and first eccentricity. */
const n = WGS84_F / (2 - WGS84_F);
const e2 = WGS84_F * (2 - WGS84_F);
const e = Math.sqrt(e2);

/** Radius of the rectifying sphere, Karney 2011 eq. 14; n^8 neglected. */
const A = (WGS84_A / (1 + n)) * (1 + n ** 2 / 4 + n ** 4 / 64 + n ** 6 / 256);

/** Karney 2011 eq. 35. */
const alpha = [
	n / 2 -
		(2 / 3) * n ** 2 +
		(5 / 16) * n ** 3 +
		(41 / 180) * n ** 4 -
		(127 / 288) * n ** 5 +
		(7891 / 37800) * n ** 6,
	(13 / 48) * n ** 2 -
		(3 / 5) * n ** 3 +
		(557 / 1440) * n ** 4 +
		(281 / 630) * n ** 5 -
		(1983433 / 1935360) * n ** 6,
	(61 / 240) * n ** 3 - (103 / 140) * n ** 4 + (15061 / 26880) * n ** 5 + (167603 / 181440) * n ** 6,
	(49561 / 161280) * n ** 4 - (179 / 168) * n ** 5 + (6601661 / 7257600) * n ** 6,
	(34729 / 80640) * n ** 5 - (3418889 / 1995840) * n ** 6,
	(212378941 / 319334400) * n ** 6
];

/** Karney 2011 eq. 36. */
const beta = [
	n / 2 -
		(2 / 3) * n ** 2 +
		(37 / 96) * n ** 3 -
		(1 / 360) * n ** 4 -
		(81 / 512) * n ** 5 +
		(96199 / 604800) * n ** 6,
	(1 / 48) * n ** 2 +
		(1 / 15) * n ** 3 -
		(437 / 1440) * n ** 4 +
		(46 / 105) * n ** 5 -
		(1118711 / 3870720) * n ** 6,
	(17 / 480) * n ** 3 - (37 / 840) * n ** 4 - (209 / 4480) * n ** 5 + (5569 / 90720) * n ** 6,
	(4397 / 161280) * n ** 4 - (11 / 504) * n ** 5 - (830251 / 7257600) * n ** 6,
	(4583 / 161280) * n ** 5 - (108847 / 3991680) * n ** 6,
	(20648693 / 638668800) * n ** 6
];

export interface TransversePoint {
	/** East of the central meridian and north of the equator, metres. */
	eastM: number;
	northM: number;
	/** Bearing of grid north, clockwise from true north, degrees: true bearing = grid bearing + convergence. */
	convergenceDeg: number;
	/** Grid length over length on the ellipsoid. */
	scale: number;
}

export interface GeographicPoint {
	/** North positive, WGS84. */
	latitudeDeg: number;
	/** East of the central meridian. */
	longitudeDeg: number;
}

/** Tangent of the conformal latitude from the tangent of the geographic one, Karney 2011 eqs. 7 and 8. */
function conformal(tau: number): number {
	const secant = Math.hypot(1, tau);
	const sigma = Math.sinh(e * Math.atanh((e * tau) / secant));
	return Math.hypot(1, sigma) * tau - sigma * secant;
}

/** The way back by Newton's method, Karney 2011 eqs. 19 to 21; three rounds leave nothing. */
function geographic(tauPrime: number): number {
	let tau = tauPrime / (1 - e2);
	for (let k = 0; k < 5; k++) {
		const at = conformal(tau);
		const step =
			((tauPrime - at) / Math.hypot(1, at)) * ((1 + (1 - e2) * tau * tau) / ((1 - e2) * Math.hypot(1, tau)));
		tau += step;
		if (Math.abs(step) <= 1e-15 * Math.max(1, Math.abs(tau))) break;
	}
	return tau;
}

/** Convergence and scale from the conformal sphere's and the series' own, Karney 2011 eqs. 22 to 28. */
function turnAndScale(tau: number, tauPrime: number, lambda: number, p: number, q: number) {
	const level = Math.hypot(tauPrime, Math.cos(lambda));
	const sphere = Math.atan2(tauPrime * Math.sin(lambda), Math.hypot(1, tauPrime) * Math.cos(lambda));
	// sqrt(1 - e² sin² phi) sqrt(1 + tau²), written so that it holds at the pole.
	const stretch = Math.sqrt(1 + (1 - e2) * tau * tau) / level;
	return {
		convergenceDeg: (sphere + Math.atan2(q, p)) / RADIANS_PER_DEGREE,
		scale: stretch * (A / WGS84_A) * Math.hypot(p, q)
	};
}

/** p' and q' of the series at (xi', eta'), Karney 2011 eq. 12. */
function derivative(xi: number, eta: number): [p: number, q: number] {
	let p = 1;
	let q = 0;
	for (let j = 1; j <= 6; j++) {
		p += 2 * j * alpha[j - 1] * Math.cos(2 * j * xi) * Math.cosh(2 * j * eta);
		q += 2 * j * alpha[j - 1] * Math.sin(2 * j * xi) * Math.sinh(2 * j * eta);
	}
	return [p, q];
}

/**
 * From degrees to metres. Latitude -90..90, longitude from the central meridian -80..80, degrees. Good to some nm up to
 * 35 degrees from the meridian, better than 1 mm up to 60.
 */
export function transverseForward(latitudeDeg: number, longitudeDeg: number): TransversePoint {
	const lambda = longitudeDeg * RADIANS_PER_DEGREE;
	const tau = Math.tan(latitudeDeg * RADIANS_PER_DEGREE);
	const tauPrime = conformal(tau);
	const xiPrime = Math.atan2(tauPrime, Math.cos(lambda)); // eq. 10
	const etaPrime = Math.asinh(Math.sin(lambda) / Math.hypot(tauPrime, Math.cos(lambda))); // eq. 10
	let xi = xiPrime;
	let eta = etaPrime;
	for (let j = 1; j <= 6; j++) {
		xi += alpha[j - 1] * Math.sin(2 * j * xiPrime) * Math.cosh(2 * j * etaPrime); // eq. 11
		eta += alpha[j - 1] * Math.cos(2 * j * xiPrime) * Math.sinh(2 * j * etaPrime); // eq. 11
	}
	const [p, q] = derivative(xiPrime, etaPrime);
	return { eastM: A * eta, northM: A * xi, ...turnAndScale(tau, tauPrime, lambda, p, q) };
}

/** From metres to degrees, with convergence and scale there; the same validity. */
export function transverseInverse(
	eastM: number,
	northM: number
): GeographicPoint & Pick<TransversePoint, 'convergenceDeg' | 'scale'> {
	const xi = northM / A;
	const eta = eastM / A;
	let xiPrime = xi;
	let etaPrime = eta;
	for (let j = 1; j <= 6; j++) {
		xiPrime -= beta[j - 1] * Math.sin(2 * j * xi) * Math.cosh(2 * j * eta); // eq. 15
		etaPrime -= beta[j - 1] * Math.cos(2 * j * xi) * Math.sinh(2 * j * eta); // eq. 15
	}
	const tauPrime = Math.sin(xiPrime) / Math.hypot(Math.sinh(etaPrime), Math.cos(xiPrime)); // eq. 18
	const lambda = Math.atan2(Math.sinh(etaPrime), Math.cos(xiPrime)); // eq. 18
	const tau = geographic(tauPrime);
	const [p, q] = derivative(xiPrime, etaPrime);
	return {
		latitudeDeg: Math.atan(tau) / RADIANS_PER_DEGREE,
		longitudeDeg: lambda / RADIANS_PER_DEGREE,
		...turnAndScale(tau, tauPrime, lambda, p, q)
	};
}
