import type { PlanPoint, Vec3 } from '$lib/core';
import type { GroundPlane } from './ground-shadow';

/** A table as a rectangle in space: centre, unit axes right and up the slope, size in metres. */
export interface TableQuad {
	centre: Vec3;
	u: Vec3;
	v: Vec3;
	n: Vec3;
	widthM: number;
	heightM: number;
}

function dot(a: Vec3, b: Vec3): number {
	return a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
}

/**
 * Index of the first table that a ray meets, with `marginM` added around every table so that thin ones can be hit; -1 for none.
 * Either face counts.
 */
export function pickTable(
	origin: Vec3,
	direction: Vec3,
	tables: readonly TableQuad[],
	marginM: number
): number {
	let best = -1;
	let bestAlong = Infinity;
	tables.forEach((table, index) => {
		const toCentre: Vec3 = [
			table.centre[0] - origin[0],
			table.centre[1] - origin[1],
			table.centre[2] - origin[2]
		];
		const towards = dot(direction, table.n);
		if (Math.abs(towards) < 1e-9) return;
		const along = dot(toCentre, table.n) / towards;
		if (along <= 0 || along >= bestAlong) return;
		const hit: Vec3 = [
			direction[0] * along - toCentre[0],
			direction[1] * along - toCentre[1],
			direction[2] * along - toCentre[2]
		];
		if (Math.abs(dot(hit, table.u)) > table.widthM / 2 + marginM) return;
		if (Math.abs(dot(hit, table.v)) > table.heightM / 2 + marginM) return;
		best = index;
		bestAlong = along;
	});
	return best;
}

/** Where a ray meets the ground `height + eastSlope * east + northSlope * north`; null when it never does. */
export function rayToGround(origin: Vec3, direction: Vec3, plane: GroundPlane): Vec3 | null {
	const fall = direction[2] - plane.eastSlope * direction[0] - plane.northSlope * direction[1];
	if (Math.abs(fall) < 1e-9) return null;
	const above = origin[2] - plane.heightM - plane.eastSlope * origin[0] - plane.northSlope * origin[1];
	const along = -above / fall;
	if (along <= 0) return null;
	return [
		origin[0] + along * direction[0],
		origin[1] + along * direction[1],
		origin[2] + along * direction[2]
	];
}

const mostTries = 12;
const nearEnoughM = 0.01;

/**
 * Where a ray meets uneven ground, from plane to plane: `planeAt` gives the ground's own at a point. It starts from the plane
 * at `near`, and stops where it came within a centimetre or after a dozen planes, which is near enough for a pointer.
 */
export function rayToSurface(
	origin: Vec3,
	direction: Vec3,
	planeAt: (at: PlanPoint) => GroundPlane,
	near: PlanPoint
): Vec3 | null {
	let hit = rayToGround(origin, direction, planeAt(near));
	for (let tries = 0; tries < mostTries && hit; tries += 1) {
		const next = rayToGround(origin, direction, planeAt([hit[0], hit[1]]));
		if (!next) return hit;
		const moved = Math.hypot(next[0] - hit[0], next[1] - hit[1], next[2] - hit[2]);
		hit = next;
		if (moved < nearEnoughM) break;
	}
	return hit;
}
