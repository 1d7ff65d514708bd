import { insideBoundary, segmentDistanceM, type BoundaryPart, type PlanPoint } from '$lib/core';
import { extentOf } from '../kernels/pick';

/** The answer is the true value or this much less, metres. */
const FINE_M = 0.02;
const MOST_CELLS = 20_000;

interface Cell {
	east: number;
	north: number;
	half: number;
	clearM: number;
	/** No point of the cell can be clearer than this. */
	boundM: number;
}

/**
 * Radius of the largest circle that fits into one of the parts, metres: how far the boundary can be drawn in before nothing is
 * left. Squares are halved where they may still hold a better middle, the most promising one first.
 */
export function widestRadiusM(parts: readonly BoundaryPart[]): number {
	return parts.reduce((most, part) => Math.max(most, radiusInside(part)), 0);
}

function radiusInside(part: BoundaryPart): number {
	const box = extentOf(part.outer);
	if (!box) return 0;
	const edges = [part.outer, ...part.holes].flatMap((ring) =>
		ring.map((from: PlanPoint, i): [number, number, number, number] => [
			...from,
			...ring[(i + 1) % ring.length]
		])
	);
	const cellAt = (east: number, north: number, half: number): Cell => {
		let distanceM = Infinity;
		for (const edge of edges) distanceM = Math.min(distanceM, segmentDistanceM(east, north, edge));
		const clearM = insideBoundary([part], east, north) ? distanceM : -distanceM;
		return { east, north, half, clearM, boundM: clearM + half * Math.SQRT2 };
	};
	const side = Math.min(box.eastM - box.westM, box.northM - box.southM);
	if (side <= 0) return 0;
	const half = side / 2;
	let open: Cell[] = [];
	for (let east = box.westM; east < box.eastM; east += side) {
		for (let north = box.southM; north < box.northM; north += side) {
			open.push(cellAt(east + half, north + half, half));
		}
	}
	let best = open.reduce((most, cell) => Math.max(most, cell.clearM), 0);
	let looked = open.length;
	while (open.length > 0 && looked < MOST_CELLS) {
		const next: Cell[] = [];
		for (const cell of open) {
			if (cell.boundM <= best + FINE_M) continue;
			const quarter = cell.half / 2;
			for (const [east, north] of [
				[-1, -1],
				[1, -1],
				[1, 1],
				[-1, 1]
			]) {
				const smaller = cellAt(cell.east + east * quarter, cell.north + north * quarter, quarter);
				best = Math.max(best, smaller.clearM);
				next.push(smaller);
			}
		}
		looked += next.length;
		open = next;
	}
	return best;
}
