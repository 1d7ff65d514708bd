import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { PlanPoint } from '../document';
import { ringAreaM2 } from '../layout/polygon';
import { convexParts, counterClockwise, isConvex, ringCentre } from './convex-parts';

/** A ring around the origin with any radii: simple, mostly not convex. */
const star = (radii: readonly number[]): PlanPoint[] =>
	radii.map((r, k): PlanPoint => {
		const a = (2 * Math.PI * k) / radii.length;
		return [r * Math.cos(a), r * Math.sin(a)];
	});

describe('convex parts of a footprint', () => {
	it('cover it without overlap, whatever its shape and direction', () => {
		fc.assert(
			fc.property(
				fc.array(fc.double({ min: 1, max: 20, noNaN: true }), { minLength: 3, maxLength: 24 }),
				fc.boolean(),
				(radii, backwards) => {
					const ring = backwards ? star(radii).reverse() : star(radii);
					const parts = convexParts(ring);
					expect(parts.every(isConvex)).toBe(true);
					expect(parts.every((part) => ringAreaM2(part) > 0)).toBe(true);
					const sum = parts.reduce((area, part) => area + ringAreaM2(part), 0);
					expect(sum).toBeCloseTo(Math.abs(ringAreaM2(ring)), 6);
				}
			),
			{ numRuns: 300 }
		);
	});

	it('an L becomes two, a convex ring with corners in line stays whole', () => {
		const l: PlanPoint[] = [
			[0, 0],
			[10, 0],
			[10, 4],
			[4, 4],
			[4, 9],
			[0, 9]
		];
		expect(isConvex(l)).toBe(false);
		expect(convexParts(l)).toHaveLength(2);
		const barn: PlanPoint[] = [
			[0, 0],
			[5, 0],
			[10, 0],
			[10, 6],
			[0, 6]
		];
		expect(convexParts(barn)).toEqual([barn]);
		expect(counterClockwise([...barn].reverse())).toHaveLength(5);
		expect(ringCentre(barn)).toEqual([5, 3]);
	});
});
