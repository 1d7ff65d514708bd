import type { PlanPoint, Vec3 } from '$lib/core';

type HeightAt = (eastM: number, northM: number) => number;

/** Part of a convex polygon on one side of an upright plane: `keep` is positive inside. */
function clipped(polygon: PlanPoint[], keep: (point: PlanPoint) => number): PlanPoint[] {
	return polygon.flatMap((from, k) => {
		const to = polygon[(k + 1) % polygon.length];
		const [a, b] = [keep(from), keep(to)];
		const kept: PlanPoint[] = a >= 0 ? [from] : [];
		if (a >= 0 !== b >= 0) {
			const w = a / (a - b);
			kept.push([from[0] + w * (to[0] - from[0]), from[1] + w * (to[1] - from[1])]);
		}
		return kept;
	});
}

/** A convex polygon laid on uneven ground: cut along a grid of `cellM`, every corner at the ground's height. */
export function drapedPolygons(polygon: PlanPoint[], heightAt: HeightAt, cellM: number): Vec3[][] {
	const easts = polygon.map(([e]) => e);
	const first = Math.floor(Math.min(...easts) / cellM);
	const last = Math.floor(Math.max(...easts) / cellM);
	const pieces: Vec3[][] = [];
	for (let column = first; column <= last; column += 1) {
		const strip = clipped(
			clipped(polygon, ([e]) => e - column * cellM),
			([e]) => (column + 1) * cellM - e
		);
		if (strip.length < 3) continue;
		const norths = strip.map(([, n]) => n);
		const lowest = Math.floor(Math.min(...norths) / cellM);
		const highest = Math.floor(Math.max(...norths) / cellM);
		for (let row = lowest; row <= highest; row += 1) {
			const cell = clipped(
				clipped(strip, ([, n]) => n - row * cellM),
				([, n]) => (row + 1) * cellM - n
			);
			if (cell.length >= 3) pieces.push(cell.map(([e, n]): Vec3 => [e, n, heightAt(e, n)]));
		}
	}
	return pieces;
}

/** Points of a straight line on uneven ground, not further apart than `cellM`; both ends are among them. */
export function drapedLine(from: PlanPoint, to: PlanPoint, heightAt: HeightAt, cellM: number): Vec3[] {
	const parts = Math.max(1, Math.ceil(Math.hypot(to[0] - from[0], to[1] - from[1]) / cellM));
	return Array.from({ length: parts + 1 }, (_, k): Vec3 => {
		const [e, n] = [from[0] + (k / parts) * (to[0] - from[0]), from[1] + (k / parts) * (to[1] - from[1])];
		return [e, n, heightAt(e, n)];
	});
}
