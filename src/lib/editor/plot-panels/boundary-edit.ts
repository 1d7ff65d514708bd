import type { BoundaryPart, PlanPoint, Plot } from '$lib/core';
import { overlapProblem } from '$lib/schema/part-overlaps';
import { ringProblems, ringProblemSentence, signedDoubleArea, strayHole } from '$lib/schema/plot-checks';

/** One corner of the boundary: part, ring (0 is the outline, n is hole n) and place in the ring. */
export interface CornerRef {
	part: number;
	ring: number;
	index: number;
}

export function sameCorner(a: CornerRef | null, b: CornerRef | null): boolean {
	return a !== null && b !== null && a.part === b.part && a.ring === b.ring && a.index === b.index;
}

/** To the centimetre: what a peg can be set to. */
export function toCentimetre([eastM, northM]: PlanPoint): PlanPoint {
	return [Math.round(eastM * 100) / 100, Math.round(northM * 100) / 100];
}

export function ringsOf(part: BoundaryPart): PlanPoint[][] {
	return [part.outer, ...part.holes];
}

/** Name of a ring for labels and messages. */
export function ringLabel(boundary: readonly BoundaryPart[], part: number, ring: number): string {
	const land = boundary.length === 1 ? 'Outline' : `Area ${part + 1}`;
	return ring === 0 ? land : `${land}, hole ${ring}`;
}

export function cornerAt(boundary: readonly BoundaryPart[], ref: CornerRef): PlanPoint | null {
	const part = boundary[ref.part];
	return part ? (ringsOf(part)[ref.ring]?.[ref.index] ?? null) : null;
}

function ringIn(plot: Plot, ref: CornerRef): PlanPoint[] {
	const part = plot.boundary[ref.part];
	return ref.ring === 0 ? part.outer : part.holes[ref.ring - 1];
}

export function moveCorner(draft: Plot, ref: CornerRef, point: PlanPoint): void {
	ringIn(draft, ref)[ref.index] = toCentimetre(point);
}

/** Puts a corner on the edge that starts at the given corner; answers the new corner. */
export function insertCorner(draft: Plot, after: CornerRef, point: PlanPoint): CornerRef {
	ringIn(draft, after).splice(after.index + 1, 0, toCentimetre(point));
	return { ...after, index: after.index + 1 };
}

/** Takes a corner out; a ring that had three corners goes away whole, and a part with its outline. */
export function removeCorner(draft: Plot, ref: CornerRef): void {
	const ring = ringIn(draft, ref);
	if (ring.length > 3) ring.splice(ref.index, 1);
	else if (ref.ring > 0) draft.boundary[ref.part].holes.splice(ref.ring - 1, 1);
	else draft.boundary.splice(ref.part, 1);
}

/** Outlines counter-clockwise, holes clockwise: a corner dragged across its own land turns a ring over. */
export function turnRings(draft: Plot): void {
	for (const part of draft.boundary) {
		if (signedDoubleArea(part.outer) < 0) part.outer.reverse();
		for (const hole of part.holes) if (signedDoubleArea(hole) > 0) hole.reverse();
	}
}

/** Why these parts can't be a boundary, in a sentence with the remedy; null when they can. */
export function boundaryProblem(boundary: readonly BoundaryPart[]): string | null {
	for (const [index, part] of boundary.entries()) {
		for (const [ring, corners] of ringsOf(part).entries()) {
			const [problem] = ringProblems(corners);
			if (problem) return ringProblemSentence(problem, ringLabel(boundary, index, ring));
		}
		const stray = strayHole(part);
		if (stray !== null) {
			return `${ringLabel(boundary, index, stray)} does not lie inside the outline: move its corners in or take it out.`;
		}
	}
	return overlapProblem(boundary)?.message ?? null;
}

/** A drawn ring as a part of the boundary. */
export function partFromCorners(corners: readonly PlanPoint[]): BoundaryPart {
	const outer = corners.map(toCentimetre);
	return { outer: signedDoubleArea(outer) < 0 ? outer.reverse() : outer, holes: [] };
}

/** Middle of the edge that starts at a corner. */
export function edgeMiddle(ring: readonly PlanPoint[], index: number): PlanPoint {
	const from = ring[index];
	const to = ring[(index + 1) % ring.length];
	return [(from[0] + to[0]) / 2, (from[1] + to[1]) / 2];
}
