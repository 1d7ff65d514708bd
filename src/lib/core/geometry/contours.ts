import type { Ground } from '../document';
import { groundSurface, isMeasured } from './ground';

/** A piece of a contour, metres. */
export interface ContourPiece {
	heightM: number;
	from: [eastM: number, northM: number];
	to: [eastM: number, northM: number];
}

/** Contours of more pieces than this are cut off: the step is too fine for the box. */
const MOST_PIECES = 40_000;

/**
 * Contours of measured ground at whole multiples of `stepM` as straight pieces, one for each triangle they cross, within
 * a box (a triangle counts when its own box meets it). Raster cells are drawn as two triangles. Empty on level ground and
 * planes, whose contours are lines, and for a step that is not above 0.
 */
export function measuredContours(
	ground: Ground,
	stepM: number,
	box: { westM: number; southM: number; eastM: number; northM: number }
): ContourPiece[] {
	if (!isMeasured(ground) || !(stepM > 0)) return [];
	const { points, corners } = groundSurface(ground).mesh();
	const pieces: ContourPiece[] = [];
	for (let t = 0; t < corners.length && pieces.length < MOST_PIECES; t += 3) {
		// From the lowest corner to the highest.
		const [a, b, c] = [corners[t], corners[t + 1], corners[t + 2]].sort(
			(p, q) => points[3 * p + 2] - points[3 * q + 2]
		);
		const least = (k: number) => Math.min(points[3 * a + k], points[3 * b + k], points[3 * c + k]);
		const most = (k: number) => Math.max(points[3 * a + k], points[3 * b + k], points[3 * c + k]);
		if (most(0) < box.westM || least(0) > box.eastM || most(1) < box.southM || least(1) > box.northM)
			continue;
		const low = points[3 * a + 2];
		const middle = points[3 * b + 2];
		const high = points[3 * c + 2];
		const on = (p: number, q: number, heightM: number): [number, number] => {
			const w = (heightM - points[3 * p + 2]) / (points[3 * q + 2] - points[3 * p + 2]);
			return [
				points[3 * p] + w * (points[3 * q] - points[3 * p]),
				points[3 * p + 1] + w * (points[3 * q + 1] - points[3 * p + 1])
			];
		};
		// Heights from the lowest corner (left out) to the highest (taken), so that no piece is drawn twice or is a point.
		for (let level = Math.floor(low / stepM) + 1; level * stepM <= high; level++) {
			const heightM = level * stepM;
			if (high === low) break;
			const from = on(a, c, heightM);
			const to =
				heightM <= middle && middle > low ? on(a, b, heightM) : high > middle ? on(b, c, heightM) : from;
			if (from[0] !== to[0] || from[1] !== to[1]) pieces.push({ heightM, from, to });
			if (pieces.length >= MOST_PIECES) break;
		}
	}
	return pieces;
}
