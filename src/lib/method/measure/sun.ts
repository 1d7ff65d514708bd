/** The sun against almanacs, worked examples and astronomy-engine. */
import {
	arcDeg,
	RADIANS_PER_DEGREE,
	refractionDeg,
	solarHour,
	sunDay,
	sunPosition,
	sunVector,
	tableAxes,
	type SunDirection
} from '../../core';
import { deltaTSeconds, sunPlace } from '../../core/sun/ephemeris';
import { distances, single, within, type Check, type Row } from '../check';
import { referenceValues } from './fixtures';

interface SunValues {
	positions: {
		id: string;
		latitudeDeg: number;
		longitudeDeg: number;
		time: string;
		why: string;
		expected: { azimuthDeg: number; elevationDeg: number; apparentElevationDeg: number };
	}[];
	riseTransitSet: {
		lat: number;
		lon: number;
		day: string;
		rise: string | null;
		transit: string;
		set: string | null;
	}[];
}
const values = referenceValues<SunValues>('sun.json');

const positionRows = (airless: boolean): Row[] =>
	values.positions.map((row) => {
		const sun = sunPosition(Date.parse(row.time), row.latitudeDeg, row.longitudeDeg);
		const { azimuthDeg } = row.expected;
		const off = airless
			? arcDeg(sun, row.expected)
			: arcDeg(
					{ azimuthDeg: sun.azimuthDeg, elevationDeg: sun.apparentElevationDeg },
					{ azimuthDeg, elevationDeg: row.expected.apparentElevationDeg }
				);
		return [row.why, off, 0];
	});

/** Seconds between our moment and the almanac's; infinite when only one of the two knows such a moment. */
const secondsApart = (ours: number | null, theirs: string | null): number => {
	if (ours === null || theirs === null) return ours === theirs ? 0 : Infinity;
	return (ours - Date.parse(theirs)) / 1000;
};

function* riseSetRows(): Generator<Row> {
	for (const { lat, lon, day, rise, transit, set } of values.riseTransitSet) {
		const offset = Math.round(lon / 15) * 60;
		const found = sunDay(day, { latitudeDeg: lat, longitudeDeg: lon }, offset);
		const at = `${lat} ${lon}, ${day}`;
		yield [`rise at ${at}`, secondsApart(found.riseMs, rise), 0];
		yield [`noon at ${at}`, secondsApart(found.transitMs, transit), 0];
		yield [`set at ${at}`, secondsApart(found.setMs, set), 0];
		yield [`kind of day at ${at}`, Number(found.kind !== 'normal'), Number(rise === null)];
	}
}

// Reda and Andreas 2003, appendix A.5: 2003-10-17 12:30:30 UTC-7, 39.742476 N 105.1786 W, 820 mbar, 11 C.
const REDA_MS = Date.parse('2003-10-17T19:30:30Z');
const REDA_PLACE = { latitudeDeg: 39.742476, longitudeDeg: -105.1786 };

/** Their sun with their air: refraction in proportion to pressure and to 283 / (273 + T), eq. 42. */
function redaSun(): SunDirection & { rightAscension: number } {
	const sun = sunPosition(REDA_MS, REDA_PLACE.latitudeDeg, REDA_PLACE.longitudeDeg);
	const air = (820 / 1010) * (283 / (273 + 11));
	return {
		azimuthDeg: sun.azimuthDeg,
		elevationDeg: sun.elevationDeg + refractionDeg(sun.elevationDeg) * air,
		rightAscension: sunPlace(REDA_MS).rightAscension
	};
}

function redaAngles(): Row[] {
	const sun = redaSun();
	const place = sunPlace(REDA_MS);
	const turn = 360 * RADIANS_PER_DEGREE;
	const hourAngle =
		(place.siderealTime + REDA_PLACE.longitudeDeg * RADIANS_PER_DEGREE - place.rightAscension) % turn;
	const { n } = tableAxes(170, 30);
	const s = sunVector(sun.azimuthDeg, sun.elevationDeg);
	const incidence = Math.acos(n[0] * s[0] + n[1] * s[1] + n[2] * s[2]) / RADIANS_PER_DEGREE;
	return [
		['zenith', 90 - sun.elevationDeg, 50.111622],
		['azimuth', sun.azimuthDeg, 194.340241],
		['hour angle', ((hourAngle + turn) % turn) / RADIANS_PER_DEGREE, 11.105902],
		['incidence on a plane tilted 30 that faces 170', incidence, 25.187]
	];
}

/** Their day is that of universal time, so the sunset at 0:20 UT that they print is the one of the evening before. */
function redaDay(): Row[] {
	const before = sunDay('2003-10-16', REDA_PLACE, -7 * 60);
	const day = sunDay('2003-10-17', REDA_PLACE, -7 * 60);
	return [
		['rise 06:12:43', secondsApart(day.riseMs, '2003-10-17T13:12:43Z'), 0],
		['set 17:20:19', secondsApart(before.setMs, '2003-10-17T00:20:19Z'), 0]
	];
}

/** 1992-10-13 0h of terrestrial time as universal time. */
const MEEUS_MS = Date.UTC(1992, 9, 13) - deltaTSeconds(Date.UTC(1992, 9, 13)) * 1000;

function meeusPlace(): Row[] {
	const place = sunPlace(MEEUS_MS);
	const ascension = (place.rightAscension / RADIANS_PER_DEGREE + 360) % 360;
	return [
		['right ascension 13h13m30.749s', ascension, 15 * (13 + 13 / 60 + 30.749 / 3600)],
		['declination -7 47 01.74', place.declination / RADIANS_PER_DEGREE, -(7 + 47 / 60 + 1.74 / 3600)]
	];
}

/** Moment near `guessMs` when the sun's apparent longitude is a multiple of 90 degrees. */
function quarterMs(guessMs: number, longitudeDeg: number): number {
	// Obliquity of 2025..2027 within 0.003 degrees, which moves a solstice by nothing and an equinox by nothing.
	const obliquity = 23.436 * RADIANS_PER_DEGREE;
	const past = (ms: number): number => {
		const { rightAscension, declination } = sunPlace(ms);
		const y = Math.sin(rightAscension) * Math.cos(obliquity) + Math.tan(declination) * Math.sin(obliquity);
		const turned = Math.atan2(y, Math.cos(rightAscension)) / RADIANS_PER_DEGREE - longitudeDeg;
		return ((turned + 540) % 360) - 180;
	};
	let low = guessMs - 3 * 86400000;
	let high = guessMs + 3 * 86400000;
	for (let k = 0; k < 40; k++) {
		const mid = (low + high) / 2;
		if (past(mid) < 0) low = mid;
		else high = mid;
	}
	return (low + high) / 2;
}

const QUARTERS = [
	'2025-03-20T09:01:27Z',
	'2025-06-21T02:42:18Z',
	'2025-09-22T18:19:35Z',
	'2025-12-21T15:03:04Z',
	'2026-03-20T14:45:36Z',
	'2026-06-21T08:25:00Z',
	'2026-09-23T00:05:39Z',
	'2026-12-21T20:50:22Z',
	'2027-03-20T20:24:43Z',
	'2027-06-21T14:10:34Z',
	'2027-09-23T06:01:18Z',
	'2027-12-22T02:42:19Z'
];

// 2025 at 12:00 UTC: equation of time in minutes, declination in degrees, 1361/R² in W/m²; astronomy-engine.
const YEAR_2025: readonly (readonly [string, number, number, number])[] = [
	['01-03', -4.608, -22.7676, 1407.5],
	['02-11', -14.188, -13.8465, 1397.0],
	['03-20', -7.36, 0.0491, 1372.2],
	['04-15', 0.052, 9.9571, 1352.1],
	['05-14', 3.672, 18.7574, 1332.5],
	['06-13', -0.127, 23.2389, 1319.7],
	['06-21', -1.857, 23.4379, 1317.9],
	['07-26', -6.565, 19.31, 1319.5],
	['09-01', 0.055, 8.0775, 1336.5],
	['09-22', 7.363, 0.1027, 1351.0],
	['11-03', 16.435, -15.2269, 1383.2],
	['12-21', 1.816, -23.438, 1406.2],
	['12-25', -0.176, -23.3793, 1406.9]
];
const noonOf = (date: string): number => Date.parse(`2025-${date}T12:00:00Z`);

/** Elevations: apparent, and Bennett's refraction there in arcmin. */
const BENNETT: readonly (readonly [number, number])[] = [
	[0, 34.478],
	[0.5, 28.754],
	[1, 24.329],
	[2, 18.216],
	[5, 9.883],
	[10, 5.392],
	[20, 2.703],
	[45, 0.995]
];
const SAEMUNDSSON: readonly (readonly [number, number])[] = [
	[0, 28.982],
	[0.5, 25.004],
	[1, 21.744],
	[2, 16.926],
	[5, 9.674],
	[10, 5.408],
	[20, 2.741],
	[45, 1.013]
];

export const sunChecks: Check[] = [
	{
		id: 'sun-positions',
		effect: 'sun',
		title: 'Positions from 68 N to 35 S, without air',
		against: 'astropy, astronomy-engine and the reference code of NREL, which agree within 0.0005°',
		source: 'Reda and Andreas 2003 (NREL/TP-560-34302); astropy 5.2.1; astronomy-engine 2.1.19',
		provenance: 'library',
		unit: '°',
		tolerance: within(0.001),
		measure: () => distances(positionRows(true))
	},
	{
		id: 'sun-positions-apparent',
		effect: 'sun',
		title: 'The same through the air',
		against: 'the same positions with refraction at 1010 mbar and 10 °C',
		source: 'Reda and Andreas 2003, eq. 42; astronomy-engine 2.1.19',
		provenance: 'library',
		unit: '°',
		tolerance: within(0.002, 0.001),
		measure: () => distances(positionRows(false))
	},
	{
		id: 'sun-reda-andreas',
		effect: 'sun',
		title: 'Worked example: zenith, azimuth, hour angle, incidence',
		against: 'the printed example of 17 October 2003, 820 mbar, 11 °C',
		source: 'Reda and Andreas 2003 (NREL/TP-560-34302), appendix A.5',
		provenance: 'published',
		unit: '°',
		// The core's series leaves up to 2 arcsec, and its clock takes UT1 as UTC.
		tolerance: within(0.001),
		measure: () => distances(redaAngles())
	},
	{
		id: 'sun-reda-andreas-distance',
		effect: 'sun',
		title: 'Worked example: distance',
		against: 'the printed 0.996542 au',
		source: 'Reda and Andreas 2003 (NREL/TP-560-34302), appendix A.5',
		provenance: 'published',
		unit: 'au',
		tolerance: single(0.00002),
		measure: () => distances([['2003-10-17', sunPlace(REDA_MS).distanceAu, 0.996542]])
	},
	{
		id: 'sun-meeus-place',
		effect: 'sun',
		title: 'Worked example: right ascension and declination',
		against: 'the high-accuracy example of 13 October 1992',
		source: 'Meeus, Astronomical Algorithms, 2nd ed., example 25.b',
		provenance: 'published',
		unit: '°',
		tolerance: within(0.0006),
		measure: () => distances(meeusPlace())
	},
	{
		id: 'sun-meeus-distance',
		effect: 'sun',
		title: 'Worked example: distance',
		against: 'the printed 0.99760853 au',
		source: 'Meeus, Astronomical Algorithms, 2nd ed., example 25.b',
		provenance: 'published',
		unit: 'au',
		tolerance: single(0.00002),
		measure: () => distances([['1992-10-13', sunPlace(MEEUS_MS).distanceAu, 0.99760853]])
	},
	{
		id: 'sun-meeus-equation-of-time',
		effect: 'sun',
		title: 'Worked example: equation of time',
		against: 'the printed 13 min 42.6 s of 13 October 1992',
		source: 'Meeus, Astronomical Algorithms, 2nd ed., example 28.a',
		provenance: 'published',
		unit: 'min',
		tolerance: single(0.01),
		measure: () => {
			// The mean sun of 0h UT stands at hour angle 180: what solar time gains over it.
			const hours = ((((solarHour(MEEUS_MS, 0) - MEEUS_MS / 3600000 + 36) % 24) + 24) % 24) - 12;
			return distances([['1992-10-13', hours * 60, 13 + 42.6 / 60]]);
		}
	},
	{
		id: 'sun-quarters',
		effect: 'sun',
		title: 'Equinoxes and solstices of 2025 to 2027',
		against: 'astronomy-engine; those of 2026 agree with a public almanac',
		source: 'astronomy-engine 2.1.19',
		provenance: 'library',
		unit: 's',
		tolerance: within(60),
		measure: () =>
			distances(
				QUARTERS.map((moment, k): Row => {
					const theirs = Date.parse(moment);
					return [moment, (quarterMs(theirs, (k % 4) * 90) - theirs) / 1000, 0];
				})
			)
	},
	{
		id: 'sun-year-equation-of-time',
		effect: 'sun',
		title: 'Equation of time through 2025',
		against: 'astronomy-engine on 13 days, its extremes among them',
		source: 'astronomy-engine 2.1.19',
		provenance: 'library',
		unit: 'min',
		tolerance: within(0.01),
		measure: () =>
			distances(YEAR_2025.map(([date, eot]): Row => [date, (solarHour(noonOf(date), 0) - 12) * 60, eot]))
	},
	{
		id: 'sun-year-declination',
		effect: 'sun',
		title: 'Declination through 2025',
		against: 'astronomy-engine on the same days',
		source: 'astronomy-engine 2.1.19',
		provenance: 'library',
		unit: '°',
		tolerance: within(0.001),
		measure: () =>
			distances(
				YEAR_2025.map(([date, , declination]): Row => [
					date,
					sunPlace(noonOf(date)).declination / RADIANS_PER_DEGREE,
					declination
				])
			)
	},
	{
		id: 'sun-year-normal',
		effect: 'outside-air',
		title: 'Sunlight above the air through 2025, from the true distance',
		against: '1361 W/m² over the squared distance of astronomy-engine',
		source: 'astronomy-engine 2.1.19; 1361 W/m² Kopp and Lean 2011 (from memory)',
		provenance: 'library',
		unit: 'W/m²',
		tolerance: within(0.2),
		measure: () =>
			distances(
				YEAR_2025.map(([date, , , normal]): Row => [
					date,
					1361 / sunPlace(noonOf(date)).distanceAu ** 2,
					normal
				])
			)
	},
	{
		id: 'sun-rise-set',
		effect: 'sun-day',
		title: 'Rise, noon and set, polar day and night among them',
		against: 'astronomy-engine: upper limb, 34 arcmin of refraction',
		source: 'astronomy-engine 2.1.19',
		provenance: 'library',
		unit: 's',
		tolerance: within(30, 5),
		measure: () => distances(riseSetRows())
	},
	{
		id: 'sun-reda-andreas-day',
		effect: 'sun-day',
		title: 'Worked example: sunrise and sunset',
		against: 'the printed moments of 17 October 2003, to the second',
		source: 'Reda and Andreas 2003 (NREL/TP-560-34302), appendix A.5',
		provenance: 'published',
		unit: 's',
		tolerance: within(2),
		measure: () => distances(redaDay())
	},
	{
		id: 'sun-solar-time',
		effect: 'sun-day',
		title: 'Worked example: solar time at Madison',
		against: '10:19 solar at 10:30 Central time on 3 February, 89.4 W',
		source: 'Duffie and Beckman, Solar Engineering of Thermal Processes, example 1.5.1',
		provenance: 'published',
		unit: 'min',
		// The book rounds the equation of time to 13.5 minutes and the answer to a minute.
		tolerance: single(0.75),
		measure: () => distances([['Madison', solarHour(Date.UTC(2025, 1, 3, 16, 30), -89.4) * 60, 10 * 60 + 19]])
	},
	{
		id: 'refraction-saemundsson',
		effect: 'refraction',
		title: 'Refraction at true elevations 0° to 45°',
		against: 'values of the printed formula',
		source: 'Saemundsson 1986; Meeus, Astronomical Algorithms, eq. 16.4',
		provenance: 'formula',
		unit: 'arcmin',
		tolerance: within(0.001),
		measure: () => distances(SAEMUNDSSON.map(([h, arcmin]): Row => [`${h}°`, refractionDeg(h) * 60, arcmin]))
	},
	{
		id: 'refraction-bennett',
		effect: 'refraction',
		title: 'The same, coming back from apparent elevations',
		against: 'the inverse formula of another author',
		source: 'Bennett 1982; Meeus, Astronomical Algorithms, eq. 16.3 and example 16.a (from memory)',
		provenance: 'memory',
		unit: 'arcmin',
		tolerance: within(0.1),
		measure: () =>
			distances(BENNETT.map(([h, arcmin]): Row => [`${h}°`, refractionDeg(h - arcmin / 60) * 60, arcmin]))
	}
];
