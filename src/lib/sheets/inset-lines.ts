import type { BoundaryPart, PlanPoint } from '../core';

interface Piece {
	from: PlanPoint;
	to: PlanPoint;
}

/** Chords of the arcs about inward corners span this angle; their error is 0.14 % of the distance. */
const CHORD_RAD = (6 * Math.PI) / 180;
const CHORD_ERROR = 1 - Math.cos(CHORD_RAD / 2);

/**
 * The line that keeps a distance from the boundary, inside the land: every point of it has that distance to the
 * nearest boundary edge.
 * @param parts rings in metres, land on the left of every edge (outer counter-clockwise, holes clockwise)
 * @param distanceM above 0
 * @returns separate straight pieces, in no order; empty where the land is too narrow. Straight pieces are exact,
 * arcs about inward corners within 0.14 % of the distance.
 * Method: each edge moved inward and an arc about each inward corner, all cut where they cross, and the pieces kept
 * whose middle lies in the land and no nearer to any edge than the distance.
 */
export function insetLines(parts: BoundaryPart[], distanceM: number): Piece[] {
	const edges: Piece[] = [];
	const candidates: Piece[] = [];
	for (const part of parts) {
		for (const ring of [part.outer, ...part.holes]) addRing(ring, distanceM, edges, candidates);
	}
	const kept: Piece[] = [];
	const least = distanceM * (1 - CHORD_ERROR) - 1e-6;
	candidates.forEach((piece, index) => {
		for (const part of cutAtCrossings(piece, index, candidates)) {
			const middle: PlanPoint = [(part.from[0] + part.to[0]) / 2, (part.from[1] + part.to[1]) / 2];
			if (isInside(middle, edges) && edges.every((edge) => distanceTo(middle, edge) >= least))
				kept.push(part);
		}
	});
	return kept;
}

function addRing(ring: PlanPoint[], distanceM: number, edges: Piece[], candidates: Piece[]): void {
	const corners = ring.filter((p, i) => {
		const next = ring[(i + 1) % ring.length];
		return Math.hypot(next[0] - p[0], next[1] - p[1]) > 1e-9;
	});
	corners.forEach((from, i) => {
		const to = corners[(i + 1) % corners.length];
		const after = corners[(i + 2) % corners.length];
		edges.push({ from, to });
		const here = Math.atan2(to[1] - from[1], to[0] - from[0]);
		const left: PlanPoint = [-Math.sin(here) * distanceM, Math.cos(here) * distanceM];
		candidates.push({
			from: [from[0] + left[0], from[1] + left[1]],
			to: [to[0] + left[0], to[1] + left[1]]
		});
		const next = Math.atan2(after[1] - to[1], after[0] - to[0]);
		const turn = Math.atan2(Math.sin(next - here), Math.cos(next - here));
		if (turn >= -1e-9) return;
		// A right turn is an inward corner of the land: the line goes round it on an arc.
		const steps = Math.max(1, Math.ceil(-turn / CHORD_RAD));
		const onArc = (k: number): PlanPoint => {
			const a = here + Math.PI / 2 + (turn * k) / steps;
			return [to[0] + Math.cos(a) * distanceM, to[1] + Math.sin(a) * distanceM];
		};
		for (let k = 0; k < steps; k += 1) candidates.push({ from: onArc(k), to: onArc(k + 1) });
	});
}

function cutAtCrossings(piece: Piece, index: number, all: Piece[]): Piece[] {
	const cuts = [0, 1];
	const [ax, ay] = piece.from;
	const [dx, dy] = [piece.to[0] - ax, piece.to[1] - ay];
	const lowX = Math.min(ax, ax + dx);
	const highX = Math.max(ax, ax + dx);
	const lowY = Math.min(ay, ay + dy);
	const highY = Math.max(ay, ay + dy);
	all.forEach((other, j) => {
		if (j === index) return;
		const [bx, by] = other.from;
		const [cx, cy] = other.to;
		if (Math.max(bx, cx) < lowX || Math.min(bx, cx) > highX) return;
		if (Math.max(by, cy) < lowY || Math.min(by, cy) > highY) return;
		const [ex, ey] = [cx - bx, cy - by];
		const cross = dx * ey - dy * ex;
		if (Math.abs(cross) < 1e-12) return;
		const t = ((bx - ax) * ey - (by - ay) * ex) / cross;
		const u = ((bx - ax) * dy - (by - ay) * dx) / cross;
		if (t > 0 && t < 1 && u >= 0 && u <= 1) cuts.push(t);
	});
	cuts.sort((a, b) => a - b);
	const at = (t: number): PlanPoint => [ax + dx * t, ay + dy * t];
	const parts: Piece[] = [];
	for (let i = 1; i < cuts.length; i += 1) {
		if (cuts[i] - cuts[i - 1] > 1e-9) parts.push({ from: at(cuts[i - 1]), to: at(cuts[i]) });
	}
	return parts;
}

function isInside(point: PlanPoint, edges: Piece[]): boolean {
	let inside = false;
	for (const { from, to } of edges) {
		if (from[1] > point[1] === to[1] > point[1]) continue;
		const x = from[0] + ((point[1] - from[1]) / (to[1] - from[1])) * (to[0] - from[0]);
		if (point[0] < x) inside = !inside;
	}
	return inside;
}

function distanceTo(point: PlanPoint, { from, to }: Piece): number {
	const [dx, dy] = [to[0] - from[0], to[1] - from[1]];
	const length2 = dx * dx + dy * dy;
	const along = length2 ? ((point[0] - from[0]) * dx + (point[1] - from[1]) * dy) / length2 : 0;
	const t = Math.min(1, Math.max(0, along));
	return Math.hypot(point[0] - from[0] - dx * t, point[1] - from[1] - dy * t);
}
