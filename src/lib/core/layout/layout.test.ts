import { describe, expect, it } from 'vitest';
import type { BoundaryPart, Obstacle, PlanPoint, Plot } from '../document';
import { reachRadiusM } from '../machine/reach';
import { testLayout, testModel, testPlot, testTracker } from '../test-field';
import { checkLayout } from './check-layout';
import { fillPlot } from './fill-plot';
import { groundCover } from './ground-cover';
import {
	boundaryAreaM2,
	boundaryEdges,
	boundaryPerimeterM,
	insideBoundary,
	segmentDistanceM,
	stretchesOnLand
} from './polygon';
import { rowPoints } from './rows';
import { nextTags, rowLetters } from './tags';

const square = (size: number, holes: PlanPoint[][] = []): BoundaryPart[] => [
	{
		outer: [
			[0, 0],
			[size, 0],
			[size, size],
			[0, size]
		],
		holes
	}
];
const pond: PlanPoint[] = [
	[40, 40],
	[40, 60],
	[60, 60],
	[60, 40]
];

describe('filling a plot', () => {
	const model = testModel();
	const reach = reachRadiusM(model);
	const grid = { model, pitchEastWestM: 10, pitchNorthSouthM: 9 };

	it('holds exactly what fits a square: the phase is chosen to hold the most', () => {
		// Free strip is 100 - 2 x 3.606 = 92.79 m: 10 columns at 10 m, 11 rows at 9 m.
		expect(fillPlot({ plot: testPlot({ boundary: square(100) }), ...grid })).toHaveLength(110);
	});

	it('keeps every reach circle inside, off holes and off obstacles, whatever the turn and stagger', () => {
		const plot = testPlot({
			boundary: square(120, [pond]),
			setBackM: 2,
			obstacles: [
				{
					id: 'b',
					kind: 'box',
					name: 'Barn',
					eastM: 90,
					northM: 90,
					sizeXM: 12,
					sizeYM: 8,
					heightM: 5,
					turnDeg: 30
				}
			]
		});
		for (const turnDeg of [0, 13, 90, 200]) {
			const points = fillPlot({ plot, ...grid, turnDeg, stagger: 0.5 });
			expect(points.length).toBeGreaterThan(60);
			for (const [x, y] of points) {
				expect(insideBoundary(plot.boundary, x, y)).toBe(true);
				for (const edge of boundaryEdges(plot.boundary)) {
					expect(segmentDistanceM(x, y, edge)).toBeGreaterThan(reach + 2 - 1e-6);
				}
				expect(Math.hypot(x - 90, y - 90)).toBeGreaterThan(reach + 4);
			}
			const layout = testLayout(points.map(([e, n], k) => testTracker(k, e, n)));
			expect(checkLayout(plot, layout).filter((f) => f.kind !== 'low-corner')).toEqual([]);
		}
	});

	it('goes by rows from the north, each from the west, and shifts every second row', () => {
		const points = fillPlot({ plot: testPlot({ boundary: square(60) }), ...grid, stagger: 0.5 });
		const rows = [...new Set(points.map((p) => p[1]))];
		expect(rows).toEqual([...rows].sort((a, b) => b - a));
		const first = points.filter((p) => p[1] === rows[0])[0][0];
		const second = points.filter((p) => p[1] === rows[1])[0][0];
		expect(Math.abs(first - second)).toBeCloseTo(5, 9);
	});

	it('turns the grid clockwise', () => {
		const points = fillPlot({ plot: testPlot({ boundary: square(100) }), ...grid, turnDeg: 20 });
		const [a, b] = points.slice(3);
		// A row that ran east now runs 20 degrees south of east.
		expect((Math.atan2(b[1] - a[1], b[0] - a[0]) * 180) / Math.PI).toBeCloseTo(-20, 6);
	});

	it('is empty without a boundary or with a pitch of nothing, and obeys a limit', () => {
		expect(fillPlot({ plot: testPlot(), ...grid })).toEqual([]);
		expect(fillPlot({ plot: testPlot({ boundary: square(100) }), ...grid, pitchEastWestM: 0 })).toEqual([]);
		expect(fillPlot({ plot: testPlot({ boundary: square(100) }), ...grid, limit: 7 })).toHaveLength(7);
	});
});

describe('rows and tags', () => {
	it('spaces a row by pitch or by count', () => {
		expect(rowPoints([0, 0], [0, 30], { pitchM: 10 })).toEqual([
			[0, 0],
			[0, 10],
			[0, 20],
			[0, 30]
		]);
		expect(rowPoints([0, 0], [9, 0], { count: 4 })).toEqual([
			[0, 0],
			[3, 0],
			[6, 0],
			[9, 0]
		]);
	});

	it('letters rows from the north and numbers from the west, after the letters in use', () => {
		const points: PlanPoint[] = [
			[20, 0],
			[0, 10],
			[10, 10.4],
			[10, 0]
		];
		expect(nextTags([], points)).toEqual(['B02', 'A01', 'A02', 'B01']);
		expect(nextTags(['C07', 'gate'], points)).toEqual(['E02', 'D01', 'D02', 'E01']);
		expect([0, 23, 24, 47, 48, 599, 600].map(rowLetters)).toEqual(['A', 'Z', 'AA', 'AZ', 'BA', 'ZZ', 'AAA']);
	});
});

describe('row letters', () => {
	it('pass over I and O, which read as 1 and 0', () => {
		const letters = Array.from({ length: 700 }, (_, index) => rowLetters(index));
		expect(letters.slice(7, 15).join('')).toBe('HJKLMNPQ');
		expect(letters.filter((row) => /[IO]/.test(row))).toEqual([]);
		expect(new Set(letters).size).toBe(700);
	});

	it('go on after a row that was lettered I or O by hand, and after two letters', () => {
		expect(nextTags(['I03'], [[0, 0]])).toEqual(['J01']);
		expect(nextTags(['O01'], [[0, 0]])).toEqual(['P01']);
		expect(nextTags(['Z09'], [[0, 0]])).toEqual(['AA01']);
		expect(nextTags(['AH02'], [[0, 0]])).toEqual(['AJ01']);
	});
});

describe('checking a layout', () => {
	it('says who overlaps and by how much', () => {
		const layout = testLayout([testTracker(0, 0, 0), testTracker(1, 7, 0), testTracker(2, 30, 0)]);
		const overlap = checkLayout(testPlot({ boundary: [] }), layout).filter(
			(f) => f.kind === 'circles-overlap'
		);
		expect(overlap).toHaveLength(1);
		// Two circles of 3.606 m, 7 m apart.
		expect(overlap[0].message).toBe('A01 and A02: reach circles overlap by 0.21 m.');
	});

	it('finds set-backs broken at the fence and at a hole, and trackers outside', () => {
		const plot = testPlot({ boundary: square(100, [pond]), setBackM: 3 });
		const layout = testLayout([
			testTracker(0, 5, 50),
			testTracker(1, 50, 34),
			testTracker(2, 50, 50),
			testTracker(3, 20, 20),
			testTracker(4, 130, 20)
		]);
		const found = checkLayout(plot, layout).map((f) => [f.kind, f.trackerIds[0]]);
		expect(found).toEqual([
			['set-back', 't0'],
			['set-back', 't1'],
			['outside', 't2'],
			['outside', 't4']
		]);
	});

	it('finds tags used twice, low corners and a missing boundary', () => {
		const low = testModel({ axisHeightM: 2.2 });
		const layout = testLayout([testTracker(0, 0, 0), testTracker(1, 20, 0, { tag: 'A01' })], [low]);
		expect(checkLayout(testPlot(), layout).map((f) => f.kind)).toEqual([
			'double-tag',
			'no-boundary',
			'low-corner'
		]);
	});

	it('names the axis height that clears low corners, and that height does', () => {
		const low = testModel({ axisHeightM: 2.2 });
		const plot = testPlot({ ground: { kind: 'plane', heightM: 0, risePercent: 9, riseTowardsDeg: 90 } });
		const layout = testLayout([testTracker(0, 0, 0), testTracker(1, 20, 0)], [low]);
		const cornerOf = (axisHeightM: number | null) =>
			checkLayout(plot, {
				...layout,
				trackers: layout.trackers.map((tracker) => ({ ...tracker, axisHeightM }))
			}).find((finding) => finding.kind === 'low-corner');
		const finding = cornerOf(null);
		const clearing = finding?.clearAxisM ?? NaN;
		expect(finding?.trackerIds).toEqual(['t0', 't1']);
		expect(finding?.message).toContain(`raise the axis to ${clearing.toFixed(2)} m`);
		expect(cornerOf(clearing)).toBeUndefined();
		// In steps of five centimetres: the step below does not clear.
		expect(cornerOf(clearing - 0.05)).toBeDefined();
	});

	it('agrees with asking every pair and every edge', () => {
		const trackers = Array.from({ length: 400 }, (_, k) =>
			testTracker(k, (k * 37.7) % 140, (k * 53.3) % 131, { tag: `X${k}` })
		);
		const plot = testPlot({ boundary: square(135, [pond]), setBackM: 1 });
		const reach = reachRadiusM(testModel());
		let pairs = 0;
		trackers.forEach((a, i) =>
			trackers.slice(i + 1).forEach((b) => {
				if (Math.hypot(a.eastM - b.eastM, a.northM - b.northM) < 2 * reach - 0.001) pairs++;
			})
		);
		const near = trackers.filter(
			(t) =>
				insideBoundary(plot.boundary, t.eastM, t.northM) &&
				boundaryEdges(plot.boundary).some((e) => segmentDistanceM(t.eastM, t.northM, e) < reach + 1 - 0.001)
		).length;
		const found = checkLayout(plot, testLayout(trackers));
		expect(pairs).toBeGreaterThan(10);
		expect(found.filter((f) => f.kind === 'circles-overlap')).toHaveLength(pairs);
		expect(found.filter((f) => f.kind === 'set-back')).toHaveLength(near);
	});
});

describe('obstacles within reach', () => {
	// Reach 3.606 m, corners from 1 m to 5 m above the foot.
	const met = (obstacle: Obstacle, trackers = [testTracker(0, 0, 0)], ground?: Plot['ground']) =>
		checkLayout(testPlot({ obstacles: [obstacle], ...(ground && { ground }) }), testLayout(trackers)).filter(
			({ kind }) => kind === 'meets-obstacle'
		);
	const barn = (eastM: number, heightM: number): Obstacle => ({
		id: 'b',
		kind: 'box',
		name: 'Barn',
		eastM,
		northM: 0,
		sizeXM: 4,
		sizeYM: 8,
		heightM,
		turnDeg: 0
	});
	const tree = (eastM: number, crownBaseM: number): Obstacle => ({
		id: 't',
		kind: 'tree',
		name: 'Oak',
		eastM,
		northM: 0,
		heightM: 12,
		crownBaseM,
		crownRadiusM: 3,
		trunkRadiusM: 0.4,
		crownTransmission: 0.2,
		growthMPerYear: 0,
		maxHeightM: 12
	});

	it('names tracker and obstacle, and by how much', () => {
		const [finding] = met(barn(5, 3));
		// The barn's side is 3 m away.
		expect(finding.message).toBe('A01: its reach circle meets Barn by 0.61 m.');
		expect(finding.amountM).toBeCloseTo(Math.hypot(3, 2) - 3, 9);
		expect(finding.trackerIds).toEqual(['t0']);
		expect(met(barn(5.61, 3))).toEqual([]);
	});

	it('passes over what stays below the lowest corner, unless the pole stands in it', () => {
		expect(met(barn(5, 0.9))).toEqual([]);
		expect(met(barn(5, 1.1))).toHaveLength(1);
		expect(met(barn(1, 0.9))[0].message).toContain('A01 stands inside Barn');
		// Half a metre lower, the same kerb reaches the corners no more.
		const falling: Plot['ground'] = { kind: 'plane', heightM: 0, risePercent: 10, riseTowardsDeg: 270 };
		expect(met(barn(5, 1.1), undefined, falling)).toEqual([]);
	});

	it('meets a crown that hangs lower than the machine stands, else the trunk alone', () => {
		expect(met(tree(6, 4.9))[0].message).toContain('the crown of Oak by 0.61 m');
		expect(met(tree(6, 5.1))).toEqual([]);
		expect(met(tree(3, 5.1))[0].message).toContain('the trunk of Oak by 1.01 m');
	});

	it('meets walls, masts and buildings', () => {
		const at = { id: 'o', name: 'It', eastM: 0, northM: 3, heightM: 2 };
		const line: PlanPoint[] = [
			[-40, 0],
			[40, 0]
		];
		expect(met({ ...at, kind: 'wall', line, thicknessM: 0.2, transmission: 0 })[0].amountM).toBeCloseTo(
			Math.hypot(3, 2) - 2.9,
			6
		);
		expect(met({ ...at, kind: 'mast', radiusM: 0.1 })[0].amountM).toBeCloseTo(Math.hypot(3, 2) - 2.9, 9);
		const corners: PlanPoint[] = [
			[-5, 0],
			[5, 0],
			[5, 6],
			[-5, 6]
		];
		expect(met({ ...at, kind: 'building', corners, roof: { kind: 'flat' } })[0].amountM).toBeCloseTo(
			Math.hypot(3, 2) - 3,
			9
		);
	});

	it('agrees with asking every tracker', () => {
		const trackers = Array.from({ length: 2000 }, (_, k) =>
			testTracker(k, (k * 37.7) % 140, (k * 53.3) % 131, { tag: `X${k}` })
		);
		const reach = Math.hypot(3, 2);
		const near = trackers.filter(
			({ eastM, northM }) =>
				Math.hypot(Math.max(0, Math.abs(eastM - 60) - 2), Math.max(0, Math.abs(northM) - 4)) < reach - 0.001
		);
		expect(near.length).toBeGreaterThan(2);
		expect(met(barn(60, 4), trackers).flatMap(({ trackerIds }) => trackerIds)).toEqual(
			near.map(({ id }) => id)
		);
	});
});

describe('a straight piece across the land', () => {
	it('is kept where it lies on land, without holes and the outside', () => {
		const boundary = square(100, [pond]);
		const at = (points: PlanPoint[][]) => points.map((pair) => pair.map(([e]) => e));
		// The pond leaves out its own width.
		const [west, , east] = [Math.min(...pond.map((p) => p[0])), 0, Math.max(...pond.map((p) => p[0]))];
		const north = (Math.min(...pond.map((p) => p[1])) + Math.max(...pond.map((p) => p[1]))) / 2;
		const found = at(stretchesOnLand(boundary, [-20, north], [130, north]));
		expect(found).toHaveLength(2);
		expect(found.flat()[0]).toBeCloseTo(0, 9);
		expect(found.flat()[1]).toBeCloseTo(west, 9);
		expect(found.flat()[2]).toBeCloseTo(east, 9);
		expect(found.flat()[3]).toBeCloseTo(100, 9);
		expect(stretchesOnLand(boundary, [1, 1], [2, 1])).toEqual([
			[
				[1, 1],
				[2, 1]
			]
		]);
		expect(stretchesOnLand(boundary, [-9, 1], [-2, 1])).toEqual([]);
	});
});

describe('uneven ground', () => {
	it('is looked at tracker by tracker: steep feet and low corners are those of the trackers that have them', () => {
		const bank: Plot['ground'] = {
			kind: 'points',
			points: [-50, 50].flatMap((n): [number, number, number][] => [
				[-60, n, 0],
				[0, n, 0],
				[30, n, 7.5],
				[60, n, 7.5]
			])
		};
		const layout = testLayout([testTracker(0, -30, 0), testTracker(1, 15, 0), testTracker(2, 46, 0)]);
		const found = checkLayout(testPlot({ ground: bank }), layout);
		const steep = found.find((finding) => finding.kind === 'steep-ground');
		expect(steep?.trackerIds).toEqual(['t1']);
		expect(steep?.message).toContain('A02 stands on ground that falls up to 25 %');
		expect(found.find((finding) => finding.kind === 'low-corner')?.trackerIds).toEqual(['t1']);
	});

	it('is no finding at 15 % and is one above', () => {
		const plane = (risePercent: number) =>
			testPlot({ ground: { kind: 'plane', heightM: 0, risePercent, riseTowardsDeg: 30 } });
		const kinds = (risePercent: number) =>
			checkLayout(plane(risePercent), testLayout([testTracker(0, 0, 0)])).map(({ kind }) => kind);
		expect(kinds(15)).not.toContain('steep-ground');
		expect(kinds(15.1)).toContain('steep-ground');
	});
});

describe('areas', () => {
	it('takes holes out of the land, and the slot out of the glass', () => {
		const boundary = square(100, [pond]);
		expect(boundaryAreaM2(boundary)).toBe(9600);
		expect(boundaryPerimeterM(boundary)).toBe(480);
		const layout = testLayout([testTracker(0, 10, 10)], [testModel({ centreGapM: 1 })]);
		expect(groundCover(testPlot({ boundary }), layout)).toBeCloseTo(20 / 9600, 12);
		expect(groundCover(testPlot(), layout)).toBeNull();
	});
});
