import type { Ground, Obstacle, PlanPoint } from '$lib/core';
import type { Vec3 } from '$lib/core';

/**
 * Shadows on the ground plane, for the eye: where the outline of a table or an obstacle lands along the sunlight. The shade on
 * tables does not come from here.
 */

/** Height of the ground as `heightM + eastSlope * east + northSlope * north`. */
interface GroundPlane {
	heightM: number;
	eastSlope: number;
	northSlope: number;
}

export function groundPlane(ground: Ground): GroundPlane {
	if (ground.kind === 'level') return { heightM: ground.heightM, eastSlope: 0, northSlope: 0 };
	const rise = ground.risePercent / 100;
	const bearing = (ground.riseTowardsDeg * Math.PI) / 180;
	return {
		heightM: ground.heightM,
		eastSlope: rise * Math.sin(bearing),
		northSlope: rise * Math.cos(bearing)
	};
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

/** Shadow outline of a set of points; null when it can't be drawn. */
export function castOutline(points: readonly Vec3[], sun: Vec3, plane: GroundPlane): PlanPoint[] | null {
	const cast: PlanPoint[] = [];
	for (const point of points) {
		const landed = castPoint(point, sun, plane);
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

const roundCorners = 14;

function ring(eastM: number, northM: number, radiusM: number, upM: number): Vec3[] {
	return Array.from({ length: roundCorners }, (_, i) => {
		const angle = (2 * Math.PI * i) / roundCorners;
		return [eastM + radiusM * Math.cos(angle), northM + radiusM * Math.sin(angle), upM];
	});
}

/** Plan corners of a box obstacle, turned clockwise about its centre. */
export function boxCorners(obstacle: Extract<Obstacle, { kind: 'box' }>): PlanPoint[] {
	const turn = (obstacle.turnDeg * Math.PI) / 180;
	const cos = Math.cos(turn);
	const sin = Math.sin(turn);
	const x = obstacle.sizeXM / 2;
	const y = obstacle.sizeYM / 2;
	return [
		[-x, -y],
		[x, -y],
		[x, y],
		[-x, y]
	].map(([dx, dy]) => [obstacle.eastM + dx * cos + dy * sin, obstacle.northM - dx * sin + dy * cos]);
}

/** Convex parts of an obstacle's surface as point sets, standing on ground at `footUpM`. */
export function obstacleParts(obstacle: Obstacle, footUpM: number): Vec3[][] {
	const topM = footUpM + obstacle.heightM;
	if (obstacle.kind === 'box') {
		const corners = boxCorners(obstacle);
		return [
			corners.flatMap(([e, n]): Vec3[] => [
				[e, n, footUpM],
				[e, n, topM]
			])
		];
	}
	const { eastM, northM } = obstacle;
	const crownM = footUpM + obstacle.crownBaseM;
	return [
		[
			...ring(eastM, northM, obstacle.trunkRadiusM, footUpM),
			...ring(eastM, northM, obstacle.trunkRadiusM, crownM)
		],
		[
			...ring(eastM, northM, obstacle.crownRadiusM, crownM),
			...ring(eastM, northM, obstacle.crownRadiusM, topM)
		]
	];
}
