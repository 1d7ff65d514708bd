import { normaliseDeg, RADIANS_PER_DEGREE } from '../conventions';
import {
	collaresPereiraRablHourShare,
	erbsMonthlyDiffuseShare,
	liuJordanHourShare,
	renormalise
} from './decomposition';
import { extraterrestrialDayWh, seriesDeclinationDeg, sunsetHourAngleDeg } from './extraterrestrial';

/** One interval of the average day of a month; irradiances are means over the interval, W/m². */
export interface AverageStep {
	/** Apparent solar time of its middle, hours 0..24, 12 when the sun crosses the meridian. */
	solarHour: number;
	/** Of the sun at the middle. */
	azimuthDeg: number;
	elevationDeg: number;
	globalHorizontal: number;
	diffuseHorizontal: number;
	directNormal: number;
}

export interface AverageMonth {
	/** 0..11 */
	month: number;
	/** Day of the year that stands for the month. */
	dayOfYear: number;
	days: number;
	/** The month's global horizontal sum over its extraterrestrial one. */
	clearness: number;
	/** Of the month's sum, before any hour is cut. */
	diffuseShare: number;
	/** Intervals that cover the whole day. */
	steps: AverageStep[];
	/** Part of the given sum that no interval holds, because the sun stays down on the day that stands for the month. */
	unplacedKwhM2: number;
}

export type AverageYear =
	| { ok: true; months: AverageMonth[] }
	| {
			ok: false;
			/** 0..11, or null when the list itself is wrong. */
			month: number | null;
			message: string;
			remedy: string;
	  };

/** Days of the year that stand for their months: Klein 1977 (Duffie and Beckman table 1.6.1; from memory). */
export const MEAN_DAYS = [17, 47, 75, 105, 135, 162, 198, 228, 258, 288, 318, 344] as const;
/** Days of each month; February without its leap day. */
export const MONTH_DAYS = [31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31] as const;

/** Names of the months for sentences, January first. */
export const MONTH_NAMES = [
	'January',
	'February',
	'March',
	'April',
	'May',
	'June',
	'July',
	'August',
	'September',
	'October',
	'November',
	'December'
] as const;

/**
 * Average year from the twelve monthly sums of global horizontal irradiation, kWh/m², January first: the diffuse part of
 * each month by Erbs, Klein and Duffie 1982, global by Collares-Pereira and Rabl 1979 and diffuse by Liu and Jordan
 * 1960 over the intervals of the mean day, both renormalised so that the month's sums come back exactly. Where an hour's
 * diffuse would exceed its global (dull months near sunset), the excess moves to the other hours. Beam is the rest.
 */
export function averageYear(
	latitudeDeg: number,
	monthlyHorizontalKwhM2: readonly number[],
	stepMinutes = 60
): AverageYear {
	if (!Number.isInteger(1440 / stepMinutes)) {
		throw new RangeError(`Average year: a step of ${stepMinutes} minutes does not divide the day`);
	}
	if (monthlyHorizontalKwhM2.length !== 12) {
		return {
			ok: false,
			month: null,
			message: `There are ${monthlyHorizontalKwhM2.length} monthly sums, not 12.`,
			remedy: 'Give one sum of global horizontal irradiation for each month, January first.'
		};
	}
	const months: AverageMonth[] = [];
	for (let month = 0; month < 12; month++) {
		const given = monthlyHorizontalKwhM2[month];
		const outsideKwh = monthOutsideKwh(latitudeDeg, month);
		if (!(given >= 0) || given > outsideKwh * 0.9) {
			return {
				ok: false,
				month,
				message: `The sum of ${MONTH_NAMES[month]} is ${given} kWh/m²; it must lie from 0 to ${(outsideKwh * 0.9).toFixed(1)}, nine tenths of what arrives outside the air at this latitude.`,
				remedy:
					'Give the month’s sum on level ground in kWh/m² (a daily mean times the days of the month; MJ/m² divided by 3.6).'
			};
		}
		months.push(averageMonth(latitudeDeg, month, given, outsideKwh, stepMinutes));
	}
	return { ok: true, months };
}

/** Extraterrestrial irradiation of a level plane in a month, summed over its days, kWh/m². */
function monthOutsideKwh(latitudeDeg: number, month: number): number {
	const before = MONTH_DAYS.slice(0, month).reduce((sum, days) => sum + days, 0);
	let sum = 0;
	for (let day = 1; day <= MONTH_DAYS[month]; day++) sum += extraterrestrialDayWh(latitudeDeg, before + day);
	return sum / 1000;
}

function averageMonth(
	latitudeDeg: number,
	month: number,
	sumKwh: number,
	outsideKwh: number,
	stepMinutes: number
): AverageMonth {
	const day = MEAN_DAYS[month];
	const declinationDeg = seriesDeclinationDeg(day);
	const sunset = sunsetHourAngleDeg(latitudeDeg, declinationDeg);
	const count = 1440 / stepMinutes;
	const middles = Array.from({ length: count }, (_, i) => ((i + 0.5) * 360) / count - 180);
	const globalShares = renormalise(middles.map((w) => collaresPereiraRablHourShare(w, sunset)));
	const diffuseShares = renormalise(middles.map((w) => liuJordanHourShare(w, sunset)));
	const dark = globalShares.every((share) => share === 0);
	const clearness = outsideKwh > 0 ? sumKwh / outsideKwh : 0;
	const diffuseShare = erbsMonthlyDiffuseShare(clearness, sunset);
	// kWh of a month to the mean W of one interval of its mean day.
	const toWatts = (1000 / MONTH_DAYS[month]) * (60 / stepMinutes);
	const globals = globalShares.map((share) => share * sumKwh * toWatts);
	const diffuses = cutToGlobal(
		diffuseShares.map((share) => share * sumKwh * diffuseShare * toWatts),
		globals
	);
	const steps = middles.map((w, i): AverageStep => {
		const { azimuthDeg, elevationDeg } = sunOfHourAngle(latitudeDeg, declinationDeg, w);
		const sine = Math.sin(elevationDeg * RADIANS_PER_DEGREE);
		const beam = Math.max(0, globals[i] - diffuses[i]);
		return {
			solarHour: 12 + w / 15,
			azimuthDeg,
			elevationDeg,
			globalHorizontal: globals[i],
			diffuseHorizontal: diffuses[i],
			directNormal: beam > 0 && sine > 0 ? beam / sine : 0
		};
	});
	return {
		month,
		dayOfYear: day,
		days: MONTH_DAYS[month],
		clearness,
		diffuseShare,
		steps,
		unplacedKwhM2: dark ? sumKwh : 0
	};
}

/** Diffuse held to the global of each interval, its sum kept by raising the others; at most all becomes diffuse. */
function cutToGlobal(diffuses: readonly number[], globals: readonly number[]): number[] {
	const wanted = diffuses.reduce((sum, value) => sum + value, 0);
	let factor = 1;
	// Each round cuts at least one interval more, or ends.
	for (let round = 0; round <= diffuses.length; round++) {
		let free = 0;
		let held = 0;
		diffuses.forEach((value, i) => {
			if (value * factor >= globals[i]) held += globals[i];
			else free += value;
		});
		const next = free > 0 ? (wanted - held) / free : factor;
		if (!(next > factor * (1 + 1e-12))) break;
		factor = next;
	}
	return diffuses.map((value, i) => Math.min(globals[i], value * factor));
}

/** Direction of the sun at an hour angle (afternoon positive); azimuth clockwise from true north. All degrees. */
export function sunOfHourAngle(
	latitudeDeg: number,
	declinationDeg: number,
	hourAngleDeg: number
): { azimuthDeg: number; elevationDeg: number } {
	const phi = latitudeDeg * RADIANS_PER_DEGREE;
	const delta = declinationDeg * RADIANS_PER_DEGREE;
	const w = hourAngleDeg * RADIANS_PER_DEGREE;
	const east = -Math.cos(delta) * Math.sin(w);
	const north = Math.sin(delta) * Math.cos(phi) - Math.cos(delta) * Math.sin(phi) * Math.cos(w);
	const up = Math.sin(delta) * Math.sin(phi) + Math.cos(delta) * Math.cos(phi) * Math.cos(w);
	return {
		azimuthDeg: normaliseDeg(Math.atan2(east, north) / RADIANS_PER_DEGREE),
		elevationDeg: Math.atan2(up, Math.hypot(east, north)) / RADIANS_PER_DEGREE
	};
}
