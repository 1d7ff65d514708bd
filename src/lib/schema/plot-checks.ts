import type { BoundaryPart, PlanPoint } from '../core/document';

/** Corners nearer than this count as one point, metres: below what anybody can peg out. */
export const SAME_POINT_M = 1e-3;
/** An outline round less than this is no land, m². */
export const LEAST_AREA_M2 = 0.01;

export type RingProblem =
	| { kind: 'too-few-corners'; corners: number }
	| { kind: 'not-a-number'; corner: number }
	| { kind: 'same-point'; corner: number; next: number; at: PlanPoint }
	| { kind: 'no-area' }
	| { kind: 'crosses'; edges: [number, number]; at: PlanPoint }
	| { kind: 'touches'; corner: number; edge: number; at: PlanPoint };

/** Twice the signed area of an open ring, m²; counter-clockwise is positive. Taken about its first corner, to keep digits. */
export function signedDoubleArea(ring: PlanPoint[]): number {
	if (ring.length < 3) return 0;
	const [e0, n0] = ring[0];
	let sum = 0;
	for (let i = 1; i + 1 < ring.length; i += 1) {
		sum += (ring[i][0] - e0) * (ring[i + 1][1] - n0) - (ring[i + 1][0] - e0) * (ring[i][1] - n0);
	}
	return sum;
}

/**
 * Everything that keeps an open ring (metres, first corner not repeated) from bounding land; at most `limit` of its
 * crossings and touches. Corners and edges are numbered from 1; edge n runs from corner n to the next. Sweeps the edges
 * by their west end, so that 5,000 corners take some milliseconds; check the count before calling it.
 */
export function ringProblems(ring: PlanPoint[], limit = 1): RingProblem[] {
	const bad = ring.findIndex(([east, north]) => !Number.isFinite(east) || !Number.isFinite(north));
	if (bad >= 0) return [{ kind: 'not-a-number', corner: bad + 1 }];
	if (ring.length < 3) return [{ kind: 'too-few-corners', corners: ring.length }];
	for (let i = 0; i < ring.length; i += 1) {
		const next = (i + 1) % ring.length;
		if (distance(ring[i], ring[next]) < SAME_POINT_M) {
			return [{ kind: 'same-point', corner: i + 1, next: next + 1, at: ring[i] }];
		}
	}
	const meetings = ringMeetings(ring, limit);
	if (meetings.length > 0) return meetings;
	return Math.abs(signedDoubleArea(ring)) / 2 < LEAST_AREA_M2 ? [{ kind: 'no-area' }] : [];
}

interface Edge {
	index: number;
	from: PlanPoint;
	to: PlanPoint;
	west: number;
	east: number;
	south: number;
	north: number;
}

function ringEdges(ring: PlanPoint[]): Edge[] {
	return ring.map((from, index) => {
		const to = ring[(index + 1) % ring.length];
		return {
			index,
			from,
			to,
			west: Math.min(from[0], to[0]) - SAME_POINT_M,
			east: Math.max(from[0], to[0]) + SAME_POINT_M,
			south: Math.min(from[1], to[1]) - SAME_POINT_M,
			north: Math.max(from[1], to[1]) + SAME_POINT_M
		};
	});
}

function ringMeetings(ring: PlanPoint[], limit: number): RingProblem[] {
	const edges = ringEdges(ring).sort((p, q) => p.west - q.west);
	const found: RingProblem[] = [];
	for (let i = 0; i < edges.length; i += 1) {
		const one = edges[i];
		for (let j = i + 1; j < edges.length && edges[j].west <= one.east; j += 1) {
			const other = edges[j];
			if (other.south > one.north || other.north < one.south) continue;
			const problem = meeting(one, other, ring.length);
			if (problem && found.push(problem) >= limit) return found;
		}
	}
	return found;
}

function meeting(a: Edge, b: Edge, count: number): RingProblem | null {
	const [first, second] = a.index < b.index ? [a, b] : [b, a];
	const follows = second.index === first.index + 1;
	const wraps = first.index === 0 && second.index === count - 1;
	if (count === 3 || follows || wraps) {
		// Neighbours share a corner; they only meet wrongly when one lies back along the other.
		const [before, after] = follows ? [first, second] : [second, first];
		const spike =
			segmentDistance(after.to, before.from, before.to) < SAME_POINT_M
				? { corner: ((after.index + 1) % count) + 1, edge: before.index + 1, at: after.to }
				: segmentDistance(before.from, after.from, after.to) < SAME_POINT_M
					? { corner: before.index + 1, edge: after.index + 1, at: before.from }
					: null;
		return spike && count > 3 ? { kind: 'touches', ...spike } : null;
	}
	for (const [edge, other] of [
		[first, second],
		[second, first]
	]) {
		if (segmentDistance(edge.from, other.from, other.to) < SAME_POINT_M) {
			return { kind: 'touches', corner: edge.index + 1, edge: other.index + 1, at: edge.from };
		}
		if (segmentDistance(edge.to, other.from, other.to) < SAME_POINT_M) {
			return { kind: 'touches', corner: ((edge.index + 1) % count) + 1, edge: other.index + 1, at: edge.to };
		}
	}
	const at = crossing(first.from, first.to, second.from, second.to);
	return at ? { kind: 'crosses', edges: [first.index + 1, second.index + 1], at } : null;
}

/** Inner crossing point of two segments, or null. */
export function crossing(a: PlanPoint, b: PlanPoint, c: PlanPoint, d: PlanPoint): PlanPoint | null {
	const rx = b[0] - a[0];
	const ry = b[1] - a[1];
	const sx = d[0] - c[0];
	const sy = d[1] - c[1];
	const denominator = rx * sy - ry * sx;
	if (denominator === 0) return null;
	const t = ((c[0] - a[0]) * sy - (c[1] - a[1]) * sx) / denominator;
	const u = ((c[0] - a[0]) * ry - (c[1] - a[1]) * rx) / denominator;
	return t > 0 && t < 1 && u > 0 && u < 1 ? [a[0] + t * rx, a[1] + t * ry] : null;
}

function distance(a: PlanPoint, b: PlanPoint): number {
	return Math.hypot(a[0] - b[0], a[1] - b[1]);
}

/** Distance of a point from a segment, metres. */
export function segmentDistance(point: PlanPoint, from: PlanPoint, to: PlanPoint): number {
	const dx = to[0] - from[0];
	const dy = to[1] - from[1];
	const length2 = dx * dx + dy * dy;
	const t = length2 === 0 ? 0 : ((point[0] - from[0]) * dx + (point[1] - from[1]) * dy) / length2;
	const held = Math.max(0, Math.min(1, t));
	return Math.hypot(point[0] - from[0] - held * dx, point[1] - from[1] - held * dy);
}

/** True when the point lies inside the open ring (even-odd rule); points on an edge may answer either. */
export function insideRing(point: PlanPoint, ring: PlanPoint[]): boolean {
	let inside = false;
	for (let i = 0, j = ring.length - 1; i < ring.length; j = i++) {
		const [ei, ni] = ring[i];
		const [ej, nj] = ring[j];
		if (ni > point[1] !== nj > point[1] && point[0] < ((ej - ei) * (point[1] - ni)) / (nj - ni) + ei) {
			inside = !inside;
		}
	}
	return inside;
}

/** Number (from 1) of the first hole that does not lie inside the outer ring by all its corners, or null. */
export function strayHole(part: BoundaryPart): number | null {
	const stray = part.holes.findIndex((hole) =>
		hole.some((corner) => !insideRing(corner, part.outer) && ringDistance(corner, part.outer) > SAME_POINT_M)
	);
	return stray < 0 ? null : stray + 1;
}

/** Distance of a point from the nearest edge of an open ring, metres. */
export function ringDistance(point: PlanPoint, ring: PlanPoint[]): number {
	let least = Infinity;
	for (let i = 0, j = ring.length - 1; i < ring.length; j = i++) {
		least = Math.min(least, segmentDistance(point, ring[j], ring[i]));
	}
	return least;
}

/** The problem in a sentence with its remedy; `of` names the ring, for example "The outline". */
export function ringProblemSentence(problem: RingProblem, of = 'The outline'): string {
	// Adding 0 turns the negative zero of a rounded −0.04 into a plain one.
	const decimetres = (valueM: number) => (Math.round(valueM * 10) / 10 + 0).toFixed(1);
	const at = (point: PlanPoint) => `${decimetres(point[0])} m east, ${decimetres(point[1])} m north`;
	switch (problem.kind) {
		case 'too-few-corners':
			return `${of} has ${problem.corners} corner${problem.corners === 1 ? '' : 's'}: give at least three.`;
		case 'not-a-number':
			return `${of} has no number at corner ${problem.corner}: give its coordinates.`;
		case 'same-point':
			return `${of} has corners ${problem.corner} and ${problem.next} at the same point: take one out.`;
		case 'no-area':
			return `${of} encloses no area: move a corner.`;
		case 'crosses':
			return `${of} crosses itself: the edges from corners ${problem.edges[0]} and ${problem.edges[1]} meet at ${at(problem.at)}. Move a corner so that no edges cross.`;
		case 'touches':
			return `${of} touches itself: corner ${problem.corner} lies on the edge from corner ${problem.edge}, at ${at(problem.at)}. Move or take out that corner.`;
	}
}
