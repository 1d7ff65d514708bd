import { describe, expect, it } from 'vitest';
import type { MountPlaceResult } from '$lib/core/results';
import { edgeCell, edgePoint, fitTable, nearestPlace, spacingOf } from './edge-cells';
import { boundaryPath, fitPlan, scaleBarM } from './plan-view';
import { stripTicks } from './strip-ticks';

const place = (edge: 'top' | 'bottom' | 'left' | 'right', alongM: number): MountPlaceResult => ({
	mount: { edge, alongM, outM: 0.08, forwardM: 0.03 },
	shadedHours: 0,
	shadedAbove5Hours: 0,
	blindHours: 0,
	longestBlindMinutes: 0,
	longestRunMinutes: 0,
	longestRunDate: null,
	runUpMeanMinutes: 0,
	runUpWorstMinutes: 0,
	blindByMonth: Array<number>(12).fill(0)
});

describe('a table seen facing the glass', () => {
	const frame = fitTable({ widthM: 6, heightM: 4 }, 700, 50);

	it('keeps its proportions', () => {
		expect(frame.width / frame.height).toBeCloseTo(1.5, 12);
	});

	it('has right of the middle on the right and above the middle up', () => {
		const middle = edgePoint({ edge: 'top', alongM: 0 }, frame);
		expect(edgePoint({ edge: 'top', alongM: 1 }, frame).x).toBeCloseTo(middle.x + frame.pxPerM, 9);
		expect(edgePoint({ edge: 'bottom', alongM: 1 }, frame).x).toBeGreaterThan(middle.x);
		const side = edgePoint({ edge: 'right', alongM: 1 }, frame);
		expect(side.x).toBeGreaterThan(edgePoint({ edge: 'left', alongM: 1 }, frame).x);
		expect(side.y).toBeLessThan(edgePoint({ edge: 'right', alongM: 0 }, frame).y);
		expect(edgePoint({ edge: 'top', alongM: 0 }, frame).y).toBeLessThan(
			edgePoint({ edge: 'bottom', alongM: 0 }, frame).y
		);
	});

	it('draws every cell outside the glass', () => {
		const top = edgeCell({ edge: 'top', alongM: 0 }, frame, 0.1, 8);
		expect(top.y + top.height).toBeLessThan(frame.y);
		const right = edgeCell({ edge: 'right', alongM: 0 }, frame, 0.1, 8);
		expect(right.x).toBeGreaterThan(frame.x + frame.width);
		const left = edgeCell({ edge: 'left', alongM: 0 }, frame, 0.1, 8);
		expect(left.x + left.width).toBeLessThan(frame.x);
		const bottom = edgeCell({ edge: 'bottom', alongM: 0 }, frame, 0.1, 8);
		expect(bottom.y).toBeGreaterThan(frame.y + frame.height);
	});

	it('finds the nearest candidate on the edge asked for', () => {
		const edges = {
			top: [place('top', -0.2), place('top', 0), place('top', 0.2)],
			bottom: [],
			left: [place('left', 0)],
			right: []
		};
		expect(nearestPlace(edges, { edge: 'top', alongM: 0.13 })?.mount.alongM).toBe(0.2);
		expect(nearestPlace(edges, { edge: 'bottom', alongM: 0 })).toBeNull();
		expect(spacingOf(edges.top)).toBeCloseTo(0.2, 12);
	});
});

describe('the plan', () => {
	it('has north up and east to the right, all points inside', () => {
		const view = fitPlan(
			[
				[0, 0],
				[100, 40]
			],
			500,
			{ leastPx: 100, mostPx: 400, marginPx: 20 }
		);
		expect(view.x(100)).toBeCloseTo(480, 9);
		expect(view.x(0)).toBeCloseTo(20, 9);
		expect(view.y(40)).toBeLessThan(view.y(0));
		expect(view.y(40)).toBeGreaterThanOrEqual(20 - 1e-9);
	});

	it('survives a field of one tracker or none', () => {
		for (const points of [[], [[5, 5]] as [number, number][]]) {
			const view = fitPlan(points, 300, { leastPx: 100, mostPx: 400, marginPx: 20 });
			expect(Number.isFinite(view.x(5)) && Number.isFinite(view.y(5)) && view.pxPerM > 0).toBe(true);
		}
	});

	it('writes rings with their holes', () => {
		const view = fitPlan(
			[
				[0, 0],
				[10, 10]
			],
			300,
			{ leastPx: 100, mostPx: 400, marginPx: 20 }
		);
		const path = boundaryPath(
			[
				{
					outer: [
						[0, 0],
						[10, 0],
						[10, 10]
					],
					holes: [
						[
							[4, 2],
							[6, 2],
							[6, 4]
						]
					]
				}
			],
			view
		);
		expect(path.match(/M/g)).toHaveLength(2);
		expect(path.match(/Z/g)).toHaveLength(2);
	});

	it('takes a round scale bar', () => {
		expect(scaleBarM(5, 140)).toBe(20);
		expect(scaleBarM(5, 260)).toBe(50);
		expect(scaleBarM(100, 90)).toBe(0.5);
	});
});

describe('the strip of a day', () => {
	it('labels whole hours, fewer where there is little room', () => {
		const from = Date.UTC(2026, 11, 21, 6, 40);
		const to = Date.UTC(2026, 11, 21, 15, 20);
		expect(stripTicks(from, to, 700)).toHaveLength(9);
		expect(stripTicks(from, to, 250).map((ms) => new Date(ms).getUTCHours())).toEqual([7, 10, 13]);
	});
});
