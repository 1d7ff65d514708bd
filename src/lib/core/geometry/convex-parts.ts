import type { PlanPoint } from '../document';

/** Twice the signed area of a, b, c: positive counter-clockwise. */
const turn = (a: PlanPoint, b: PlanPoint, c: PlanPoint): number =>
	(b[0] - a[0]) * (c[1] - a[1]) - (b[1] - a[1]) * (c[0] - a[0]);

function area2(ring: readonly PlanPoint[]): number {
	let sum = 0;
	for (let k = 1; k + 1 < ring.length; k++) sum += turn(ring[0], ring[k], ring[k + 1]);
	return sum;
}

/** The ring counter-clockwise. */
export function counterClockwise(ring: readonly PlanPoint[]): PlanPoint[] {
	return area2(ring) < 0 ? [...ring].reverse() : [...ring];
}

/** True for an open ring without a corner that turns back; corners in line are allowed. */
export function isConvex(ring: readonly PlanPoint[]): boolean {
	const turned = counterClockwise(ring);
	const n = turned.length;
	// Against the size of the ring, so that the slack is one of angle.
	const slack = -1e-9 * Math.max(Math.abs(area2(turned)), 1e-12);
	return turned.every((corner, k) => turn(corner, turned[(k + 1) % n], turned[(k + 2) % n]) >= slack);
}

/** Middle of the area of an open ring (centroid). */
export function ringCentre(ring: readonly PlanPoint[]): PlanPoint {
	const [ox, oy] = ring[0];
	let twice = 0;
	let x = 0;
	let y = 0;
	for (let k = 1; k + 1 < ring.length; k++) {
		const part = turn(ring[0], ring[k], ring[k + 1]);
		twice += part;
		x += part * (ring[k][0] - ox + ring[k + 1][0] - ox);
		y += part * (ring[k][1] - oy + ring[k + 1][1] - oy);
	}
	if (twice === 0) return [ox, oy];
	return [ox + x / (3 * twice), oy + y / (3 * twice)];
}

/** Triangles of a simple counter-clockwise ring, ear by ear (G. H. Meisters 1975), as corner numbers. */
function ears(ring: readonly PlanPoint[]): number[][] {
	const left = ring.map((_, k) => k);
	const triangles: number[][] = [];
	while (left.length > 3) {
		const n = left.length;
		let cut = -1;
		let flattest = 0;
		let least = Infinity;
		for (let k = 0; k < n && cut < 0; k++) {
			const [a, b, c] = [left[(k + n - 1) % n], left[k], left[(k + 1) % n]];
			const corner = turn(ring[a], ring[b], ring[c]);
			if (Math.abs(corner) < least) {
				least = Math.abs(corner);
				flattest = k;
			}
			if (corner <= 0) continue;
			const free = left.every(
				(p) =>
					p === a ||
					p === b ||
					p === c ||
					turn(ring[a], ring[b], ring[p]) < 0 ||
					turn(ring[b], ring[c], ring[p]) < 0 ||
					turn(ring[c], ring[a], ring[p]) < 0
			);
			if (free) cut = k;
		}
		// Corners in line leave no proper ear: the flattest one goes without a triangle.
		if (cut < 0) cut = flattest;
		else triangles.push([left[(cut + n - 1) % n], left[cut], left[(cut + 1) % n]]);
		left.splice(cut, 1);
	}
	if (left.length === 3 && turn(ring[left[0]], ring[left[1]], ring[left[2]]) > 0) triangles.push(left);
	return triangles;
}

/**
 * Cuts a simple open ring (metres, either way round) into convex counter-clockwise parts that cover it without overlap:
 * a convex ring stays whole, others are cut into ears that are joined again wherever the joint stays convex (at most four
 * times the least possible number; S. Hertel and K. Mehlhorn 1983).
 */
export function convexParts(ring: readonly PlanPoint[]): PlanPoint[][] {
	const turned = counterClockwise(ring);
	if (isConvex(turned)) return [turned];
	const parts = ears(turned);
	const join = (one: number[], other: number[]): number[] | null => {
		for (let k = 0; k < one.length; k++) {
			const [a, b] = [one[k], one[(k + 1) % one.length]];
			const j = other.findIndex((p, i) => p === b && other[(i + 1) % other.length] === a);
			if (j < 0) continue;
			const around = [
				...Array.from({ length: one.length }, (_, i) => one[(k + 1 + i) % one.length]),
				...Array.from({ length: other.length - 2 }, (_, i) => other[(j + 2 + i) % other.length])
			];
			return isConvex(around.map((p) => turned[p])) ? around : null;
		}
		return null;
	};
	for (let i = 0; i < parts.length; i++) {
		for (let j = i + 1; j < parts.length; j++) {
			const joined = join(parts[i], parts[j]);
			if (!joined) continue;
			parts[i] = joined;
			parts.splice(j, 1);
			j = i;
		}
	}
	return parts.map((part) => part.map((p) => turned[p]));
}
