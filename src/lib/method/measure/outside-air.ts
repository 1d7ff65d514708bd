/** Light above the air and the series that average days are made of. */
import {
	airMass,
	dayLengthHours,
	distanceFactor,
	extraterrestrialDayWh,
	extraterrestrialHorizontalWh,
	extraterrestrialNormal,
	incidenceCosine,
	RADIANS_PER_DEGREE,
	seriesDeclinationDeg,
	seriesEquationOfTimeMin,
	sunOfHourAngle
} from '../../core';
import { distances, single, within, type Check, type Row } from '../check';

const book = 'Duffie and Beckman, Solar Engineering of Thermal Processes';
/** Wh of one MJ. */
const WH_PER_MJ = 1e6 / 3600;

type Pairs = readonly (readonly [number, number])[];
const DISTANCE: Pairs = [
	[1, 1.03505],
	[80, 1.0079],
	[172, 0.96744],
	[186, 0.96659],
	[266, 0.99305],
	[355, 1.03412]
];
const NORMAL: readonly (readonly [number, number, number])[] = [
	[1, 1361, 1408.7],
	[186, 1361, 1315.5],
	[1, 1367, 1414.9],
	[186, 1367, 1321.3]
];
const TIME: Pairs = [
	[34, -13.494],
	[44, -14.266],
	[105, -0.256],
	[307, 16.35]
];
const DECLINATION: Pairs = [
	[44, -13.628],
	[80, -0.066],
	[234, 12.048],
	[266, 0.249],
	[307, -14.83]
];
const DAY_LENGTH: Pairs = [
	[0, 12.0],
	[20, 10.789],
	[30, 10.067],
	[40, 9.155],
	[45, 8.574],
	[50, 7.852],
	[60, 5.51]
];
const AIR_MASS: Pairs = [
	[0, 0.9997],
	[30, 1.154],
	[45, 1.4126],
	[60, 1.9943],
	[70, 2.9031],
	[75, 3.8129],
	[80, 5.586],
	[85, 10.3058],
	[87, 15.1477],
	[88, 19.4332],
	[89, 26.3106],
	[90, 37.9196]
];

const byDay = (pairs: Pairs, value: (day: number) => number) =>
	distances(pairs.map(([day, expected]): Row => [`day ${day}`, value(day), expected]));

const deg = (cosine: number): number => Math.acos(cosine) / RADIANS_PER_DEGREE;
const morning = sunOfHourAngle(43, -14, -22.5);
const forenoon = sunOfHourAngle(40, -13, -37.5);

/** Zenith and azimuth from south, west positive, as the book counts; and the profile angle on a surface 25 west of south. */
function bookAngles(): Row[] {
	const rows: Row[] = [];
	for (const [delta, omega, zenith, azimuth] of [
		[-14, -37.5, 66.55, -40.08],
		[23.1, 97.5, 79.64, 112.02],
		[-2.4, 60, 70.32, 66.77]
	]) {
		const sun = sunOfHourAngle(43, delta, omega);
		rows.push([`zenith, hour angle ${omega}`, 90 - sun.elevationDeg, zenith]);
		rows.push([`azimuth, hour angle ${omega}`, sun.azimuthDeg - 180, azimuth]);
	}
	const late = sunOfHourAngle(43, -2.4, 60);
	const away = (late.azimuthDeg - 205) * RADIANS_PER_DEGREE;
	const profile = Math.atan(Math.tan(late.elevationDeg * RADIANS_PER_DEGREE) / Math.cos(away));
	rows.push(['profile angle', profile / RADIANS_PER_DEGREE, 25.62]);
	return rows;
}

export const outsideAirChecks: Check[] = [
	{
		id: 'outside-distance',
		effect: 'outside-air',
		title: 'Distance factor by day of the year',
		against: 'values of the printed series',
		source: 'Spencer 1971',
		provenance: 'formula',
		unit: '',
		tolerance: within(1e-5),
		measure: () => byDay(DISTANCE, distanceFactor)
	},
	{
		id: 'outside-normal',
		effect: 'outside-air',
		title: 'Light square to the sun above the air, from the series',
		against: 'the series with 1361 and with 1367 W/m²',
		source: `Spencer 1971; 1361 Kopp and Lean 2011 (from memory), 1367 ${book}`,
		provenance: 'formula',
		unit: 'W/m²',
		tolerance: within(0.1),
		measure: () =>
			distances(
				NORMAL.map(([day, constant, expected]): Row => [
					`day ${day} with ${constant}`,
					extraterrestrialNormal(day, constant),
					expected
				])
			)
	},
	{
		id: 'outside-equation-of-time',
		effect: 'outside-air',
		title: 'Equation of time of the series',
		against: 'values of the corrected series',
		source: 'Spencer 1971, constant 0.0000075, last coefficient 0.040849',
		provenance: 'formula',
		unit: 'min',
		tolerance: within(0.005),
		measure: () => byDay(TIME, seriesEquationOfTimeMin)
	},
	{
		id: 'outside-declination',
		effect: 'outside-air',
		title: 'Declination of the series',
		against: 'values of the printed series; up to 0.54° from the true sun, so never used for shadows',
		source: 'Spencer 1971',
		provenance: 'formula',
		unit: '°',
		tolerance: within(0.001),
		measure: () => byDay(DECLINATION, seriesDeclinationDeg)
	},
	{
		id: 'outside-day-length',
		effect: 'outside-air',
		title: 'Geometric day length at the winter solstice, 0° to 60°',
		against: '2/15 acos(-tan φ tan δ)',
		source: 'Geometry, no refraction',
		provenance: 'formula',
		unit: 'h',
		tolerance: within(0.001),
		measure: () => byDay(DAY_LENGTH, (latitudeDeg) => dayLengthHours(latitudeDeg, -23.44))
	},
	{
		id: 'outside-day-sum',
		effect: 'outside-air',
		title: 'Worked example: a day above the air on level ground',
		against: '33.8 MJ/m² at 43°, day 105',
		source: `${book}, example 1.10.1 (from memory)`,
		provenance: 'memory',
		unit: 'MJ/m²',
		tolerance: single(0.1),
		measure: () => distances([['H₀', extraterrestrialDayWh(43, 105, 9.4, 1367) / WH_PER_MJ, 33.765]])
	},
	{
		id: 'outside-hour-sum',
		effect: 'outside-air',
		title: 'Worked example: the hour from 10 to 11',
		against: '3.79 MJ/m²',
		source: `${book}, example 1.10.2 (from memory)`,
		provenance: 'memory',
		unit: 'MJ/m²',
		tolerance: single(0.01),
		measure: () =>
			distances([['I₀', extraterrestrialHorizontalWh(43, 105, -30, -15, 9.4, 1367) / WH_PER_MJ, 3.79]])
	},
	{
		id: 'outside-incidence',
		effect: 'outside-air',
		title: 'Worked example: cosine of incidence, surface 45°, 15° west of south',
		against: '0.817',
		source: `${book}, example 1.6.1`,
		provenance: 'published',
		unit: '',
		tolerance: single(0.001),
		measure: () => distances([['cos θ', incidenceCosine(195, 45, morning), 0.817]])
	},
	{
		id: 'outside-incidence-angle',
		effect: 'outside-air',
		title: 'The same as an angle',
		against: '35°, as the book rounds it',
		source: `${book}, example 1.6.1`,
		provenance: 'published',
		unit: '°',
		tolerance: single(0.3),
		measure: () => distances([['θ', deg(incidenceCosine(195, 45, morning)), 35]])
	},
	{
		id: 'outside-book-angles',
		effect: 'outside-air',
		title: 'Worked examples: zenith, azimuth and profile angle',
		against: 'values of the formulas at 43°',
		source: `${book}, examples 1.6.2 and 1.6.3 (from memory)`,
		provenance: 'memory',
		unit: '°',
		tolerance: within(0.1),
		measure: () => distances(bookAngles())
	},
	{
		id: 'outside-beam-ratio',
		effect: 'outside-air',
		title: 'Worked examples: beam on a slope over beam on level ground',
		against: '1.66 and 1.61',
		source: `${book}, examples 1.8.1 and 1.8.2 (from memory)`,
		provenance: 'memory',
		unit: '',
		tolerance: within(0.01),
		measure: () =>
			distances([
				[
					'1.8.1',
					incidenceCosine(195, 45, morning) / Math.sin(morning.elevationDeg * RADIANS_PER_DEGREE),
					1.66
				],
				[
					'1.8.2',
					incidenceCosine(180, 30, forenoon) / Math.sin(forenoon.elevationDeg * RADIANS_PER_DEGREE),
					1.61
				]
			])
	},
	{
		id: 'air-mass',
		effect: 'clear-sky',
		title: 'Air mass at zenith angles 0° to 90°',
		against: 'values of the printed formula',
		source: 'Kasten and Young 1989',
		provenance: 'formula',
		unit: '',
		tolerance: within(0.0001),
		measure: () => distances(AIR_MASS.map(([z, expected]): Row => [`zenith ${z}°`, airMass(z), expected]))
	}
];
