import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { delaunay } from './delaunay';
import { insideCircle, orientation } from './whole-number-tests';

function arrays(points: [number, number][]): [Float64Array, Float64Array] {
	const once = [...new Map(points.map((p) => [p.join(' '), p])).values()];
	return [Float64Array.from(once, (p) => p[0]), Float64Array.from(once, (p) => p[1])];
}

/** Twice the area of the convex hull, by gift wrapping over the points. */
function hullArea2(x: Float64Array, y: Float64Array): number {
	const order = Array.from(x, (_, i) => i).sort((a, b) => x[a] - x[b] || y[a] - y[b]);
	const half = (list: number[]) => {
		const chain: number[] = [];
		for (const p of list) {
			while (
				chain.length > 1 &&
				orientation(x[chain.at(-2)!], y[chain.at(-2)!], x[chain.at(-1)!], y[chain.at(-1)!], x[p], y[p]) <= 0
			)
				chain.pop();
			chain.push(p);
		}
		return chain.slice(0, -1);
	};
	const hull = [...half(order), ...half(order.reverse())];
	let sum = 0;
	for (let k = 1; k + 1 < hull.length; k++)
		sum += orientation(x[hull[0]], y[hull[0]], x[hull[k]], y[hull[k]], x[hull[k + 1]], y[hull[k + 1]]);
	return sum;
}

function checkTriangulation(x: Float64Array, y: Float64Array) {
	const { corners, across, outline } = delaunay(x, y);
	const count = corners.length / 3;
	let area2 = 0;
	const used = new Set<number>();
	for (let t = 0; t < count; t++) {
		const [a, b, c] = corners.subarray(3 * t, 3 * t + 3);
		const twice = orientation(x[a], y[a], x[b], y[b], x[c], y[c]);
		expect(twice).toBeGreaterThan(0);
		area2 += twice;
		for (const p of [a, b, c]) used.add(p);
		for (let p = 0; p < x.length; p++)
			if (p !== a && p !== b && p !== c)
				expect(insideCircle(x[a], y[a], x[b], y[b], x[c], y[c], x[p], y[p])).toBe(false);
		for (let k = 0; k < 3; k++) {
			const beyond = across[3 * t + k];
			if (beyond < 0) continue;
			const back = [0, 1, 2].filter((j) => across[3 * beyond + j] === t);
			expect(back).toHaveLength(1);
		}
	}
	if (count > 0) {
		expect(area2).toBe(hullArea2(x, y));
		expect(used.size).toBe(x.length);
		expect(outline.length).toBeGreaterThanOrEqual(6);
	} else expect(hullArea2(x, y)).toBe(0);
	return count;
}

describe('triangles between points', () => {
	it('leave every circle empty and cover the hull, for any points', () => {
		const spread = fc.integer({ min: -20_000_000, max: 20_000_000 });
		const crowded = fc.integer({ min: -6, max: 6 });
		for (const along of [spread, crowded]) {
			fc.assert(
				fc.property(fc.array(fc.tuple(along, along), { maxLength: 40 }), (points) => {
					checkTriangulation(...arrays(points));
				}),
				{ numRuns: 150 }
			);
		}
	});

	it('bear points of one circle, of one grid and on one line', () => {
		const ring = [
			[65, 0],
			[63, 16],
			[60, 25],
			[56, 33],
			[52, 39],
			[39, 52],
			[33, 56],
			[25, 60],
			[16, 63],
			[0, 65]
		];
		const circle = ring.flatMap(([a, b]): [number, number][] => [
			[a * 1e5, b * 1e5],
			[-a * 1e5, b * 1e5],
			[a * 1e5, -b * 1e5],
			[-a * 1e5, -b * 1e5]
		]);
		const onCircle = arrays(circle);
		expect(checkTriangulation(...onCircle)).toBe(onCircle[0].length - 2);
		const grid = Array.from({ length: 144 }, (_, k): [number, number] => [
			(k % 12) * 10_000,
			Math.floor(k / 12) * 10_000
		]);
		expect(checkTriangulation(...arrays(grid))).toBe(2 * 121);
		const line = Array.from({ length: 30 }, (_, k): [number, number] => [k * 300, k * 700]);
		expect(checkTriangulation(...arrays(line))).toBe(0);
		expect(checkTriangulation(...arrays([...line, [5, 0]]))).toBe(29);
		expect(checkTriangulation(...arrays([[1, 2]]))).toBe(0);
	});

	it('give the same triangles for the same points', () => {
		const points = Array.from({ length: 500 }, (_, k): [number, number] => [
			(k * 7919) % 10007,
			(k * 104729) % 10009
		]);
		expect(delaunay(...arrays(points))).toEqual(delaunay(...arrays(points)));
	});
});
