import {
	ashraeClearSky,
	clearBeam,
	extraterrestrialNormal,
	HAURWITZ_CIRCULATING,
	HAURWITZ_REPORTED,
	haurwitz,
	hottelConstants,
	hottelTransmittance,
	ineichenPerez,
	liuJordanClearDiffuse,
	RADIANS_PER_DEGREE
} from '../../core';
import { distances, within, type Check, type Row } from '../check';

const ZENITHS = [0, 30, 45, 60, 75, 80, 85];
const book = 'Duffie and Beckman, Solar Engineering of Thermal Processes';

const over = (zeniths: readonly number[], expected: readonly number[], value: (z: number) => number): Row[] =>
	zeniths.map((z, k) => [`zenith ${z}°`, value(z), expected[k]]);

const INEICHEN: readonly (readonly [number, number, number])[] = [
	[0, 1051.9, 940.2],
	[30, 894.8, 914.4],
	[60, 468.6, 786.1],
	[75, 196.4, 566.6],
	[80, 107.2, 411.8]
];

function ineichenRows(): Row[] {
	return INEICHEN.flatMap(([zenithDeg, global, direct]): Row[] => {
		const sky = ineichenPerez({ zenithDeg, altitudeM: 0, linkeTurbidity: 3, extraterrestrialNormal: 1361 });
		return [
			[`global, zenith ${zenithDeg}°`, sky.globalHorizontal, global],
			[`direct, zenith ${zenithDeg}°`, sky.directNormal, direct]
		];
	});
}

function hottelRows(): Row[] {
	const { a0, a1, k } = hottelConstants(0, 'midlatitude-summer');
	const tau = (z: number) => hottelTransmittance(z, 0, 'midlatitude-summer');
	return [
		['a0', a0, 0.1243],
		['a1', a1, 0.7493],
		['k', k, 0.395],
		...over([0, 30, 60, 80], [0.6291, 0.5992, 0.4644, 0.2014], tau)
	];
}

/** 22 August at Madison, 0.27 km, cos z 0.846. */
const madisonTau = (): number =>
	hottelTransmittance(Math.acos(0.846) / RADIANS_PER_DEGREE, 270, 'midlatitude-summer');
const madisonOutside = extraterrestrialNormal(234, 1367);

export const clearSkyChecks: Check[] = [
	{
		id: 'clear-meinel',
		effect: 'clear-sky',
		title: 'Beam of the pages at sea level, zenith 0° to 85°',
		against: '1353 x 0.7^(AM^0.678)',
		source: 'Meinel and Meinel 1976',
		provenance: 'formula',
		unit: 'W/m²',
		tolerance: within(0.1),
		measure: () =>
			distances(
				over(ZENITHS, [947.2, 913.3, 862.0, 765.5, 559.1, 430.6, 238.8], (z) => clearBeam(90 - z, 0, 1353))
			)
	},
	{
		id: 'clear-laue',
		effect: 'clear-sky',
		title: 'The same at 1 km above the sea',
		against: 'the altitude form of the beam',
		source: 'Laue 1970',
		provenance: 'formula',
		unit: 'W/m²',
		tolerance: within(0.1),
		measure: () => distances(over([0, 60, 80], [1004.0, 847.8, 559.7], (z) => clearBeam(90 - z, 1000, 1353)))
	},
	{
		id: 'clear-ineichen-perez',
		effect: 'clear-sky',
		title: 'Global and beam with Linke turbidity 3 at sea level',
		against: 'the printed formulas, without the factor exp(0.01 AM^1.8) of some copies',
		source: 'Ineichen and Perez 2002',
		provenance: 'formula',
		unit: 'W/m²',
		tolerance: within(0.2),
		measure: () => distances(ineichenRows())
	},
	{
		id: 'clear-haurwitz',
		effect: 'clear-sky',
		title: 'Global of a clear sky, both constants that circulate',
		against: '1098 cos z exp(-k / cos z) with k 0.057 and 0.059',
		source: 'Haurwitz 1945, as given in SAND2012-2389 (from memory)',
		provenance: 'memory',
		unit: 'W/m²',
		tolerance: within(0.1),
		measure: () =>
			distances([
				...over(ZENITHS, [1037.2, 890.3, 716.3, 489.8, 228.0, 137.3, 49.8], (z) =>
					haurwitz(z, HAURWITZ_REPORTED)
				),
				...over(ZENITHS, [1035.1, 888.3, 714.3, 487.9, 226.3, 135.7, 48.6], (z) =>
					haurwitz(z, HAURWITZ_CIRCULATING)
				)
			])
	},
	{
		id: 'clear-ashrae',
		effect: 'clear-sky',
		title: 'Beam of January and July',
		against: 'A exp(-B / sin e) with the printed table',
		source: 'ASHRAE Handbook of Fundamentals 2005, chapter 31',
		provenance: 'formula',
		unit: 'W/m²',
		tolerance: within(0.1),
		measure: () =>
			distances([
				...over([0, 60, 80], [907.5, 753.5, 374.5], (z) => ashraeClearSky(90 - z, 6).directNormal),
				...over([0, 60, 80], [1043.9, 906.6, 533.7], (z) => ashraeClearSky(90 - z, 0).directNormal)
			])
	},
	{
		id: 'clear-ashrae-diffuse',
		effect: 'clear-sky',
		title: 'Diffuse over beam of January and July',
		against: 'factor C of the table',
		source: 'ASHRAE Handbook of Fundamentals 2005, chapter 31 (C from memory)',
		provenance: 'memory',
		unit: '',
		tolerance: within(1e-9),
		measure: () =>
			distances(
				[
					[0, 0.103],
					[6, 0.138]
				].map(([month, c]): Row => {
					const sky = ashraeClearSky(40, month);
					return [`month ${month + 1}`, sky.diffuseHorizontal / sky.directNormal, c];
				})
			)
	},
	{
		id: 'clear-hottel',
		effect: 'clear-sky',
		title: 'Transmittance at 23 km visibility, sea level, mid-latitude summer',
		against: 'a₀ + a₁ exp(-k / cos z)',
		source: 'Hottel 1976 (from memory)',
		provenance: 'memory',
		unit: '',
		tolerance: within(0.0005),
		measure: () => distances(hottelRows())
	},
	{
		id: 'clear-hottel-madison',
		effect: 'clear-sky',
		title: 'Worked example: transmittances at Madison',
		against: 'beam 0.62, diffuse 0.089',
		source: `${book}, examples 2.8.1 and 2.8.2 (from memory); diffuse of Liu and Jordan 1960`,
		provenance: 'memory',
		unit: '',
		tolerance: within(0.005),
		measure: () =>
			distances([
				['τ beam', madisonTau(), 0.6198],
				['τ diffuse', liuJordanClearDiffuse(madisonTau()), 0.0888]
			])
	},
	{
		id: 'clear-hottel-madison-power',
		effect: 'clear-sky',
		title: 'Worked example: powers at Madison',
		against: '830 normal, 701 on level ground, 100 diffuse',
		source: `${book}, examples 2.8.1 and 2.8.2 (from memory)`,
		provenance: 'memory',
		unit: 'W/m²',
		tolerance: within(5),
		measure: () =>
			distances([
				['normal', madisonTau() * madisonOutside, 830],
				['level', madisonTau() * madisonOutside * 0.846, 701],
				['diffuse', liuJordanClearDiffuse(madisonTau()) * madisonOutside * 0.846, 100]
			])
	}
];
