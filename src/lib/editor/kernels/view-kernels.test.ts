import { describe, expect, it } from 'vitest';
import type { BoundaryPart } from '$lib/core';
import { fitBox, frameBox, panBy, toGround, toScreen, zoomAt, type PlanCamera } from './plan-camera';
import { setBackLine } from './set-back-line';

const camera: PlanCamera = { eastM: 10, northM: 20, pxPerM: 4, widthPx: 800, heightPx: 600 };

describe('the plan camera', () => {
	it('has north up and east to the right', () => {
		expect(toScreen(camera, [10, 20])).toEqual([400, 300]);
		expect(toScreen(camera, [11, 21])).toEqual([404, 296]);
		expect(toGround(camera, 404, 296)).toEqual([11, 21]);
	});

	it('zooms about the pointer', () => {
		const before = toGround(camera, 123, 456);
		const after = toGround(zoomAt(camera, 123, 456, 1.7), 123, 456);
		expect(after[0]).toBeCloseTo(before[0], 9);
		expect(after[1]).toBeCloseTo(before[1], 9);
	});

	it('moves the ground with the pointer', () => {
		const moved = panBy(camera, 40, -20);
		expect(toScreen(moved, [10, 20])).toEqual([440, 280]);
	});

	it('frames a pair near enough to be read, and a wide group whole', () => {
		const margins = { left: 100, right: 200, top: 60, bottom: 30 };
		const pair = { westM: 0, eastM: 7, southM: 0, northM: 0 };
		expect(frameBox({ ...camera, pxPerM: 2 }, pair, margins).pxPerM).toBeCloseTo(12, 9);
		// Whoever looks from nearer stays as near as the room allows.
		expect(frameBox({ ...camera, pxPerM: 15 }, pair, margins).pxPerM).toBeCloseTo(15, 9);
		const wide = { westM: 0, eastM: 200, southM: 0, northM: 40 };
		const framed = frameBox(camera, wide, margins);
		expect(toScreen(framed, [0, 0])[0]).toBeGreaterThan(100);
		expect(toScreen(framed, [200, 0])[0]).toBeLessThan(600);
		expect(toScreen(framed, [100, 20])[0]).toBeCloseTo(350, 6);
	});

	it('shows a box whole and inside the margins', () => {
		const margins = { left: 100, right: 20, top: 60, bottom: 30 };
		const fitted = fitBox(camera, { westM: -5, eastM: 55, southM: 0, northM: 80 }, margins);
		const [west, north] = toScreen(fitted, [-5, 80]);
		const [east, south] = toScreen(fitted, [55, 0]);
		expect(west).toBeGreaterThanOrEqual(100 - 1e-6);
		expect(north).toBeGreaterThanOrEqual(60 - 1e-6);
		expect(east).toBeLessThanOrEqual(780 + 1e-6);
		expect(south).toBeLessThanOrEqual(570 + 1e-6);
	});
});

describe('the set-back line', () => {
	const square: BoundaryPart = {
		outer: [
			[0, 0],
			[20, 0],
			[20, 20],
			[0, 20]
		],
		holes: []
	};

	it('runs inside at the set-back, never nearer to any edge', () => {
		const points = setBackLine(square, 3).flat();
		expect(points.length).toBeGreaterThan(50);
		for (const [east, north] of points) {
			const nearest = Math.min(east, 20 - east, north, 20 - north);
			expect(nearest).toBeCloseTo(3, 6);
		}
	});

	it('turns round the inner corner of an angle in an arc', () => {
		const angle: BoundaryPart = {
			outer: [
				[0, 0],
				[20, 0],
				[20, 10],
				[10, 10],
				[10, 20],
				[0, 20]
			],
			holes: []
		};
		const nearCorner = setBackLine(angle, 3)
			.flat()
			.filter(
				([east, north]) => east < 10 - 1e-6 && north < 10 - 1e-6 && Math.hypot(east - 10, north - 10) < 3.01
			);
		expect(nearCorner.length).toBeGreaterThan(4);
		for (const [east, north] of nearCorner) expect(Math.hypot(east - 10, north - 10)).toBeCloseTo(3, 6);
	});

	it('is empty when the set-back leaves nothing, or is 0', () => {
		expect(setBackLine(square, 11)).toEqual([]);
		expect(setBackLine(square, 0)).toEqual([]);
	});
});
