import { describe, expect, it } from 'vitest';
import {
	emptyPlot,
	fieldErrors,
	MAX_GROUND_POINTS,
	NOT_CONVEX,
	plotSchema,
	trackerModelSchema,
	modelLibrary
} from './index';

const building = {
	id: 'b',
	kind: 'building',
	name: 'Barn',
	eastM: 5,
	northM: 6,
	corners: [
		[0, 0],
		[8, 0],
		[8, 5],
		[0, 5]
	],
	heightM: 4,
	roof: { kind: 'flat' }
};
const wall = {
	id: 'w',
	kind: 'wall',
	name: '',
	eastM: 0,
	northM: 0,
	line: [
		[0, 0],
		[10, 0]
	],
	heightM: 2,
	thicknessM: 0.2,
	transmission: 0.5
};
const mast = { id: 'm', kind: 'mast', name: 'Pole', eastM: 0, northM: 0, heightM: 9, radiusM: 0.15 };
const tree = {
	id: 't',
	kind: 'tree',
	name: 'Oak',
	eastM: 0,
	northM: 0,
	heightM: 9,
	crownBaseM: 2,
	crownRadiusM: 3,
	trunkRadiusM: 0.3,
	crownTransmission: 0.4,
	growthMPerYear: 0.4,
	maxHeightM: 15
};
const box = {
	id: 'x',
	kind: 'box',
	name: 'Hut',
	eastM: 0,
	northM: 0,
	sizeXM: 3,
	sizeYM: 4,
	heightM: 3,
	turnDeg: 20
};
const l = [
	[0, 0],
	[8, 0],
	[8, 3],
	[3, 3],
	[3, 6],
	[0, 6]
];
const raster = {
	kind: 'raster',
	westM: -10,
	southM: -10,
	cellM: 10,
	columns: 3,
	rows: 2,
	heightsM: [1, 2, null, 1, 2, 3]
};
const spots = [
	[0, 0, 1],
	[10, 0, 2],
	[0, 10, 3]
];
const around = (obstacles: unknown[], ground: unknown = emptyPlot().ground) => ({
	...emptyPlot(),
	obstacles,
	ground
});
const refusal = (document: unknown) => {
	const answer = plotSchema.safeParse(document);
	return answer.success ? null : fieldErrors(answer.error)[0];
};

describe('obstacles', () => {
	it('of every kind come through unchanged, old trees and boxes too', () => {
		const plot = around([
			building,
			{ ...building, id: 'b2', roof: { kind: 'pitched', riseM: 2, ridgeDeg: 90 } },
			{ ...building, id: 'b3', corners: l },
			wall,
			mast,
			tree,
			{ ...tree, id: 't2', crownShape: 'ellipsoid', leafTransmission: 0.1, leafDays: [300, 100] },
			box
		]);
		expect(plotSchema.parse(plot)).toEqual(plot);
	});

	it.each<[string, unknown, string, string]>([
		['a footprint that crosses itself', { ...building, corners: [[0, 0], [8, 5], [8, 0], [0, 5]] }, 'corners', 'crosses itself'],
		['a footprint of two corners', { ...building, corners: [[0, 0], [8, 5]] }, 'corners', 'at least three'],
		['a footprint without area', { ...building, corners: [[0, 0], [4, 0], [8, 0]] }, 'corners', 'no area'],
		['a corner without a number', { ...building, corners: [[0, 0], [Number.NaN, 0], [8, 8]] }, 'corners.1.0', 'Give a number'],
		['61 corners', { ...building, corners: Array.from({ length: 61 }, (_, k) => [9 * Math.cos(k / 9.7), 9 * Math.sin(k / 9.7)]) }, 'corners', 'within 60'],
		['walls without height', { ...building, heightM: 0 }, 'heightM', 'Give a number'],
		['a pitched roof over an L', { ...building, corners: l, roof: { kind: 'pitched', riseM: 2, ridgeDeg: 0 } }, 'roof', NOT_CONVEX],
		['a roof of no rise', { ...building, roof: { kind: 'pitched', riseM: 0, ridgeDeg: 0 } }, 'roof.riseM', 'Give a number'],
		['an unknown roof', { ...building, roof: { kind: 'dome' } }, 'roof.kind', 'flat'],
		['a wall of one point', { ...wall, line: [[0, 0]] }, 'line', 'two points'],
		['a wall that stops on the spot', { ...wall, line: [[0, 0], [5, 0], [5, 0]] }, 'line', 'points 2 and 3'],
		['a wall without thickness', { ...wall, thicknessM: 0 }, 'thicknessM', 'Give a number'],
		['a fence that makes light', { ...wall, transmission: 1.2 }, 'transmission', 'from 0 to 1'],
		['a mast without radius', { ...mast, radiusM: 0 }, 'radiusM', 'Give a number'],
		['days in leaf that are none', { ...tree, leafTransmission: 0, leafDays: [0, 400] }, 'leafDays.0', 'from 1 to 366'],
		['days in leaf without their light', { ...tree, leafDays: [100, 300] }, 'leafTransmission', 'in leaf'],
		['an unknown crown', { ...tree, crownShape: 'cube' }, 'crownShape', 'ellipsoid'],
		['an unknown kind', { ...mast, kind: 'cloud' }, 'kind', 'mast']
	])('refuses %s', (_, obstacle, path, words) => {
		const found = refusal(around([obstacle]));
		expect(found?.path).toBe(`obstacles.0.${path}`);
		expect(found?.message).toContain(words);
	}); // prettier-ignore

	it('refuses far too many corners in all', () => {
		const ring = Array.from({ length: 60 }, (_, k) => [
			9 * Math.cos((k * Math.PI) / 30),
			9 * Math.sin((k * Math.PI) / 30)
		]);
		const many = Array.from({ length: 100 }, (_, k) => ({ ...building, id: `b${k}`, corners: ring }));
		expect(refusal(around(many))).toMatchObject({ path: 'obstacles' });
	});
});

describe('measured ground', () => {
	it('of points and of a raster with gaps comes through unchanged', () => {
		for (const ground of [{ kind: 'points', points: spots }, raster])
			expect(plotSchema.parse(around([], ground)).ground).toEqual(ground);
	});

	it.each<[string, unknown, string, string]>([
		['two heights', { kind: 'points', points: spots.slice(0, 2) }, 'points', 'three places'],
		['one place three times', { kind: 'points', points: [[1, 1, 1], [1, 1, 1], [1, 1, 1]] }, 'points', 'three places'],
		['a line', { kind: 'points', points: [[0, 0, 1], [5, 5, 1], [9, 9, 2]] }, 'points', 'one line'],
		['two heights at one place', { kind: 'points', points: [...spots, [0, 0, 9]] }, 'points.3', 'Heights 1 and 4'],
		['a height that is no number', { kind: 'points', points: [...spots, [5, 5, Number.NaN]] }, 'points.3.2', 'Give a number'],
		['a height of two numbers', { kind: 'points', points: [...spots, [5, 5]] }, 'points.3', 'eastM, northM, heightM'],
		['too many heights', { kind: 'points', points: Array.from({ length: MAX_GROUND_POINTS + 1 }, (_, k) => [k % 200, k / 200, 0]) }, 'points', 'thin them out'],
		['a raster of the wrong count', { ...raster, rows: 3 }, 'heightsM', 'make 9 heights; 6 are given'],
		['a raster of gaps', { ...raster, heightsM: [1, null, null, null, null, 2] }, 'heightsM', '4 of 6'],
		['a raster off the plan', { ...raster, westM: 19_990 }, 'cellM', 'runs off the plan'],
		['a raster without cells', { ...raster, cellM: 0 }, 'cellM', 'Give a number'],
		['an unknown ground', { kind: 'moon' }, 'kind', 'raster']
	])('refuses %s', (_, ground, path, words) => {
		const found = refusal(around([], ground));
		expect(found?.path).toBe(`ground.${path}`);
		expect(found?.message).toContain(words);
	}); // prettier-ignore
});

describe('modules of a tracker model', () => {
	it('may be told or left out, and a string holds no more than the table', () => {
		const told = {
			...modelLibrary[0],
			moduleOrientation: 'landscape',
			groupsPerModule: 3,
			modulesPerString: 6
		};
		expect(trackerModelSchema.parse(told)).toEqual(told);
		const answer = trackerModelSchema.safeParse({ ...told, modulesPerString: 7 });
		expect(answer.success).toBe(false);
		if (!answer.success)
			expect(fieldErrors(answer.error)[0]).toEqual({
				path: 'modulesPerString',
				message: 'The table has 6 modules: a string of it can’t hold more.'
			});
	});
});
