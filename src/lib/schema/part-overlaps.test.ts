import { describe, expect, it } from 'vitest';
import type { BoundaryPart, PlanPoint } from '../core/document';
import { overlapProblem, overlappingParts } from './part-overlaps';

const square = (east: number, north: number, size: number): PlanPoint[] => [
	[east, north],
	[east + size, north],
	[east + size, north + size],
	[east, north + size]
];
const part = (outer: PlanPoint[], ...holes: PlanPoint[][]): BoundaryPart => ({
	outer,
	holes: holes.map((hole) => hole.toReversed())
});

describe('land that is counted twice', () => {
	const first = part(square(0, 0, 50));

	it('is found where outlines cross, where one lies in another, and where both are the same', () => {
		expect(overlappingParts([first, part(square(30, 30, 50))])).toEqual([1, 2]);
		expect(overlappingParts([part(square(200, 0, 9)), first, part(square(10, 10, 5))])).toEqual([2, 3]);
		expect(overlappingParts([first, part(square(0, 0, 50))])).toEqual([1, 2]);
		const larger = part([...square(0, 0, 50).slice(0, 3), [25, 60], [0, 50]]);
		expect(overlappingParts([first, larger])).toEqual([1, 2]);
	});

	it('is not found in parcels side by side, on a slant too, nor on an island in a hole', () => {
		expect(overlappingParts([first, part(square(50, 0, 50)), part(square(50, 50, 20))])).toBeNull();
		const turned = (p: PlanPoint): PlanPoint => [p[0] * 0.8 - p[1] * 0.6, p[0] * 0.6 + p[1] * 0.8];
		const slant = [square(0, 0, 30), square(30, 7, 11), square(-13, 2, 13)].map((ring) =>
			part(ring.map(turned))
		);
		expect(overlappingParts(slant)).toBeNull();
		expect(
			overlappingParts([part(square(0, 0, 50), square(10, 10, 30)), part(square(20, 20, 10))])
		).toBeNull();
	});

	it('lets a fence be that was drawn twice, a few centimetres apart', () => {
		const beside: PlanPoint[] = [
			[49.97, 0],
			[90, 0],
			[90, 50],
			[50.02, 50]
		];
		expect(overlappingParts([first, part(beside)])).toBeNull();
		beside[0] = [49, 0];
		expect(overlappingParts([first, part(beside)])).toEqual([1, 2]);
	});

	it('is told with the parts or holes to look at', () => {
		expect(overlapProblem([first, part(square(30, 30, 50))])).toEqual({
			path: [1],
			message: 'Areas 1 and 2 overlap: take one out, or draw them apart.'
		});
		const holed = part(square(0, 0, 50), square(5, 5, 20), square(15, 15, 20));
		expect(overlapProblem([holed])).toEqual({
			path: [0, 'holes', 1],
			message: 'Holes 1 and 2 overlap: draw them as one hole.'
		});
		expect(overlapProblem([first, part(square(50, 0, 50))])).toBeNull();
	});
});
