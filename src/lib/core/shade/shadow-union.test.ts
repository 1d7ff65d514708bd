import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { LitPieces } from './pieces';
import { ShadowUnion } from './shadow-union';

const W = 3;
const H = 2;

/** Snapped coordinates bring edges that coincide and corners that touch. */
const coordinate = fc.oneof(
	fc.double({ min: -5, max: 5, noNaN: true }),
	fc.integer({ min: -8, max: 8 }).map((k) => k / 2)
);
const parallelogram = fc
	.tuple(coordinate, coordinate, coordinate, coordinate, coordinate, coordinate)
	.map(([x, y, ux, uy, vx, vy]) => [x, y, x + ux, y + uy, x + ux + vx, y + uy + vy, x + vx, y + vy]);
const rectangle = fc.tuple(coordinate, coordinate, coordinate, coordinate).map(([x, y, w, h]) => {
	const [a, b] = [Math.abs(w), Math.abs(h)];
	return [x - a, x + a, y - b, y + b];
});

/** Null where it has no area: such shadows are dropped before they are cut out. */
function counterClockwise(points: number[]): number[] | null {
	const twice =
		(points[2] - points[0]) * (points[5] - points[1]) - (points[4] - points[0]) * (points[3] - points[1]);
	if (Math.abs(twice) < 1e-12) return null;
	if (twice > 0) return points;
	return [0, 3, 2, 1].flatMap((k) => [points[2 * k], points[2 * k + 1]]);
}

describe('union of shadows on glass', () => {
	it('is what cutting them out one by one leaves', () => {
		const union = new ShadowUnion();
		const pieces = new LitPieces();
		fc.assert(
			fc.property(
				fc.array(rectangle, { maxLength: 4 }),
				fc.array(parallelogram, { maxLength: 9 }),
				(rectangles, others) => {
					union.begin(W, H);
					pieces.clear();
					pieces.addRect(-W, W, -H, H);
					for (const [x0, x1, y0, y1] of rectangles) {
						union.next.set([x0, x1, y0, y1]);
						union.addRect();
						if ((x1 - x0) * (y1 - y0) > 1e-12)
							pieces.subtract(Float64Array.from([x0, y0, x1, y0, x1, y1, x0, y1]), 4, 0);
					}
					union.endRects();
					for (const points of others) {
						union.next.set(points);
						union.add(4);
						const turned = counterClockwise(points);
						if (turned) pieces.subtract(Float64Array.from(turned), 4, 0);
					}
					expect(Math.abs(4 * W * H - pieces.litArea() - union.area())).toBeLessThan(1e-9);
				}
			),
			{ seed: 20261204, numRuns: 3000 }
		);
	}, 60_000);

	it('covers no more than the glass, and nothing without shadows', () => {
		const union = new ShadowUnion();
		union.begin(W, H);
		union.endRects();
		expect(union.area()).toBe(0);
		union.begin(W, H);
		union.next.set([-9, 9, -9, 9]);
		union.addRect();
		union.endRects();
		union.next.set([-9, -9, 9, -8, 8, 9, -8, 8]);
		union.add(4);
		expect(union.area()).toBe(4 * W * H);
	});
});
