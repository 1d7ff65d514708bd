import { insideBoundary, segmentDistanceM, type BoundaryPart, type PlanPoint } from '$lib/core';

export type PlanSegment = [from: PlanPoint, to: PlanPoint];

/** Rings with more corners than this are drawn without the line: the check itself does not depend on it. */
const mostCorners = 500;
/** Pieces of the line are about this long, so that none is left out for an end alone, metres. */
const pieceM = 0.5;

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
		...ring.flatMap((_, i) => cornerArc(ring, i, setBackM))
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
	const pieces = Math.min(200, Math.max(1, Math.ceil(lengthM / pieceM)));
	return Array.from({ length: pieces + 1 }, (_, i): PlanPoint => {
		const along = i / pieces;
		return [a[0] + along * (b[0] - a[0]) + left[0], a[1] + along * (b[1] - a[1]) + left[1]];
	});
}

/** The arc about a corner that points into the land; other corners have none, the shifted edges meet there. */
function cornerArc(ring: readonly PlanPoint[], index: number, setBackM: number): PlanPoint[][] {
	const corner = ring[index];
	const before = ring[(index + ring.length - 1) % ring.length];
	const after = ring[(index + 1) % ring.length];
	const into: PlanPoint = [corner[0] - before[0], corner[1] - before[1]];
	const outOf: PlanPoint = [after[0] - corner[0], after[1] - corner[1]];
	const turn = Math.atan2(into[0] * outOf[1] - into[1] * outOf[0], into[0] * outOf[0] + into[1] * outOf[1]);
	if (turn >= 0) return [];
	const start = Math.atan2(into[0], -into[1]);
	const pieces = Math.min(200, Math.max(4, Math.ceil((-turn * setBackM) / pieceM)));
	return [
		Array.from({ length: pieces + 1 }, (_, i): PlanPoint => {
			const angle = start + (i / pieces) * turn;
			return [corner[0] + setBackM * Math.cos(angle), corner[1] + setBackM * Math.sin(angle)];
		})
	];
}
