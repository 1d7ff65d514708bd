import type { BoundaryPart, PlanPoint } from '../core/document';
import { crossing, insideRing, ringDistance } from './plot-checks';

/** Neighbouring parcels are seldom drawn to meet exactly: an overlap no deeper than this is none, metres. */
const SLIVER_M = 0.1;

/** Numbers (from 1) of two parts of a boundary that hold the same land, or null; parts may touch, and stand in another's hole. */
export function overlappingParts(parts: readonly BoundaryPart[]): [first: number, second: number] | null {
	return firstPair(parts, (a, b) => overlap(a, b));
}

/** Numbers (from 1) of two holes of one part that hold the same ground, or null. */
export function overlappingHoles(part: BoundaryPart): [first: number, second: number] | null {
	return firstPair(part.holes, (a, b) => overlap({ outer: a, holes: [] }, { outer: b, holes: [] }));
}

/** What is wrong with a boundary whose parts or holes overlap, and where it stands in it; null when nothing is. */
export function overlapProblem(
	boundary: readonly BoundaryPart[]
): { path: (string | number)[]; message: string } | null {
	for (const [index, part] of boundary.entries()) {
		const holes = overlappingHoles(part);
		if (holes) {
			const message = `Holes ${holes[0]} and ${holes[1]} overlap: draw them as one hole.`;
			return { path: [index, 'holes', holes[1] - 1], message };
		}
	}
	const parts = overlappingParts(boundary);
	if (!parts) return null;
	const message = `Areas ${parts[0]} and ${parts[1]} overlap: take one out, or draw them apart.`;
	return { path: [parts[1] - 1], message };
}

function firstPair<T>(items: readonly T[], meet: (a: T, b: T) => boolean): [number, number] | null {
	for (let i = 0; i < items.length; i += 1) {
		for (let j = i + 1; j < items.length; j += 1) if (meet(items[i], items[j])) return [i + 1, j + 1];
	}
	return null;
}

interface Box {
	west: number;
	east: number;
	south: number;
	north: number;
}

function boxOf(points: readonly PlanPoint[]): Box {
	const box = { west: Infinity, east: -Infinity, south: Infinity, north: -Infinity };
	for (const [east, north] of points) {
		box.west = Math.min(box.west, east);
		box.east = Math.max(box.east, east);
		box.south = Math.min(box.south, north);
		box.north = Math.max(box.north, north);
	}
	return box;
}

const apart = (a: Box, b: Box): boolean =>
	a.east <= b.west || b.east <= a.west || a.north <= b.south || b.north <= a.south;

function overlap(a: BoundaryPart, b: BoundaryPart): boolean {
	return !apart(boxOf(a.outer), boxOf(b.outer)) && (reachesInto(a, b) || reachesInto(b, a));
}

/** Whether an edge of part b, or a point well inside it, lies deeper in the land of part a than a sliver. */
function reachesInto(a: BoundaryPart, b: BoundaryPart): boolean {
	const deep = (point: PlanPoint): boolean =>
		insideRing(point, a.outer) &&
		!a.holes.some((hole) => insideRing(point, hole)) &&
		[a.outer, ...a.holes].every((ring) => ringDistance(point, ring) > SLIVER_M);
	const inner = innerPoint(b);
	if (inner && deep(inner)) return true;
	const ring = b.outer;
	const boxA = boxOf(a.outer);
	for (let i = 0, j = ring.length - 1; i < ring.length; j = i++) {
		const [from, to] = [ring[j], ring[i]];
		if (apart(boxOf([from, to]), boxA)) continue;
		const stops = [0, ...crossingsAlong(from, to, a.outer), 1].sort((p, q) => p - q);
		for (let k = 0; k + 1 < stops.length; k += 1) {
			const t = (stops[k] + stops[k + 1]) / 2;
			if (deep([from[0] + (to[0] - from[0]) * t, from[1] + (to[1] - from[1]) * t])) return true;
		}
	}
	return false;
}

/** Where a segment crosses a ring, as parts of its length. */
function crossingsAlong(from: PlanPoint, to: PlanPoint, ring: readonly PlanPoint[]): number[] {
	const own = boxOf([from, to]);
	const length = Math.hypot(to[0] - from[0], to[1] - from[1]);
	const found: number[] = [];
	for (let i = 0, j = ring.length - 1; i < ring.length; j = i++) {
		if (Math.max(ring[i][0], ring[j][0]) < own.west || Math.min(ring[i][0], ring[j][0]) > own.east) continue;
		if (Math.max(ring[i][1], ring[j][1]) < own.south || Math.min(ring[i][1], ring[j][1]) > own.north)
			continue;
		const at = crossing(from, to, ring[j], ring[i]);
		if (at) found.push(Math.hypot(at[0] - from[0], at[1] - from[1]) / length);
	}
	return found;
}

/** Middle of the widest stretch of land on a level line through the part. */
function innerPoint(part: BoundaryPart): PlanPoint | null {
	const { south, north } = boxOf(part.outer);
	// Not halfway: corners like to stand there.
	const y = south + (north - south) * 0.4871;
	const xs: number[] = [];
	for (const ring of [part.outer, ...part.holes]) {
		for (let i = 0, j = ring.length - 1; i < ring.length; j = i++) {
			const [xi, yi] = ring[i];
			const [xj, yj] = ring[j];
			if (yi > y !== yj > y) xs.push(xj + ((xi - xj) * (y - yj)) / (yi - yj));
		}
	}
	xs.sort((p, q) => p - q);
	let best: PlanPoint | null = null;
	let widest = SLIVER_M;
	for (let k = 0; k + 1 < xs.length; k += 2) {
		if (xs[k + 1] - xs[k] <= widest) continue;
		widest = xs[k + 1] - xs[k];
		best = [(xs[k] + xs[k + 1]) / 2, y];
	}
	return best;
}
