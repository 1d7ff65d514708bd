import { describe, expect, it } from 'vitest';
import {
	buildingRing,
	groundHeightM,
	longestDate,
	shortestDate,
	sunDay,
	wallLine,
	type Ground,
	type Obstacle,
	type PlanPoint,
	type Plot
} from '$lib/core';
import { emptyPlot, obstacleSchema, plotSchema } from '$lib/schema';
import {
	boundaryProblem,
	insertCorner,
	moveCorner,
	partFromCorners,
	removeCorner,
	turnRings
} from './boundary-edit';
import { contoursOf, groundRange } from './contours';
import {
	kindWord,
	longestSideDeg,
	newBox,
	newBuilding,
	newMast,
	newTree,
	newWall,
	treeHeightIn
} from './obstacle-edit';
import { choiceRows, numberRows } from './obstacle-rows';
import { widestRadiusM } from './room-inside';
import { sunPath } from './sun-paths';

function withSquare(): Plot {
	return {
		...emptyPlot(),
		boundary: [
			partFromCorners([
				[0, 0],
				[0, 10],
				[10, 10],
				[10, 0]
			])
		]
	};
}
const first = { part: 0, ring: 0, index: 0 };

describe('editing the boundary', () => {
	it('turns a clockwise drawing round and rounds to the centimetre', () => {
		const part = partFromCorners([
			[0, 0],
			[0, 10.004],
			[10, 10]
		]);
		expect(part.outer).toEqual([
			[10, 10],
			[0, 10],
			[0, 0]
		]);
	});

	it('moves, inserts and removes corners', () => {
		const plot = withSquare();
		moveCorner(plot, first, [12.345, -1]);
		expect(plot.boundary[0].outer[0]).toEqual([12.35, -1]);
		expect(insertCorner(plot, first, [11, 5])).toEqual({ ...first, index: 1 });
		expect(plot.boundary[0].outer).toHaveLength(5);
		removeCorner(plot, { ...first, index: 1 });
		removeCorner(plot, first);
		expect(plot.boundary[0].outer).toHaveLength(3);
		removeCorner(plot, first);
		expect(plot.boundary).toEqual([]);
	});

	it('takes a hole away with its third corner and keeps the outline', () => {
		const plot = withSquare();
		plot.boundary[0].holes = [
			[
				[2, 2],
				[2, 4],
				[4, 4]
			]
		];
		removeCorner(plot, { part: 0, ring: 1, index: 2 });
		expect(plot.boundary[0].holes).toEqual([]);
		expect(plot.boundary[0].outer).toHaveLength(4);
	});

	it('says why a boundary cannot be and turns rings that were dragged over', () => {
		const plot = withSquare();
		expect(boundaryProblem(plot.boundary)).toBeNull();
		const crossed = withSquare();
		moveCorner(crossed, first, [-5, 5]);
		expect(boundaryProblem(crossed.boundary)).toMatch(/Outline crosses itself/);
		plot.boundary[0].holes = [
			[
				[20, 2],
				[20, 4],
				[24, 4]
			]
		];
		expect(boundaryProblem(plot.boundary)).toMatch(/hole 1 does not lie inside/);
		plot.boundary[0].outer.reverse();
		turnRings(plot);
		expect(plot.boundary[0].outer).toEqual(withSquare().boundary[0].outer);
	});
});

describe('the ground on the plan', () => {
	const ground: Ground = { kind: 'plane', heightM: 3, risePercent: 9, riseTowardsDeg: 90 };

	it('has contours on their own height, at a round step', () => {
		const { stepM, lines } = contoursOf(ground, { westM: -60, eastM: 60, southM: -40, northM: 40 });
		// 120 m at 9 % is 10.8 m of height.
		expect(stepM).toBe(1);
		expect(lines.length).toBeGreaterThanOrEqual(10);
		for (const { heightM, from, to } of lines) {
			expect(groundHeightM(ground, from[0], from[1])).toBeCloseTo(heightM, 9);
			expect(groundHeightM(ground, to[0], to[1])).toBeCloseTo(heightM, 9);
		}
		expect(
			contoursOf({ kind: 'level', heightM: 0 }, { westM: 0, eastM: 9, southM: 0, northM: 9 }).lines
		).toEqual([]);
	});

	it('tells lowest and highest', () => {
		expect(
			groundRange(ground, [
				[-60, 0],
				[60, 5]
			])
		).toEqual({
			lowestM: expect.closeTo(-2.4, 9) as number,
			highestM: expect.closeTo(8.4, 9) as number
		});
		expect(groundRange(ground, [])).toBeNull();
	});
});

describe('obstacles', () => {
	it('get names that are free', () => {
		const one = newTree('a', [0, 0], []);
		expect(newTree('b', [1, 1], [one]).name).toBe('Tree 2');
		expect(newBox('c', [1, 1], [one]).name).toBe('Building 1');
	});

	it('grow until they are full-grown', () => {
		const tree = { ...newTree('a', [0, 0], []), heightM: 9, growthMPerYear: 0.4, maxHeightM: 14 };
		expect(treeHeightIn(tree, 10)).toBeCloseTo(13, 9);
		expect(treeHeightIn(tree, 30)).toBe(14);
	});

	it('drawn corner by corner keep their place on the plan, to the centimetre', () => {
		const corners: PlanPoint[] = [
			[10.004, 20],
			[22, 21],
			[21, 27.5]
		];
		const barn = newBuilding('b', corners, []);
		expect(buildingRing(barn)).toEqual([
			[10, 20],
			[22, 21],
			[21, 27.5]
		]);
		expect(barn.name).toBe('Building 1');
		const wall = newWall('w', corners, [barn]);
		expect(wallLine(wall)[2]).toEqual([21, 27.5]);
		expect(kindWord(wall)).toBe('wall');
		expect(kindWord({ ...wall, transmission: 0.4 })).toBe('fence');
		const plot = { ...emptyPlot(), obstacles: [barn, wall, newMast('m', [1, 2], [])] };
		expect(plotSchema.parse(plot)).toEqual(plot);
		// The side that closes it is the longest: 11 east, 7.5 north.
		expect(longestSideDeg(barn.corners)).toBeCloseTo((Math.atan2(11, 7.5) * 180) / Math.PI, 1);
	});

	it('offer exactly the numbers and choices that their schema takes', () => {
		const building = newBuilding('b', [[0, 0], [9, 0], [9, 5]], []); // prettier-ignore
		const pitched = { ...building, ...choiceRows(building)[0].change('pitched') };
		const tree = newTree('t', [0, 0], []);
		const sheds = {
			...tree,
			...choiceRows(tree)[1].change('sheds'),
			...choiceRows(tree)[0].change('ellipsoid')
		};
		const wall = newWall('w', [[0, 0], [9, 0]], []); // prettier-ignore
		for (const obstacle of [
			building,
			pitched,
			tree,
			sheds,
			wall,
			newMast('m', [0, 0], []),
			newBox('x', [0, 0], [])
		]) {
			const one = obstacle as Obstacle;
			expect(obstacleSchema.safeParse(one).success).toBe(true);
			for (const row of numberRows(one)) {
				expect(row.value).toBeGreaterThanOrEqual(row.min);
				for (const value of [row.min, row.max]) {
					const read = obstacleSchema.safeParse({ ...one, ...row.change(value) });
					expect(read.success, `${one.kind} ${row.key} ${value}`).toBe(true);
				}
			}
		}
		// Going back from leaves to none keeps the light that it had in leaf.
		const back = { ...sheds, ...choiceRows(sheds as Obstacle)[1].change('all-year') };
		expect(obstacleSchema.parse(back)).toMatchObject({ crownTransmission: tree.crownTransmission });
	});
});

describe('the room inside a boundary', () => {
	const part = (outer: [number, number][], holes: [number, number][][] = []) => [{ outer, holes }];
	const square: [number, number][] = [
		[0, 0],
		[20, 0],
		[20, 20],
		[0, 20]
	];

	it('is the radius of the largest circle that fits: half the side of a square, (a + b - c) / 2 in a right triangle', () => {
		expect(widestRadiusM(part(square))).toBeCloseTo(10, 1);
		expect(
			widestRadiusM(
				part([
					[0, 0],
					[40, 0],
					[0, 30]
				])
			)
		).toBeCloseTo(10, 1);
	});

	it('keeps clear of holes and takes the widest of several parts', () => {
		const hole: [number, number][] = [
			[9.9, 9.9],
			[9.9, 10.1],
			[10.1, 10.1],
			[10.1, 9.9]
		];
		// In the corner of the square: r sqrt2 + r = distance of the corner from the hole's own, 9.9 sqrt2.
		expect(widestRadiusM(part(square, [hole]))).toBeCloseTo((9.9 * Math.SQRT2) / (1 + Math.SQRT2), 1);
		const strip = part([
			[0, 50],
			[60, 50],
			[60, 54],
			[0, 54]
		]);
		expect(widestRadiusM([...strip, ...part(square)])).toBeCloseTo(10, 1);
		expect(widestRadiusM(strip)).toBeCloseTo(2, 1);
		expect(widestRadiusM([])).toBe(0);
	});
});

describe('the sun behind the skyline', () => {
	const place = {
		latitudeDeg: 0,
		longitudeDeg: 0,
		altitudeM: 0,
		timeZone: 'UTC',
		magneticDeclinationDeg: 0
	};

	it('is lost for about 20 minutes at each end of an equinox day at the equator behind 5 degrees', () => {
		// The sun climbs upright at 15 degrees an hour there: 5 degrees take 20 minutes, less what refraction gives back.
		const path = sunPath('2026-03-20', place, 0, [
			{ azimuthDeg: 0, elevationDeg: 5 },
			{ azimuthDeg: 180, elevationDeg: 5 }
		]);
		expect(path.upMinutes).toBeGreaterThan(720);
		expect(path.upMinutes).toBeLessThan(730);
		expect(path.lostMinutes).toBeGreaterThanOrEqual(40);
		expect(path.lostMinutes).toBeLessThanOrEqual(46);
		expect(sunPath('2026-03-20', place, 0, []).lostMinutes).toBe(0);
	});

	it('has the length of day that every other page gives', () => {
		const farm = { ...place, latitudeDeg: 43.75, longitudeDeg: 4.85 };
		for (const date of [shortestDate(43.75, 2026), longestDate(43.75, 2026)]) {
			const day = sunDay(date, farm, 60);
			expect(sunPath(date, farm, 60, []).upMinutes).toBeCloseTo((day.setMs! - day.riseMs!) / 60_000, 9);
		}
	});

	it('is lost altogether behind a wall, all day in polar summer and not at all in polar night', () => {
		const wall = [
			{ azimuthDeg: 0, elevationDeg: 60 },
			{ azimuthDeg: 180, elevationDeg: 60 }
		];
		const farNorth = { ...place, latitudeDeg: 75 };
		const summer = sunPath('2026-06-21', farNorth, 0, wall);
		expect([summer.upMinutes, summer.lostMinutes]).toEqual([1440, 1440]);
		const winter = sunPath('2026-12-21', farNorth, 0, wall);
		expect([winter.upMinutes, winter.lostMinutes, winter.points.length]).toEqual([0, 0, 0]);
	});
});
