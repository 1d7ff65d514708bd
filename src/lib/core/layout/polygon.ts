import type { BoundaryPart, PlanPoint } from '../document';

/** Twice-signed area is positive for a ring that runs counter-clockwise; m². */
export function ringAreaM2(ring: readonly PlanPoint[]): number {
	let twice = 0;
	for (let i = 0, j = ring.length - 1; i < ring.length; j = i++) {
		// Relative to the first corner, so that large coordinates cost no digits.
		const ax = ring[j][0] - ring[0][0];
		const ay = ring[j][1] - ring[0][1];
		const bx = ring[i][0] - ring[0][0];
		const by = ring[i][1] - ring[0][1];
		twice += ax * by - bx * ay;
	}
	return twice / 2;
}

/** Land inside the boundary, holes taken out, m². */
export function boundaryAreaM2(parts: readonly BoundaryPart[]): number {
	let area = 0;
	for (const part of parts) {
		area += Math.abs(ringAreaM2(part.outer));
		for (const hole of part.holes) area -= Math.abs(ringAreaM2(hole));
	}
	return Math.max(0, area);
}

function ringLengthM(ring: readonly PlanPoint[]): number {
	let length = 0;
	for (let i = 0, j = ring.length - 1; i < ring.length; j = i++) {
		length += Math.hypot(ring[i][0] - ring[j][0], ring[i][1] - ring[j][1]);
	}
	return length;
}

/** Length of all rings of the boundary, holes included, metres. */
export function boundaryPerimeterM(parts: readonly BoundaryPart[]): number {
	let length = 0;
	for (const part of parts) {
		length += ringLengthM(part.outer);
		for (const hole of part.holes) length += ringLengthM(hole);
	}
	return length;
}

/** Every edge of every ring as [x0, y0, x1, y1]. */
export function boundaryEdges(parts: readonly BoundaryPart[]): [number, number, number, number][] {
	const edges: [number, number, number, number][] = [];
	const add = (ring: readonly PlanPoint[]) => {
		for (let i = 0, j = ring.length - 1; i < ring.length; j = i++) {
			edges.push([ring[j][0], ring[j][1], ring[i][0], ring[i][1]]);
		}
	};
	for (const part of parts) {
		add(part.outer);
		part.holes.forEach(add);
	}
	return edges;
}

/** Inside the land: an odd number of crossings with all rings, so that holes count as outside. */
export function insideBoundary(parts: readonly BoundaryPart[], eastM: number, northM: number): boolean {
	let inside = false;
	const cross = (ring: readonly PlanPoint[]) => {
		for (let i = 0, j = ring.length - 1; i < ring.length; j = i++) {
			const [xi, yi] = ring[i];
			const [xj, yj] = ring[j];
			if (yi > northM !== yj > northM && eastM < ((xj - xi) * (northM - yi)) / (yj - yi) + xi)
				inside = !inside;
		}
	};
	for (const part of parts) {
		cross(part.outer);
		part.holes.forEach(cross);
	}
	return inside;
}

/** Distance of a point from a segment, metres. */
export function segmentDistanceM(
	x: number,
	y: number,
	[x0, y0, x1, y1]: readonly [number, number, number, number]
): number {
	const dx = x1 - x0;
	const dy = y1 - y0;
	const length2 = dx * dx + dy * dy;
	const t = length2 === 0 ? 0 : Math.min(1, Math.max(0, ((x - x0) * dx + (y - y0) * dy) / length2));
	return Math.hypot(x - x0 - t * dx, y - y0 - t * dy);
}

/** The stretches of a straight piece that lie on the land, holes left out; metres. */
export function stretchesOnLand(
	parts: readonly BoundaryPart[],
	from: PlanPoint,
	to: PlanPoint
): [PlanPoint, PlanPoint][] {
	const dx = to[0] - from[0];
	const dy = to[1] - from[1];
	const cuts = [0, 1];
	for (const [x0, y0, x1, y1] of boundaryEdges(parts)) {
		const side0 = (x0 - from[0]) * dy - (y0 - from[1]) * dx;
		const side1 = (x1 - from[0]) * dy - (y1 - from[1]) * dx;
		if (side0 > 0 === side1 > 0) continue;
		const w = side0 / (side0 - side1);
		const along =
			((x0 + w * (x1 - x0) - from[0]) * dx + (y0 + w * (y1 - y0) - from[1]) * dy) / (dx * dx + dy * dy);
		if (along > 0 && along < 1) cuts.push(along);
	}
	cuts.sort((a, b) => a - b);
	const at = (t: number): PlanPoint => [from[0] + t * dx, from[1] + t * dy];
	const stretches: [PlanPoint, PlanPoint][] = [];
	for (let k = 1; k < cuts.length; k++) {
		if (!(cuts[k] > cuts[k - 1])) continue;
		const middle = at((cuts[k - 1] + cuts[k]) / 2);
		if (insideBoundary(parts, middle[0], middle[1])) stretches.push([at(cuts[k - 1]), at(cuts[k])]);
	}
	return stretches;
}
