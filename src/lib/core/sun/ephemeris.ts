import { RADIANS_PER_DEGREE } from '../conventions';

/**
 * Apparent place of the sun's centre, seen from the centre of the earth.
 *
 * Series: VSOP87 (Bretagnon and Francou 1988) as shortened for the sun in Reda and Andreas 2003 (NREL/TP-560-34302,
 * table A4.2) and Meeus, Astronomical Algorithms 2nd ed., appendix III, here with every longitude term of at least
 * 1e-6 radian. Nutation: Meeus chapter 22, the short form (0.5 arcsec). The coefficients were written down from
 * memory and are held by tests against published worked examples. Neglected terms add up to less than 2 arcsec.
 */
export interface SunPlace {
	/** Right ascension referred to the true equinox of date, radians. */
	rightAscension: number;
	/** Declination, radians. */
	declination: number;
	/** Distance, astronomical units. */
	distanceAu: number;
	/** Apparent sidereal time at longitude 0, radians, not reduced to one turn. */
	siderealTime: number;
}

type Term = readonly [amplitude: number, phase: number, rate: number];

const L0: readonly Term[] = [
	[175347046, 0, 0],
	[3341656, 4.6692568, 6283.07585],
	[34894, 4.6261, 12566.1517],
	[3497, 2.7441, 5753.3849],
	[3418, 2.8289, 3.5231],
	[3136, 3.6277, 77713.7715],
	[2676, 4.4181, 7860.4194],
	[2343, 6.1352, 3930.2097],
	[1324, 0.7425, 11506.7698],
	[1273, 2.0371, 529.691],
	[1199, 1.1096, 1577.3435],
	[990, 5.233, 5884.927],
	[902, 2.045, 26.298],
	[857, 3.508, 398.149],
	[780, 1.179, 5223.694],
	[753, 2.533, 5507.553],
	[505, 4.583, 18849.228],
	[492, 4.205, 775.523],
	[357, 2.92, 0.067],
	[317, 5.849, 11790.629],
	[284, 1.899, 796.298],
	[271, 0.315, 10977.079],
	[243, 0.345, 5486.778],
	[206, 4.806, 2544.314],
	[205, 1.869, 5573.143],
	[202, 2.458, 6069.777],
	[156, 0.833, 213.299],
	[132, 3.411, 2942.463],
	[126, 1.083, 20.775],
	[115, 0.645, 0.98],
	[103, 0.636, 4694.003],
	[102, 0.976, 15720.839],
	[102, 4.267, 7.114]
];
const L1: readonly Term[] = [
	[628331966747, 0, 0],
	[206059, 2.678235, 6283.07585],
	[4303, 2.6351, 12566.1517],
	[425, 1.59, 3.523],
	[119, 5.796, 26.298],
	[109, 2.966, 1577.344]
];
const L2: readonly Term[] = [
	[52919, 0, 0],
	[8720, 1.0721, 6283.0758],
	[309, 0.867, 12566.152]
];
const B0: readonly Term[] = [
	[280, 3.199, 84334.662],
	[102, 5.422, 5507.553]
];
const R0: readonly Term[] = [
	[100013989, 0, 0],
	[1670700, 3.0984635, 6283.07585],
	[13956, 3.05525, 12566.1517],
	[3084, 5.1985, 77713.7715],
	[1628, 1.1739, 5753.3849],
	[1576, 2.8469, 7860.4194]
];
const R1: readonly Term[] = [
	[103019, 1.10749, 6283.07585],
	[1721, 1.0644, 12566.1517]
];

const sum = (terms: readonly Term[], millennia: number): number => {
	let total = 0;
	for (let k = 0; k < terms.length; k++) {
		const term = terms[k];
		total += term[0] * Math.cos(term[1] + term[2] * millennia);
	}
	return total;
};

/**
 * Terrestrial time minus universal time, seconds: polynomial of Espenak and Meeus for 2005..2050 (from memory), held
 * at its ends outside. Ten seconds of error here move the sun by 0.4 arcsec.
 */
export function deltaTSeconds(timeMs: number): number {
	const year = 2000 + (timeMs - Date.UTC(2000, 0, 1)) / (365.2425 * 86400000);
	const t = Math.min(50, Math.max(-20, year - 2000));
	return t < 5 ? 63.86 + 0.3345 * t : 62.92 + 0.32217 * t + 0.005589 * t * t;
}

/**
 * Geocentric apparent place at a UTC time in milliseconds (UT1 is taken equal to UTC: at most 0.9 s, 0.004 degrees).
 * Valid 1950..2100; good to about 2 arcsec.
 */
export function sunPlace(timeMs: number): SunPlace {
	const days = timeMs / 86400000 + 2440587.5 - 2451545;
	const centuriesUt = days / 36525;
	const millennia = (days + deltaTSeconds(timeMs) / 86400) / 365250;
	const centuries = millennia * 10;

	const heliocentric =
		(sum(L0, millennia) + sum(L1, millennia) * millennia + sum(L2, millennia) * millennia * millennia) / 1e8;
	const latitude = -sum(B0, millennia) / 1e8;
	const distanceAu = (sum(R0, millennia) + sum(R1, millennia) * millennia) / 1e8;

	// Meeus 22: arguments in degrees, nutation in arcseconds.
	const node = (125.04452 - 1934.136261 * centuries) * RADIANS_PER_DEGREE;
	const sunMean = (280.4665 + 36000.7698 * centuries) * RADIANS_PER_DEGREE;
	const moonMean = (218.3165 + 481267.8813 * centuries) * RADIANS_PER_DEGREE;
	const nutationLongitude =
		-17.2 * Math.sin(node) -
		1.32 * Math.sin(2 * sunMean) -
		0.23 * Math.sin(2 * moonMean) +
		0.21 * Math.sin(2 * node);
	const nutationObliquity =
		9.2 * Math.cos(node) +
		0.57 * Math.cos(2 * sunMean) +
		0.1 * Math.cos(2 * moonMean) -
		0.09 * Math.cos(2 * node);
	const arcsec = RADIANS_PER_DEGREE / 3600;
	// Meeus 22.2 (IAU 1980 obliquity), 25: aberration 20.4898 arcsec over the distance.
	const obliquity =
		(23.4392911 - 0.0130041667 * centuries - 1.6389e-7 * centuries * centuries) * RADIANS_PER_DEGREE +
		nutationObliquity * arcsec;
	const longitude = heliocentric + Math.PI + nutationLongitude * arcsec - (20.4898 * arcsec) / distanceAu;

	const sinLongitude = Math.sin(longitude);
	const cosObliquity = Math.cos(obliquity);
	const sinObliquity = Math.sin(obliquity);
	const rightAscension = Math.atan2(
		sinLongitude * cosObliquity - Math.tan(latitude) * sinObliquity,
		Math.cos(longitude)
	);
	const declination = Math.asin(
		Math.sin(latitude) * cosObliquity + Math.cos(latitude) * sinObliquity * sinLongitude
	);
	// Meeus 12.4, with the equation of the equinoxes.
	const siderealTime =
		(280.46061837 + 360.98564736629 * days + 0.000387933 * centuriesUt * centuriesUt) * RADIANS_PER_DEGREE +
		nutationLongitude * arcsec * cosObliquity;
	return { rightAscension, declination, distanceAu, siderealTime };
}
