import type { PlanPoint } from '../core/document';

/** Corners within this distance count as one, metres. */
const SAME_POINT_M = 1e-6;

/** Twice the signed area of an open ring, m²; counter-clockwise is positive. */
function doubleArea(ring: PlanPoint[]): number {
	let sum = 0;
	for (let i = 0, j = ring.length - 1; i < ring.length; j = i++) {
		sum += ring[j][0] * ring[i][1] - ring[i][0] * ring[j][1];
	}
	return sum;
}

/** The same ring with the direction asked for. */
export function turnedRing(ring: PlanPoint[], counterClockwise: boolean): PlanPoint[] {
	return doubleArea(ring) > 0 === counterClockwise ? ring : [...ring].reverse();
}

function side(a: PlanPoint, b: PlanPoint, c: PlanPoint): number {
	return (b[0] - a[0]) * (c[1] - a[1]) - (b[1] - a[1]) * (c[0] - a[0]);
}

/** True when the segments pass through each other at an inner point of both. */
function segmentsCross(a: PlanPoint, b: PlanPoint, c: PlanPoint, d: PlanPoint): boolean {
	return side(a, b, c) * side(a, b, d) < 0 && side(c, d, a) * side(c, d, b) < 0;
}

/** Corner numbers (from 1) of the first pair of edges that cross, or null. Sweeps edges by their west end. */
export function firstCrossing(ring: PlanPoint[]): [number, number] | null {
	const edges = ring.map((from, index) => {
		const to = ring[(index + 1) % ring.length];
		return { index, from, to, west: Math.min(from[0], to[0]), east: Math.max(from[0], to[0]) };
	});
	edges.sort((p, q) => p.west - q.west);
	for (let i = 0; i < edges.length; i += 1) {
		const one = edges[i];
		for (let j = i + 1; j < edges.length && edges[j].west <= one.east; j += 1) {
			if (segmentsCross(one.from, one.to, edges[j].from, edges[j].to)) {
				return [one.index + 1, edges[j].index + 1];
			}
		}
	}
	return null;
}

/**
 * Why an open ring cannot bound land, in a sentence with the remedy, or null when it can. Corners in metres.
 */
export function ringProblem(ring: PlanPoint[]): string | null {
	if (ring.length < 3) return 'A ring needs at least three corners.';
	for (let i = 0; i < ring.length; i += 1) {
		const next = ring[(i + 1) % ring.length];
		if (Math.hypot(next[0] - ring[i][0], next[1] - ring[i][1]) < SAME_POINT_M) {
			return `Corners ${i + 1} and ${((i + 1) % ring.length) + 1} are the same point: take one out.`;
		}
	}
	if (Math.abs(doubleArea(ring)) < 0.02) return 'The ring encloses no area: move a corner.';
	const crossing = firstCrossing(ring);
	if (crossing) {
		return `The ring crosses itself: the edges that start at corners ${crossing[0]} and ${crossing[1]} meet. Move a corner so that no edges cross.`;
	}
	return null;
}
