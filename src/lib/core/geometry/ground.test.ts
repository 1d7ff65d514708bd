import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Ground, GroundPoint } from '../document';
import { groundHeightM, groundSlope, groundSlopeWithin, groundSurface, steepestRise } from './ground';
import { filledHeights } from './raster-surface';

const millimetre = (value: number) => Math.round(value * 1000) / 1000;
/** A scatter without any order, the same every time. */
const scatter = (count: number, spanM: number): [number, number][] =>
	Array.from({ length: count }, (_, k) => [
		millimetre((((k * 7919 + 13) % 10007) / 10007 - 0.5) * spanM),
		millimetre((((k * 6311 + 71) % 9973) / 9973 - 0.5) * spanM)
	]);
const measured = (count: number, spanM: number, height: (e: number, n: number) => number): Ground => ({
	kind: 'points',
	points: scatter(count, spanM).map(([e, n]): GroundPoint => [e, n, height(e, n)])
});
const raster = (
	columns: number,
	rows: number,
	cellM: number,
	height: (e: number, n: number) => number | null
): Ground & { kind: 'raster' } => ({
	kind: 'raster',
	westM: -40,
	southM: -30,
	cellM,
	columns,
	rows,
	heightsM: Array.from({ length: columns * rows }, (_, k) =>
		height(-40 + (k % columns) * cellM, -30 + Math.floor(k / columns) * cellM)
	)
});
const slope = (e: number, n: number) => 12 + 0.08 * e - 0.03 * n;
const bowl = (e: number, n: number) => 0.002 * (e * e + 0.5 * n * n);

describe('ground from points', () => {
	it('gives a plane back everywhere inside its outline, with its slope and aspect', () => {
		const ground = measured(300, 200, slope);
		for (const [e, n] of scatter(150, 150)) {
			expect(groundHeightM(ground, e, n)).toBeCloseTo(slope(e, n), 9);
			const { gradient, aspectDeg } = groundSlope(ground, e, n);
			expect(gradient).toBeCloseTo(Math.hypot(0.08, 0.03), 9);
			// Falls towards west and north: 360 - atan(0.08 / 0.03).
			expect(aspectDeg).toBeCloseTo(360 - (Math.atan2(0.08, 0.03) * 180) / Math.PI, 6);
		}
		const within = groundSlopeWithin(ground, 5, -7, 4);
		expect(within.gradient).toBeCloseTo(Math.hypot(0.08, 0.03), 9);
		expect(steepestRise(ground, 5, -7, 4)).toBeCloseTo(Math.hypot(0.08, 0.03), 3);
	});

	it('stays within the sagitta of a paraboloid: never under it, over it by at most curvature x longest side^2 / 8', () => {
		const ground = measured(4000, 200, bowl);
		const { corners, points } = groundSurface(ground).mesh();
		let longest = 0;
		for (let t = 0; t < corners.length; t += 3)
			for (let k = 0; k < 3; k++) {
				const [a, b] = [corners[t + k], corners[t + ((k + 1) % 3)]];
				const [e, n] = [(points[3 * a] + points[3 * b]) / 2, (points[3 * a + 1] + points[3 * b + 1]) / 2];
				if (Math.hypot(e, n) < 90)
					longest = Math.max(
						longest,
						Math.hypot(points[3 * a] - points[3 * b], points[3 * a + 1] - points[3 * b + 1])
					);
			}
		for (const [e, n] of scatter(400, 120)) {
			const over = groundHeightM(ground, e, n) - bowl(e, n);
			expect(over).toBeGreaterThan(-1e-9);
			// Inside a triangle the bound is that of its circle: side^2 / 6 covers obtuse ones as well.
			expect(over).toBeLessThan((0.004 * longest * longest) / 6);
		}
	});

	it('holds the height of the nearest edge beyond the outline', () => {
		const ground: Ground = {
			kind: 'points',
			points: [
				[0, 0, 1],
				[10, 0, 3],
				[10, 10, 3],
				[0, 10, 1]
			]
		};
		expect(groundHeightM(ground, 4, -50)).toBeCloseTo(1.8, 12);
		expect(groundHeightM(ground, 90, 5)).toBeCloseTo(3, 12);
		expect(groundHeightM(ground, -5, 200)).toBeCloseTo(1, 12);
		expect(groundSlope(ground, 4, -50).gradient).toBeCloseTo(0.2, 6);
	});

	it('takes points twice, on one line and alone', () => {
		const line: Ground = {
			kind: 'points',
			points: [
				[0, 0, 0],
				[10, 10, 2],
				[5, 5, 1],
				[5, 5, 3]
			]
		};
		expect(groundHeightM(line, 5, 5)).toBe(2);
		expect(groundHeightM(line, 8, 2)).toBe(2);
		expect(groundHeightM(line, 40, 40)).toBe(2);
		expect(groundHeightM({ kind: 'points', points: [[3, 4, 5]] }, -9, 9)).toBe(5);
	});

	it('never leaves the range of its heights, whatever the points', () => {
		const at = fc.integer({ min: -20, max: 20 });
		fc.assert(
			fc.property(
				fc.array(fc.tuple(at, at, fc.integer({ min: -5, max: 5 })), { minLength: 1, maxLength: 30 }),
				fc.tuple(
					fc.double({ min: -30, max: 30, noNaN: true }),
					fc.double({ min: -30, max: 30, noNaN: true })
				),
				(points, [e, n]) => {
					const heights = points.map((p) => p[2]);
					const height = groundHeightM({ kind: 'points', points }, e, n);
					expect(height).toBeGreaterThanOrEqual(Math.min(...heights) - 1e-9);
					expect(height).toBeLessThanOrEqual(Math.max(...heights) + 1e-9);
				}
			),
			{ numRuns: 500 }
		);
	});
});

describe('ground from a raster', () => {
	it('is bilinear: planes and products come back exactly', () => {
		const product = (e: number, n: number) => 2 + 0.03 * e - 0.02 * n + 0.001 * e * n;
		const ground = raster(17, 13, 5, product);
		for (const [e, n] of scatter(100, 55)) {
			expect(groundHeightM(ground, e, n)).toBeCloseTo(product(e, n), 9);
		}
		expect(groundHeightM(raster(17, 13, 5, slope), -300, 0)).toBeCloseTo(slope(-40, 0), 9);
		expect(groundSlope(raster(17, 13, 5, slope), 3, 4).gradient).toBeCloseTo(Math.hypot(0.08, 0.03), 9);
	});

	it('fills gaps from the ground around them', () => {
		const holed = raster(17, 13, 5, (e, n) => (Math.hypot(e - 10, n) < 12 ? null : slope(e, n)));
		const heights = filledHeights(holed);
		expect(holed.heightsM.filter((h) => h === null).length).toBeGreaterThan(5);
		expect(heights.every(Number.isFinite)).toBe(true);
		// Nearest known heights bound what a mean of neighbours can be.
		for (let k = 0; k < heights.length; k++) {
			const e = -40 + (k % 17) * 5;
			const n = -30 + Math.floor(k / 17) * 5;
			expect(Math.abs(heights[k] - slope(e, n))).toBeLessThan(0.0855 * 12);
		}
		const island = raster(4, 4, 5, (e, n) => (e === -40 && n === -30 ? 7 : null));
		expect([...filledHeights(island)]).toEqual(new Array(16).fill(7));
	});
});
