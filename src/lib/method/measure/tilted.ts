/** Sky light on a tilted table and the string effect. */
import {
	erbsDiffuseShare,
	extraterrestrialHorizontalWh,
	extraterrestrialNormal,
	incidenceCosine,
	irradiance,
	perezBrightening,
	planeOfArray,
	RADIANS_PER_DEGREE,
	skyParts,
	stringEffect,
	sunOfHourAngle,
	type PlaneRequest,
	type SkyModel
} from '../../core';
import { distances, within, type Check, type Row } from '../check';

const book = 'Duffie and Beckman, Solar Engineering of Thermal Processes';
const perezSource = 'Perez et al. 1990, Solar Energy 44:271, all-sites composite';

/** Tilt = zenith, DHI, DNI; epsilon, bin, Delta, F1, F2; Perez, isotropic, Hay-Davies. A two-axis table at 1361 W/m². */
const ROWS: readonly (readonly number[])[] = [
	[30, 100, 900, 8.8299, 8, 0.0848, 0.5189, 0.1706, 113.34, 93.3, 107.96],
	[60, 100, 800, 4.6437, 7, 0.1465, 0.4499, 0.2363, 151.7, 75.0, 148.48],
	[75, 80, 600, 3.2488, 6, 0.2241, 0.3163, 0.1764, 145.83, 50.35, 164.42],
	[80, 60, 450, 2.9562, 6, 0.2463, 0.253, 0.1631, 123.36, 35.21, 137.81],
	[60, 200, 200, 1.4555, 3, 0.2931, 0.2408, 0.0094, 211.84, 150.0, 186.74],
	[45, 300, 0, 1.0, 1, 0.3114, 0.1259, -0.0544, 265.7, 256.07, 256.07]
];
const rowName = ([zenith, diffuse, direct]: readonly number[]): string =>
	`zenith ${zenith}°, diffuse ${diffuse}, direct ${direct}`;
const skyOf = ([zenithDeg, diffuseHorizontal, directNormal]: readonly number[]) => ({
	zenithDeg,
	diffuseHorizontal,
	directNormal,
	extraterrestrialNormal: 1361,
	tiltDeg: zenithDeg,
	angleOfIncidenceDeg: 0
});

/** Sky light of a row by a model, once in one number and once in parts. */
function skyRows(model: Exclude<SkyModel, 'hdkr'>, column: number): Row[] {
	return ROWS.flatMap((row): Row[] => {
		const sky = skyOf(row);
		const { circumsolar, isotropic, horizon } = skyParts({ ...sky, model });
		return [
			[rowName(row), irradiance({ ...sky, model }).skyDiffuse, row[column]],
			[`${rowName(row)}, parts`, circumsolar + isotropic + horizon, row[column]]
		];
	});
}

/** f11 .. f23 by bin of clearness, as eight independent public sources agree on them. */
const COEFFICIENTS: readonly (readonly number[])[] = [
	[-0.0083117, 0.5877285, -0.0620636, -0.0596012, 0.0721249, -0.0220216],
	[0.1299457, 0.6825954, -0.1513752, -0.0189325, 0.065965, -0.0288748],
	[0.3296958, 0.4868735, -0.2210958, 0.055414, -0.0639588, -0.0260542],
	[0.5682053, 0.1874525, -0.295129, 0.1088631, -0.1519229, -0.0139754],
	[0.873028, -0.3920403, -0.3616149, 0.2255647, -0.4620442, 0.0012448],
	[1.1326077, -1.2367284, -0.4118494, 0.2877813, -0.8230357, 0.0558651],
	[1.0601591, -1.5999137, -0.3589221, 0.2642124, -1.127234, 0.1310694],
	[0.677747, -0.3272588, -0.2504286, 0.1561313, -1.3765031, 0.2506212]
];
/** A clearness in the middle of each bin, and both ends of every bound. */
const MID_CLEARNESS = [1.03, 1.15, 1.35, 1.7, 2.3, 3.5, 5.3, 9];
const BOUNDS = [1.065, 1.23, 1.5, 1.95, 2.8, 4.5, 6.2];

/**
 * F2 is linear in Delta and z, so three skies of one clearness give its three coefficients back; F1 likewise, raised
 * above zero by its own circumsolar light where the formula would cut it off.
 */
function* coefficientRows(): Generator<Row> {
	for (const [bin, expected] of COEFFICIENTS.entries()) {
		for (const [brightness, zenithDeg] of [
			[0.1, 20],
			[0.3, 45],
			[0.5, 70]
		]) {
			const sky = skyFor(MID_CLEARNESS[bin], brightness, zenithDeg);
			const found = perezBrightening(sky);
			const z = zenithDeg * RADIANS_PER_DEGREE;
			const [f11, f12, f13, f21, f22, f23] = expected;
			const at = `bin ${bin + 1}, Delta ${brightness}, zenith ${zenithDeg}°`;
			yield [`bin at ${at}`, found.bin, bin + 1];
			yield [`F1 at ${at}`, found.f1, Math.max(0, f11 + f12 * found.brightness + f13 * z)];
			yield [`F2 at ${at}`, found.f2, f21 + f22 * found.brightness + f23 * z];
		}
	}
	for (const [k, bound] of BOUNDS.entries()) {
		yield [`below the bound ${bound}`, perezBrightening(skyFor(bound - 1e-9, 0.2, 40)).bin, k + 1];
		yield [`from the bound ${bound} on`, perezBrightening(skyFor(bound + 1e-9, 0.2, 40)).bin, k + 2];
	}
}

/** A sky of a given clearness and brightness: epsilon solved for the beam. */
function skyFor(clearness: number, brightness: number, zenithDeg: number) {
	const diffuseHorizontal = 100;
	const k = 1.041 * (zenithDeg * RADIANS_PER_DEGREE) ** 3;
	const mass = 1 / (Math.cos(zenithDeg * RADIANS_PER_DEGREE) + 0.50572 * (96.07995 - zenithDeg) ** -1.6364);
	return {
		zenithDeg,
		diffuseHorizontal,
		directNormal: diffuseHorizontal * (clearness * (1 + k) - k - 1),
		extraterrestrialNormal: (diffuseHorizontal * mass) / brightness
	};
}

/** 40 N, south 60°, 20 February 9 to 10 h, 1.04 MJ/m², albedo 0.6, 1367 W/m²; declination -11.6 as the book uses. */
const MJ = 3600 / 1e6;
const DECLINATION = -11.6;
const sun = sunOfHourAngle(40, DECLINATION, -37.5);
const outside = extraterrestrialHorizontalWh(40, 51, -45, -30, DECLINATION, 1367) * MJ;
const diffuseShare = erbsDiffuseShare(1.04 / outside);
const level = Math.sin(sun.elevationDeg * RADIANS_PER_DEGREE);
const slope: Omit<PlaneRequest, 'model'> = {
	azimuthDeg: 180,
	tiltDeg: 60,
	sun,
	directNormal: (1.04 - 1.04 * diffuseShare) / level,
	diffuseHorizontal: 1.04 * diffuseShare,
	extraterrestrialNormal: outside / level,
	albedo: 0.6
};
const onSlope = (model: SkyModel) => planeOfArray({ ...slope, model });
const bookSky = () =>
	perezBrightening({
		zenithDeg: 90 - sun.elevationDeg,
		directNormal: slope.directNormal,
		diffuseHorizontal: slope.diffuseHorizontal,
		extraterrestrialNormal: extraterrestrialNormal(51, 1367) * MJ
	});

const STRINGS: readonly (readonly [number, number, number, number])[] = [
	[0.25, 1, 3, 0.4375],
	[0.1, 1, 3, 0.325],
	[0.1, 3, 3, 0.775],
	[0.5, 2, 4, 0.7],
	[0.05, 2, 12, 0.19615],
	[0.3, 12, 12, 0.94615]
];

/** How far a loss lies outside geometric share .. 1, and from its limits; 0 when it keeps them. */
function* stringLimits(): Generator<Row> {
	for (let k = 0; k <= 20; k++) {
		const geometricShare = k / 20;
		for (let shadedBlocks = 0; shadedBlocks <= 12; shadedBlocks++) {
			const { loss } = stringEffect({ geometricShare, shadedBlocks, blocks: 12 });
			const at = `share ${geometricShare}, ${shadedBlocks} of 12 blocks`;
			yield [`between the bounds, ${at}`, Math.min(1, Math.max(geometricShare, loss)), loss];
			if (shadedBlocks === 0) yield [`no block, ${at}`, loss, geometricShare];
			else if (geometricShare < 1) yield [`never all, ${at}`, Number(loss < 1), 1];
		}
	}
}
const strings = 'Martinez-Moreno, Muñoz and Lorenzo 2010, Solar Energy Materials and Solar Cells 94:2298';

export const tiltedChecks: Check[] = [
	{
		id: 'tilted-perez',
		effect: 'transposition',
		title: 'Sky on a two-axis table, Perez',
		against: 'six skies worked out from the formulas',
		source: perezSource,
		provenance: 'formula',
		unit: 'W/m²',
		tolerance: within(0.05),
		measure: () => distances(skyRows('perez', 8))
	},
	{
		id: 'tilted-hay-davies',
		effect: 'transposition',
		title: 'The same, Hay and Davies',
		against: 'the same skies',
		source: 'Hay and Davies 1980',
		provenance: 'formula',
		unit: 'W/m²',
		tolerance: within(0.05),
		measure: () => distances(skyRows('hay-davies', 10))
	},
	{
		id: 'tilted-isotropic',
		effect: 'transposition',
		title: 'The same, even sky',
		against: 'the same skies',
		source: 'Liu and Jordan 1960',
		provenance: 'formula',
		unit: 'W/m²',
		tolerance: within(0.05),
		measure: () => distances(skyRows('isotropic', 9))
	},
	{
		id: 'tilted-perez-factors',
		effect: 'transposition',
		title: 'Brightness and brightening factors of the same skies',
		against: 'Delta, F1 and F2 worked out from the formulas',
		source: perezSource,
		provenance: 'formula',
		unit: '',
		tolerance: within(5.1e-5, 3e-5),
		measure: () =>
			distances(
				ROWS.flatMap((row): Row[] => {
					const { bin, brightness, f1, f2 } = perezBrightening(skyOf(row));
					const at = rowName(row);
					return [
						[`bin, ${at}`, bin, row[4]],
						[`Delta, ${at}`, brightness, row[5]],
						[`F1, ${at}`, f1, row[6]],
						[`F2, ${at}`, f2, row[7]]
					];
				})
			)
	},
	{
		id: 'tilted-perez-clearness',
		effect: 'transposition',
		title: 'Clearness of the same skies',
		against: 'epsilon with 5.535e-6 for degrees, where the core has 1.041 for radians',
		source: perezSource,
		provenance: 'formula',
		unit: '',
		tolerance: within(2e-4, 1e-4),
		measure: () =>
			distances(ROWS.map((row): Row => [rowName(row), perezBrightening(skyOf(row)).clearness, row[3]]))
	},
	{
		id: 'tilted-perez-table',
		effect: 'transposition',
		title: 'Table of 48 coefficients and bounds of its bins',
		against: 'digits that eight independent public sources agree on',
		source: perezSource,
		provenance: 'published',
		unit: '',
		tolerance: within(1e-9),
		measure: () => distances(coefficientRows())
	},
	{
		id: 'tilted-book-ratios',
		effect: 'transposition',
		title: 'Worked example: clearness index, diffuse share, beam ratio',
		against: 'kT 0.446, Id/I 0.765, Rb 1.71',
		source: `${book}, example 2.15.1 (from memory)`,
		provenance: 'memory',
		unit: '',
		tolerance: within(0.01, 0.005),
		measure: () =>
			distances([
				['kT', 1.04 / outside, 0.446],
				['Id/I', diffuseShare, 0.765],
				['Rb', incidenceCosine(180, 60, sun) / level, 1.71],
				['Ai', slope.directNormal / slope.extraterrestrialNormal, 0.105],
				['f', Math.sqrt(1 - diffuseShare), 0.485]
			])
	},
	{
		id: 'tilted-book-isotropic',
		effect: 'transposition',
		title: 'Worked example: beam, sky, ground and total of an even sky',
		against: '0.419 + 0.597 + 0.156 = 1.17',
		source: `${book}, example 2.15.1 (from memory)`,
		provenance: 'memory',
		unit: 'MJ/m²',
		tolerance: within(0.01),
		measure: () => {
			const light = onSlope('isotropic');
			return distances([
				['I₀', outside, 2.335],
				['beam', light.beam, 0.419],
				['sky', light.isotropic, 0.597],
				['ground', light.ground, 0.156],
				['total', light.total, 1.1717]
			]);
		}
	},
	{
		id: 'tilted-book-others',
		effect: 'transposition',
		title: 'Worked examples: HDKR, Hay and Davies, Perez',
		against: '1.2844, 1.2521 and 1.3715',
		source: `${book}, examples 2.16.1 (from memory) and 2.16.2 (from the formula)`,
		provenance: 'memory',
		unit: 'MJ/m²',
		tolerance: within(0.01),
		measure: () =>
			distances([
				['HDKR', onSlope('hdkr').total, 1.2844],
				['Hay and Davies', onSlope('hay-davies').total, 1.2521],
				['Perez', onSlope('perez').total, 1.3715]
			])
	},
	{
		id: 'tilted-book-perez',
		effect: 'transposition',
		title: 'Worked example: clearness, brightness, F1 and F2 of that sky',
		against: '1.28 (bin 3), 0.341, 0.256, 0.005',
		source: `${book}, example 2.16.2 (from the formula)`,
		provenance: 'formula',
		unit: '',
		tolerance: within(0.01, 0.005),
		measure: () => {
			const { clearness, bin, brightness, f1, f2 } = bookSky();
			return distances([
				['clearness', clearness, 1.28],
				['bin', bin, 3],
				['brightness', brightness, 0.341],
				['F1', f1, 0.256],
				['F2', f2, 0.005]
			]);
		}
	},
	{
		id: 'strings-rows',
		effect: 'strings',
		title: 'Loss of partly shaded strings',
		against: '(1 - FES) = (1 - FGS)(1 - NSB / (NTB + 1)), six rows',
		source: `${strings}, eq. 6`,
		provenance: 'formula',
		unit: '',
		tolerance: within(1e-5),
		measure: () =>
			distances(
				STRINGS.map(([geometricShare, shadedBlocks, blocks, loss]): Row => [
					`share ${geometricShare}, ${shadedBlocks} of ${blocks}`,
					stringEffect({ geometricShare, shadedBlocks, blocks }).loss,
					loss
				])
			)
	},
	{
		id: 'strings-limits',
		effect: 'strings',
		title: 'Limits: never below the shaded share, never above 1',
		against: 'bounds that any model must keep, 273 combinations',
		source: `Algebra of ${strings}, eq. 6`,
		provenance: 'formula',
		unit: '',
		tolerance: within(1e-12),
		measure: () => distances(stringLimits())
	}
];
