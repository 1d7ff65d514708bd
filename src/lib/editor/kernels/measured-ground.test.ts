import { describe, expect, it } from 'vitest';
import { obstacleSolids, type BuildingObstacle, type Ground, type PlanPoint } from '$lib/core';
import { contourLines } from './contours';
import { drapedLine, drapedPolygons } from './drape';
import { groundPlane } from './ground-shadow';
import { rayToSurface } from './ray-pick';
import { solidFaces } from './solid-faces';

const bowl = (e: number, n: number) => 0.01 * (e * e + n * n);
const ground: Ground = {
	kind: 'raster',
	westM: -50,
	southM: -50,
	cellM: 2,
	columns: 51,
	rows: 51,
	heightsM: Array.from({ length: 51 * 51 }, (_, k) => bowl(-50 + 2 * (k % 51), -50 + 2 * Math.floor(k / 51)))
};
const area = (ring: readonly (readonly number[])[]) =>
	ring.reduce((sum, [x, y], k) => {
		const [u, v] = ring[(k + 1) % ring.length];
		return sum + (x * v - u * y) / 2;
	}, 0);

describe('drawing on uneven ground', () => {
	it('a draped polygon keeps its area and lies on the ground with every corner', () => {
		const triangle: PlanPoint[] = [
			[-20, -13],
			[31, 4],
			[2, 27]
		];
		const pieces = drapedPolygons(triangle, bowl, 3);
		expect(pieces.length).toBeGreaterThan(80);
		expect(pieces.reduce((sum, piece) => sum + area(piece), 0)).toBeCloseTo(area(triangle), 9);
		for (const [e, n, up] of pieces.flat()) expect(up).toBeCloseTo(bowl(e, n), 12);
		const line = drapedLine([0, 0], [10, 0], bowl, 3);
		expect(line).toHaveLength(5);
		expect(line[4]).toEqual([10, 0, 1]);
	});

	it('contours stay on the land', () => {
		const land = { outer: [[-30, -30], [30, -30], [30, 30], [-30, 30]] as PlanPoint[], holes: [] }; // prettier-ignore
		const lines = contourLines(ground, [land], 1);
		expect(lines.length).toBeGreaterThan(50);
		for (const [e, n] of lines.flat()) {
			expect(Math.max(Math.abs(e), Math.abs(n))).toBeLessThanOrEqual(30 + 1e-9);
			expect(Math.abs(bowl(e, n) - Math.round(bowl(e, n)))).toBeLessThan(0.03);
		}
	});

	it('a ray meets the ground where it is', () => {
		const planeAt = (at: PlanPoint) => groundPlane(ground, at);
		const hit = rayToSurface([40, -30, 60], [-0.5, 0.6, -0.8], planeAt, [0, 0])!;
		expect(hit[2]).toBeCloseTo(bowl(hit[0], hit[1]), 1);
		expect(rayToSurface([0, 0, 60], [0, 0, 1], planeAt, [0, 0])).toBeNull();
	});
});

describe('faces of a body', () => {
	it('of a barn with a ridge are floor, four walls and two roofs, with the area they should have', () => {
		const barn: BuildingObstacle = {
			id: 'b',
			kind: 'building',
			name: '',
			eastM: 0,
			northM: 0,
			corners: [
				[-5, -3],
				[5, -3],
				[5, 3],
				[-5, 3]
			],
			heightM: 4,
			roof: { kind: 'pitched', riseM: 4, ridgeDeg: 90 }
		};
		const [solid] = obstacleSolids(barn, { groundAt: () => 0, treeYears: 0, latitudeDeg: 45 }, 0);
		const faces = solidFaces(solid);
		expect(faces).toHaveLength(7);
		const size = (face: [number, number, number][]) => {
			const sum = [0, 0, 0];
			face.forEach((p, k) => {
				const q = face[(k + 1) % face.length];
				sum[0] += p[1] * q[2] - p[2] * q[1];
				sum[1] += p[2] * q[0] - p[0] * q[2];
				sum[2] += p[0] * q[1] - p[1] * q[0];
			});
			return Math.hypot(...sum) / 2;
		};
		// Floor 60, long walls 2 x 40, gables 2 x (24 + 12), roofs 2 x 10 x 5.
		expect(faces.reduce((sum, face) => sum + size(face), 0)).toBeCloseTo(60 + 80 + 72 + 100, 9);
	});
});
