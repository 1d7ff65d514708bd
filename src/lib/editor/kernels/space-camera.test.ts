import { describe, expect, it } from 'vitest';
import type { BoundaryPart, Vec3 } from '$lib/core';
import { contourLines } from './contours';
import { groundPlane } from './ground-shadow';
import { rayToGround } from './ray-pick';
import { fitBeside, fitPoints, project, rayAt, slideBy, turnBy, type SpaceCamera } from './space-camera';

const camera: SpaceCamera = {
	target: [10, 20, 0],
	headingDeg: 25,
	pitchDeg: 35,
	distanceM: 80,
	parallel: false,
	widthPx: 900,
	heightPx: 600
};
const level = groundPlane({ kind: 'level', heightM: 0 });

describe('the camera in space', () => {
	it('shows its target in the middle', () => {
		const [x, y] = project(camera, [10, 20, 0])!;
		expect(x).toBeCloseTo(450, 9);
		expect(y).toBeCloseTo(300, 9);
	});

	it.each([true, false])('fits points beside a card (parallel: %s)', (parallel) => {
		const feet: Vec3[] = [
			[-60, -20, 0],
			[60, -20, 0],
			[60, 20, 0],
			[-60, 20, 0]
		];
		const fitted = fitBeside({ ...camera, parallel }, feet, 0.1, { leftPx: 20, rightPx: 320 });
		expect(fitted.widthPx).toBe(900);
		for (const foot of feet) {
			const [x] = project(fitted, foot)!;
			expect(x).toBeGreaterThan(20);
			expect(x).toBeLessThan(580);
		}
	});

	it('looks north with east to the right and up above', () => {
		const north = { ...camera, headingDeg: 0 };
		expect(project(north, [12, 20, 0])![0]).toBeGreaterThan(450);
		expect(project(north, [10, 20, 2])![1]).toBeLessThan(300);
		expect(project(north, [10, 30, 0])![1]).toBeLessThan(300);
	});

	it.each([false, true])('sends a ray through a pixel back to the same pixel (parallel: %s)', (parallel) => {
		const look = { ...camera, parallel };
		const { origin, direction } = rayAt(look, 640, 410);
		const ground = rayToGround(origin, direction, level)!;
		const [x, y] = project(look, ground)!;
		expect(x).toBeCloseTo(640, 6);
		expect(y).toBeCloseTo(410, 6);
	});

	it('shows nothing that is behind the eye', () => {
		expect(project(camera, [10, -500, 200])).toBeNull();
	});

	it('holds its tilt between the level and straight down', () => {
		expect(turnBy(camera, 0, 10_000).pitchDeg).toBeLessThan(90);
		expect(turnBy(camera, 0, -10_000).pitchDeg).toBeGreaterThan(0);
		expect(turnBy(camera, 5000, 0).headingDeg).toBeLessThan(360);
	});

	it('lets the ground follow the pointer when it slides', () => {
		const down = { ...camera, pitchDeg: 89.9, headingDeg: 0 };
		const [x, y] = project(slideBy(down, 60, -30), [10, 20, 0])!;
		expect(x).toBeCloseTo(510, 0);
		expect(y).toBeCloseTo(270, 0);
	});

	it('fits all points into the picture', () => {
		const points: Vec3[] = [
			[-50, 0, 0],
			[120, 40, 3],
			[30, 90, 12],
			[0, 0, 0]
		];
		const fitted = fitPoints(camera, points);
		for (const point of points) {
			const [x, y] = project(fitted, point)!;
			expect(x).toBeGreaterThan(0);
			expect(x).toBeLessThan(900);
			expect(y).toBeGreaterThan(0);
			expect(y).toBeLessThan(600);
		}
	});
});

describe('contour lines', () => {
	const square: BoundaryPart = {
		outer: [
			[0, 0],
			[100, 0],
			[100, 50],
			[0, 50]
		],
		holes: []
	};

	it('run across the rise, one for each metre of height', () => {
		const lines = contourLines({ kind: 'plane', heightM: 5, risePercent: 9, riseTowardsDeg: 90 }, [square]);
		// 100 m at 9 % rise 9 m: the lines at 0 (on the west edge) to 8 m, and 9 m falls on the east edge.
		expect(lines.length).toBeGreaterThanOrEqual(8);
		expect(lines.length).toBeLessThanOrEqual(10);
		for (const [from, to] of lines) {
			expect(from[0]).toBeCloseTo(to[0], 9);
			expect(Math.abs(from[1] - to[1])).toBeCloseTo(50, 9);
		}
	});

	it('are none on level ground', () => {
		expect(contourLines({ kind: 'level', heightM: 3 }, [square])).toEqual([]);
	});
});
