import {
	groundSurface,
	isMeasured,
	obstacleSolids,
	type Ground,
	type Obstacle,
	type PlanPoint,
	type Vec3
} from '$lib/core';

/**
 * Shadows on the ground plane, for the eye: where the outline of a table or an obstacle lands along the sunlight. The shade on
 * tables does not come from here.
 */

/** Height of the ground as `heightM + eastSlope * east + northSlope * north`. */
export interface GroundPlane {
	heightM: number;
	eastSlope: number;
	northSlope: number;
}

/** The plane that the ground is, or on measured ground the one it has at a point: near it the two differ little. */
export function groundPlane(ground: Ground, at: PlanPoint = [0, 0]): GroundPlane {
	const surface = groundSurface(ground);
	const [eastSlope, northSlope] = surface.gradient(at[0], at[1]);
	const heightM = surface.heightM(at[0], at[1]) - eastSlope * at[0] - northSlope * at[1];
	return { heightM, eastSlope, northSlope };
}

/** The planes of a ground by place; one and the same for a ground that is a plane. */
export function groundPlanes(ground: Ground): (at: PlanPoint) => GroundPlane {
	if (isMeasured(ground)) return (at) => groundPlane(ground, at);
	const plane = groundPlane(ground);
	return () => plane;
}

/**
 * Where a point lands on the ground along the sunlight. `sun` points to the sun. Null when light and ground run alike or the
 * shadow would be longer than `longestM`.
 */
export function castPoint(point: Vec3, sun: Vec3, plane: GroundPlane, longestM = 2000): Vec3 | null {
	const fall = sun[2] - plane.eastSlope * sun[0] - plane.northSlope * sun[1];
	if (fall <= 1e-6) return null;
	const above = point[2] - plane.heightM - plane.eastSlope * point[0] - plane.northSlope * point[1];
	const along = Math.max(0, above) / fall;
	if (along > longestM) return null;
	return [point[0] - along * sun[0], point[1] - along * sun[1], point[2] - along * sun[2]];
}

const mostPlanes = 5;
const nearEnoughM = 0.02;

/** Where a point lands on uneven ground: from the plane under it to the plane where it lands, until the two agree. */
function castOnto(point: Vec3, sun: Vec3, planeAt: (at: PlanPoint) => GroundPlane): Vec3 | null {
	let plane = planeAt([point[0], point[1]]);
	let landed = castPoint(point, sun, plane);
	for (let tries = 1; tries < mostPlanes && landed; tries += 1) {
		const next = planeAt([landed[0], landed[1]]);
		if (next === plane) return landed;
		plane = next;
		const again = castPoint(point, sun, plane);
		if (!again) return landed;
		const moved = Math.hypot(again[0] - landed[0], again[1] - landed[1]);
		landed = again;
		if (moved < nearEnoughM) break;
	}
	return landed;
}

/** Shadow outline of a set of points on the ground that `planeAt` gives near a point; null when it can't be drawn. */
export function castOutline(
	points: readonly Vec3[],
	sun: Vec3,
	planeAt: (at: PlanPoint) => GroundPlane
): PlanPoint[] | null {
	const cast: PlanPoint[] = [];
	for (const point of points) {
		const landed = castOnto(point, sun, planeAt);
		if (!landed) return null;
		cast.push([landed[0], landed[1]]);
	}
	return convexHull(cast);
}

/** Counter-clockwise outline of points (Andrew's monotone chain, 1979). */
export function convexHull(points: readonly PlanPoint[]): PlanPoint[] {
	const sorted = [...points].sort((a, b) => a[0] - b[0] || a[1] - b[1]);
	if (sorted.length < 3) return sorted;
	const turn = (o: PlanPoint, a: PlanPoint, b: PlanPoint): number =>
		(a[0] - o[0]) * (b[1] - o[1]) - (a[1] - o[1]) * (b[0] - o[0]);
	const half = (list: PlanPoint[]): PlanPoint[] => {
		const chain: PlanPoint[] = [];
		for (const point of list) {
			while (chain.length >= 2 && turn(chain[chain.length - 2], chain[chain.length - 1], point) <= 0)
				chain.pop();
			chain.push(point);
		}
		chain.pop();
		return chain;
	};
	return [...half(sorted), ...half(sorted.reverse())];
}

/** Corners of each convex part of an obstacle standing on the ground. */
export function obstacleParts(obstacle: Obstacle, ground: Ground): Vec3[][] {
	const surface = groundSurface(ground);
	// Shape alone is asked for: neither the season nor the years change what is drawn here.
	const site = { groundAt: (e: number, n: number) => surface.heightM(e, n), treeYears: 0, latitudeDeg: 0 };
	return obstacleSolids(obstacle, site, 0).map(({ vertices }) =>
		Array.from({ length: vertices.length / 3 }, (_, k): Vec3 => [
			vertices[3 * k],
			vertices[3 * k + 1],
			vertices[3 * k + 2]
		])
	);
}
