import type { Vec3 } from '../conventions';
import type { PlanPoint, WallObstacle } from '../document';
import { ringSolid, type Solid } from './solid';

/** A piece follows the ground when its middle is this near to it, metres; else it is halved. */
const GROUND_SLACK_M = 0.1;
const MOST_HALVINGS = 5;

/** Points of the line on the plan. */
export const wallLine = (wall: WallObstacle): PlanPoint[] =>
	wall.line.map(([e, n]): PlanPoint => [wall.eastM + e, wall.northM + n]);

/** Plan outline of a piece of a wall: a rectangle around it, square at its ends. */
function pieceRing(from: PlanPoint, to: PlanPoint, thicknessM: number): PlanPoint[] {
	const length = Math.hypot(to[0] - from[0], to[1] - from[1]);
	const e = (((to[1] - from[1]) / length) * thicknessM) / 2;
	const n = ((-(to[0] - from[0]) / length) * thicknessM) / 2;
	return [
		[from[0] + e, from[1] + n],
		[to[0] + e, to[1] + n],
		[to[0] - e, to[1] - n],
		[from[0] - e, from[1] - n]
	];
}

/** Outline of every piece between two of its points, for drawing on a plan. */
export function wallRings(wall: WallObstacle): PlanPoint[][] {
	const points = wallLine(wall);
	return points
		.slice(1)
		.flatMap((to, k) =>
			Math.hypot(to[0] - points[k][0], to[1] - points[k][1]) > 0
				? [pieceRing(points[k], to, wall.thicknessM)]
				: []
		);
}

/** Points of a piece so close together that straight pieces between them follow the ground. */
function alongGround(
	from: PlanPoint,
	to: PlanPoint,
	groundAt: (eastM: number, northM: number) => number,
	halvings = MOST_HALVINGS
): PlanPoint[] {
	const at = (t: number): PlanPoint => [from[0] + t * (to[0] - from[0]), from[1] + t * (to[1] - from[1])];
	const [z0, z1] = [groundAt(...from), groundAt(...to)];
	const follows = [0.25, 0.5, 0.75].every(
		(t) => Math.abs(groundAt(...at(t)) - z0 - t * (z1 - z0)) <= GROUND_SLACK_M
	);
	if (follows || halvings === 0) return [from];
	const middle = at(0.5);
	return [
		...alongGround(from, middle, groundAt, halvings - 1),
		...alongGround(middle, to, groundAt, halvings - 1)
	];
}

/**
 * A wall or fence as upright pieces that follow the ground to a decimetre, each `heightM` above it. Ends are square, so
 * two pieces of a fence overlap at a corner by a part of its thickness and pass less light there.
 */
export function wallSolids(
	wall: WallObstacle,
	groundAt: (eastM: number, northM: number) => number,
	source: number
): Solid[] {
	if (!(wall.heightM > 0) || !(wall.thicknessM > 0)) return [];
	const passes = Math.min(1, Math.max(0, wall.transmission));
	const points = wallLine(wall);
	const stations = points.slice(1).flatMap((to, k) => alongGround(points[k], to, groundAt));
	if (points.length > 0) stations.push(points[points.length - 1]);
	return stations.slice(1).flatMap((to, k): Solid[] => {
		const from = stations[k];
		if (Math.hypot(to[0] - from[0], to[1] - from[1]) < 1e-9) return [];
		const ring = pieceRing(from, to, wall.thicknessM);
		const feet = [groundAt(...from), groundAt(...to)];
		const raised = (upM: number): Vec3[] =>
			ring.map(([e, n], corner): Vec3 => [e, n, feet[corner === 1 || corner === 2 ? 1 : 0] + upM]);
		return [ringSolid(raised(0), raised(wall.heightM), passes, source)];
	});
}
