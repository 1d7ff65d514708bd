import { describe, expect, it } from 'vitest';
import type { PlanPoint } from '../core';
import { insetLines } from './inset-lines';
import { chooseReduction, MapFrame } from './map-scale';
import { mountDimensions, mountInWords } from './mount-words';
import { scaleBarStepM } from './symbols';
import { checkSums } from './check-sums';
import { arcHolds } from './stops-picture';
import { modelLibrary } from '../schema';
import { inventedPlan } from '../../../tests/fixtures/invented-field';

const square: PlanPoint[] = [
	[0, 0],
	[10, 0],
	[10, 10],
	[0, 10]
];
const length = (pieces: { from: PlanPoint; to: PlanPoint }[]) =>
	pieces.reduce((sum, { from, to }) => sum + Math.hypot(to[0] - from[0], to[1] - from[1]), 0);

describe('the set-back line', () => {
	it('of a square is the smaller square', () => {
		const pieces = insetLines([{ outer: square, holes: [] }], 2);
		expect(length(pieces)).toBeCloseTo(24, 9);
		for (const { from } of pieces) for (const v of from) expect(v).toBeGreaterThanOrEqual(2 - 1e-9);
	});

	it('vanishes where the land is too narrow', () => {
		expect(insetLines([{ outer: square, holes: [] }], 5.1)).toEqual([]);
	});

	it('goes round an inward corner on an arc', () => {
		const bent: PlanPoint[] = [
			[0, 0],
			[20, 0],
			[20, 10],
			[10, 10],
			[10, 20],
			[0, 20]
		];
		const pieces = insetLines([{ outer: bent, holes: [] }], 2);
		// 16 + 6 + 8 + quarter circle of radius 2 + 8 + 6 + 16, by hand.
		expect(length(pieces)).toBeCloseTo(60 + Math.PI, 2);
	});

	it('keeps its distance from a hole as well', () => {
		const hole: PlanPoint[] = [
			[4, 4],
			[4, 6],
			[6, 6],
			[6, 4]
		];
		const pieces = insetLines([{ outer: square, holes: [hole] }], 1);
		// Outer 8 x 4 sides; about the hole 4 sides of 2 and a whole circle of radius 1.
		expect(length(pieces)).toBeCloseTo(32 + 8 + 2 * Math.PI, 1);
	});
});

describe('scale', () => {
	it('is the largest of ISO 5455 that fits, and 1:250 is not one', () => {
		expect(chooseReduction([100, 50], [300, 230], 100)).toBe(500);
		expect(chooseReduction([60, 46], [300, 230], 100)).toBe(200);
		expect(chooseReduction([60.1, 46], [300, 230], 100)).toBe(500);
		expect(chooseReduction([1, 1], [300, 230], 100)).toBe(100);
	});

	it('puts the grid on the paper exactly, north up', () => {
		const window = { xMm: 20, yMm: 10, widthMm: 300, heightMm: 200 };
		const map = new MapFrame(window, { minEastM: -10, maxEastM: 10, minNorthM: -10, maxNorthM: 10 }, 500);
		expect(map.toPaper([0, 0])).toEqual([170, 110]);
		expect(map.toPaper([10, 10])).toEqual([190, 90]);
	});

	it('bars have round steps of 10 to 25 mm', () => {
		for (const reduction of [100, 200, 500, 1000, 2000, 5000, 10_000]) {
			const stepMm = (scaleBarStepM(reduction) * 1000) / reduction;
			expect(stepMm).toBeGreaterThanOrEqual(10 - 1e-9);
			expect(stepMm).toBeLessThanOrEqual(25);
		}
	});
});

describe('words of the sheets', () => {
	const model = { ...modelLibrary[1], widthM: 6, heightM: 4 };

	it('measure a mount from the nearer named side and from the top, seen facing the glass', () => {
		const top = mountDimensions({ edge: 'top', alongM: 0.6, outM: 0.08, forwardM: 0.03 }, model);
		expect(top.side).toBe('right');
		expect(top.fromSideM).toBeCloseTo(2.4, 12);
		expect(top.fromTopM).toBeCloseTo(-0.08, 12);
		const left = mountDimensions({ edge: 'left', alongM: -1, outM: 0.1, forwardM: 0 }, model);
		expect(left.side).toBe('left');
		expect(left.fromSideM).toBeCloseTo(-0.1, 12);
		expect(left.fromTopM).toBeCloseTo(3, 12);
		expect(mountInWords({ edge: 'top', alongM: 0.6, outM: 0.08, forwardM: 0.03 }, model)).toBe(
			'top edge, 2400 from the right side, 80 beyond the edge, 30 ahead of the glass (mm)'
		);
	});

	it('sum the printed figures to the millimetre', () => {
		const rows = inventedPlan(3, 1).rows.map((row, i) => ({ ...row, eastM: 0.1004 + i, northM: 1 / 3 }));
		// Printed 0.100, 1.100, 2.100 and three times 0.333.
		expect(checkSums(rows)).toEqual({ count: 3, eastM: 3.3, northM: 0.999 });
	});

	it('know a stop arc that passes through north', () => {
		// Common practice, no source: the sector 240 to 120 holds 350, 0 and 10, and not 180.
		const arc = { fromDeg: 240, toDeg: 120 };
		expect([350, 0, 10].every((bearing) => arcHolds(arc, bearing))).toBe(true);
		expect(arcHolds(arc, 180)).toBe(false);
	});
});
