import { insideBoundary, segmentDistanceM, type BoundaryPart, type PlanPoint } from '$lib/core';

export type PlanSegment = [from: PlanPoint, to: PlanPoint];

/** Rings with more corners than this are drawn without the line: the check itself does not depend on it. */
const mostCorners = 500;
const arcStepRad = Math.PI / 16;

interface Edge {
	a: PlanPoint;
	b: PlanPoint;
	lengthM: number;
}

function edgesOf(ring: readonly PlanPoint[]): Edge[] {
	return ring.map((a, i) => {
		const b = ring[(i + 1) % ring.length];
		return { a, b, lengthM: Math.hypot(b[0] - a[0], b[1] - a[1]) };
	});
}

/**
 * The line at `setBackM` inside a boundary part, as short segments. Outer rings run counter-clockwise and holes clockwise, so that
 * the land is to the left of every edge. Candidates are the edges shifted inward and arcs about corners; those that are nearer to
 * any edge than the set-back are left out, which needs no repair of crossing offsets.
 */
export function setBackLine(part: BoundaryPart, setBackM: number): PlanSegment[] {
	if (setBackM <= 0) return [];
	const rings = [part.outer, ...part.holes];
	if (rings.reduce((sum, ring) => sum + ring.length, 0) > mostCorners) return [];
	const edges = rings.flatMap(edgesOf).filter(({ lengthM }) => lengthM > 0);
	const clear = ([east, north]: PlanPoint): boolean =>
		insideBoundary([part], east, north) &&
		edges.every(({ a, b }) => segmentDistanceM(east, north, [...a, ...b]) >= setBackM - 1e-6);
	const lines = rings.flatMap((ring) => [
		...edgesOf(ring)
			.filter(({ lengthM }) => lengthM > 0)
			.map((edge) => shiftedEdge(edge, setBackM)),
		...ring.map((corner) => cornerArc(corner, setBackM))
	]);
	return lines.flatMap((line) =>
		line
			.slice(1)
			.map((to, i): PlanSegment => [line[i], to])
			.filter(([from, to]) => clear(from) && clear(to))
	);
}

function shiftedEdge({ a, b, lengthM }: Edge, setBackM: number): PlanPoint[] {
	const left: PlanPoint = [(-(b[1] - a[1]) / lengthM) * setBackM, ((b[0] - a[0]) / lengthM) * setBackM];
	const pieces = Math.min(200, Math.max(1, Math.ceil(lengthM / 0.5)));
	return Array.from({ length: pieces + 1 }, (_, i): PlanPoint => {
		const along = i / pieces;
		return [a[0] + along * (b[0] - a[0]) + left[0], a[1] + along * (b[1] - a[1]) + left[1]];
	});
}

function cornerArc(corner: PlanPoint, setBackM: number): PlanPoint[] {
	const steps = Math.round((2 * Math.PI) / arcStepRad);
	return Array.from({ length: steps + 1 }, (_, i): PlanPoint => {
		const angle = i * arcStepRad;
		return [corner[0] + setBackM * Math.cos(angle), corner[1] + setBackM * Math.sin(angle)];
	});
}
