import { describe, expect, it } from 'vitest';
import { RADIANS_PER_DEGREE } from '../conventions';
import type { BuildingObstacle, MastObstacle, Obstacle, TreeObstacle, WallObstacle } from '../document';
import { fieldShade, prepareField } from '../field';
import { testLayout, testModel, testPlace, testPlot, testTracker } from '../test-field';
import { obstacleSolids, obstacleTopM } from './obstacle-solids';
import { obstacleExtent } from './obstacle-outline';

/** A flat glass of 40 x 40 m, 3 m above level ground around the origin: what falls on it is a plan of the shadow. */
const SIDE = 40; // Shaders count from 1e-7 m above it, so areas are right to about 1e-6 m2.
const LEVEL = 3;
const table = testModel({ widthM: SIDE, heightM: SIDE, axisHeightM: LEVEL });

function shadowM2(
	obstacle: Obstacle,
	azimuthDeg: number,
	elevationDeg: number,
	at: { dayOfYear?: number; latitudeDeg?: number } = {}
): number {
	const field = prepareField({
		place: { ...testPlace, latitudeDeg: at.latitudeDeg ?? 45 },
		plot: testPlot({ obstacles: [obstacle] }),
		layout: testLayout(
			[testTracker(0, 0, 0, { posture: { kind: 'standing', azimuthDeg: 180, tiltDeg: 0 } })],
			[table]
		)
	});
	return SIDE * SIDE * fieldShade(field, { azimuthDeg, elevationDeg }, at.dayOfYear)[0];
}
const run = (elevationDeg: number) => 1 / Math.tan(elevationDeg * RADIANS_PER_DEGREE);

const building = (changes: Partial<BuildingObstacle> = {}): BuildingObstacle => ({
	id: 'b',
	kind: 'building',
	name: 'Barn',
	eastM: 0,
	northM: 0,
	corners: [
		[-3, -2],
		[3, -2],
		[3, 2],
		[-3, 2]
	],
	heightM: 5,
	roof: { kind: 'flat' },
	...changes
});
const tree = (changes: Partial<TreeObstacle> = {}): TreeObstacle => ({
	id: 't',
	kind: 'tree',
	name: 'Oak',
	eastM: 0,
	northM: 0,
	heightM: 9,
	crownBaseM: 5,
	crownRadiusM: 2,
	trunkRadiusM: 0,
	crownTransmission: 0,
	growthMPerYear: 0,
	maxHeightM: 9,
	...changes
});

describe('buildings', () => {
	it('with a flat roof shade their footprint and the strip that the roof is moved by', () => {
		// Above the glass it stands 2 m; the sun in the south throws 2 m / tan e to the north, 6 m wide.
		expect(shadowM2(building(), 180, 40)).toBeCloseTo(24 + 6 * 2 * run(40), 5);
		// From the south-east: + 2 run (6 cos 45 + 4 sin 45).
		expect(shadowM2(building(), 135, 35)).toBeCloseTo(24 + 2 * run(35) * 10 * Math.SQRT1_2, 5);
	});

	it('with a pitched roof shade as far as ridge or eaves reach', () => {
		const pitched = building({ roof: { kind: 'pitched', riseM: 3, ridgeDeg: 90 } });
		// Ridge along east at 5 m above the glass in the middle, eaves at 2 m: low sun in the south, the ridge reaches
		// 5 run from the middle, the eaves 2 run from 2 m north of it.
		for (const e of [20, 50, 70]) {
			const reach = Math.max(5 * run(e), 2 + 2 * run(e));
			expect(shadowM2(pitched, 180, e)).toBeCloseTo(6 * (2 + reach), 5);
		}
		// Sun in the west, across the gable: its outline is a rectangle 4 x 2 with a triangle 4 x 3 on it.
		expect(shadowM2(pitched, 270, 45)).toBeCloseTo(24 + (4 * 2 + 0.5 * 4 * 3) * run(45), 5);
		expect(obstacleTopM(pitched)).toBe(8);
	});

	it('with a ridge askew over a footprint that is no rectangle keep their walls under the roof', () => {
		const [solid] = obstacleSolids(
			building({
				corners: [
					[0, 0],
					[8, 1],
					[9, 6],
					[2, 7]
				],
				roof: { kind: 'pitched', riseM: 2, ridgeDeg: 70 }
			}),
			{ groundAt: () => 0, treeYears: 0, latitudeDeg: 45 },
			0
		);
		// Every corner lies on or inside every face: the body is convex and closed.
		for (let v = 0; v < solid.vertices.length; v += 3)
			for (let f = 0; f < solid.faces.length; f += 4) {
				const [nx, ny, nz, d] = solid.faces.subarray(f, f + 4);
				const out = nx * solid.vertices[v] + ny * solid.vertices[v + 1] + nz * solid.vertices[v + 2] - d;
				expect(out).toBeLessThan(1e-9);
			}
		const tops = [...solid.vertices].filter((_, k) => k % 3 === 2);
		expect(Math.max(...tops)).toBeCloseTo(7, 9);
		expect(tops.filter((z) => z > 5 - 1e-9 && z < 5 + 1e-9)).toHaveLength(2);
	});

	it('of an L shade like the two blocks that it is made of', () => {
		const l = building({
			corners: [
				[0, 0],
				[6, 0],
				[6, 2],
				[2, 2],
				[2, 5],
				[0, 5]
			]
		});
		// Sun in the south: the 6 m front moves 2 run north; the notch is filled up to its depth of 3 m.
		const strip = Math.min(3, 2 * run(60));
		expect(shadowM2(l, 180, 60)).toBeCloseTo(18 + 2 * 2 * run(60) + 4 * strip, 5);
	});

	it('reach down to the lowest ground and are measured from the ground under their middle', () => {
		const [solid] = obstacleSolids(
			building(),
			{ groundAt: (e) => 0.1 * e, treeYears: 0, latitudeDeg: 45 },
			0
		);
		const heights = [...solid.vertices].filter((_, k) => k % 3 === 2);
		expect(Math.min(...heights)).toBeCloseTo(-0.3, 12);
		expect(Math.max(...heights)).toBeCloseTo(5, 12);
	});
});

describe('walls, fences and masts', () => {
	const wall: WallObstacle = {
		id: 'w',
		kind: 'wall',
		name: 'Fence',
		eastM: 1,
		northM: 2,
		line: [
			[-5, 0],
			[5, 0]
		],
		heightM: 5,
		thicknessM: 0.2,
		transmission: 0
	};

	it('a wall shades its length times its shadow, a fence its share of it', () => {
		const area = 10 * (0.2 + 2 * run(40));
		expect(shadowM2(wall, 180, 40)).toBeCloseTo(area, 5);
		expect(shadowM2({ ...wall, transmission: 0.6 }, 180, 40)).toBeCloseTo(0.4 * area, 5);
		expect(obstacleExtent(wall)).toEqual([-4, 1.9, 6, 2.1]);
	});

	it('a wall follows the ground, in more pieces where it bends', () => {
		const bent = (e: number) => (e < 0 ? 0 : 0.3 * e);
		const site = { groundAt: bent, treeYears: 0, latitudeDeg: 45 };
		const pieces = obstacleSolids(wall, site, 0);
		expect(pieces.length).toBeGreaterThan(1);
		for (const piece of pieces)
			for (let v = 0; v < 12; v += 3)
				expect(Math.abs(piece.vertices[v + 2] - bent(piece.vertices[v]))).toBeLessThan(0.1);
		expect(obstacleSolids(wall, { ...site, groundAt: (e) => 0.3 * e }, 0)).toHaveLength(1);
	});

	it('a mast shades its width times its length, to the 2 % of sixteen sides', () => {
		const mast: MastObstacle = {
			id: 'm',
			kind: 'mast',
			name: 'Mast',
			eastM: 0,
			northM: 0,
			heightM: 9,
			radiusM: 0.3
		};
		const round = Math.PI * 0.09 + 0.6 * 6 * run(50);
		expect(shadowM2(mast, 200, 50) / round).toBeGreaterThan(0.975);
		expect(shadowM2(mast, 200, 50) / round).toBeLessThan(1);
	});
});

describe('crowns', () => {
	it('of ellipsoid shape have the shadow of an ellipsoid, to 1 %', () => {
		// Shadow on level glass: pi a sqrt(a^2 sin^2 e + c^2 cos^2 e) / sin e.
		for (const e of [25, 45, 65, 85]) {
			const r = e * RADIANS_PER_DEGREE;
			const area = (Math.PI * 2 * Math.hypot(2 * Math.sin(r), 2 * Math.cos(r))) / Math.sin(r);
			expect(Math.abs(shadowM2(tree({ crownShape: 'ellipsoid' }), 170, e) / area - 1)).toBeLessThan(0.01);
		}
		const tall = tree({ crownShape: 'ellipsoid', crownRadiusM: 1.5 });
		const r = 35 * RADIANS_PER_DEGREE;
		const area = (Math.PI * 1.5 * Math.hypot(1.5 * Math.sin(r), 2 * Math.cos(r))) / Math.sin(r);
		expect(Math.abs(shadowM2(tall, 77, 35) / area - 1)).toBeLessThan(0.01);
	});

	it('of cone shape have the shadow of a cone, to the 3 % of sixteen sides', () => {
		// Tip 4 m above the crown's foot: hull of a circle of radius a and a point at distance t from its middle.
		const t = 4 * run(30);
		const half = Math.acos(2 / t);
		const area = 2 * t * Math.sin(half) + 4 * (Math.PI - half);
		const ours = shadowM2(tree({ crownShape: 'cone' }), 180, 30);
		expect(ours / area).toBeGreaterThan(0.97);
		expect(ours / area).toBeLessThanOrEqual(1);
	});

	it('stay upright cylinders where nothing is said', () => {
		expect(shadowM2(tree(), 123, 40)).toBe(shadowM2(tree({ crownShape: 'cylinder' }), 123, 40));
	});

	it('let through what the season says: by their own days, by hemisphere, and all year without', () => {
		const leafy = tree({ crownTransmission: 0.5, leafTransmission: 0.1 });
		const full = shadowM2(tree(), 180, 40);
		const on = (dayOfYear: number, latitudeDeg = 45, one = leafy) =>
			shadowM2(one, 180, 40, { dayOfYear, latitudeDeg }) / full;
		expect(on(20)).toBeCloseTo(0.5, 9);
		expect(on(200)).toBeCloseTo(0.9, 9);
		expect(on(20, -30)).toBeCloseTo(0.9, 9);
		expect(on(200, -30)).toBeCloseTo(0.5, 9);
		expect(on(104)).toBeCloseTo(0.5, 9);
		expect(on(105)).toBeCloseTo(0.9, 9);
		const own = tree({ crownTransmission: 0.4, leafTransmission: 0, leafDays: [300, 60] });
		expect(on(20, 45, own)).toBeCloseTo(1, 9);
		expect(on(100, 45, own)).toBeCloseTo(0.6, 9);
		const always = tree({ crownTransmission: 0.3 });
		expect(on(20, 45, always)).toBeCloseTo(0.7, 9);
		expect(on(200, 45, always)).toBeCloseTo(0.7, 9);
	});
});
