import { sunVector, tableAxes, type SunDirection } from '../conventions';
import type { MountEdge, SkylinePoint } from '../document';
import { prepareSkyline, sunHidden } from '../geometry/skyline';
import { sceneSolid, type SceneObstacle, type SceneTable } from '../scene';
import { rayMeetsSolid, rayMeetsTable, type RayTable } from './ray';

export interface MountScene {
	/** Tables without their pose, which each step gives in the same order. */
	tables: Omit<SceneTable, 'azimuthDeg' | 'tiltDeg'>[];
	/** Id of the table whose edges are asked about. */
	target: string;
	obstacles: SceneObstacle[];
	skyline?: SkylinePoint[];
	points: {
		/** Points along each edge, at least 1. */
		count: number;
		/** Inside the edge and inside its ends, metres. */
		insetM: number;
		/** In front of the glass, metres. */
		forwardM: number;
		edges: MountEdge[];
	};
	steps: { sun: SunDirection; poses: { azimuthDeg: number; tiltDeg: number }[] }[];
}

/** Points on an edge in table coordinates: left to right on top and bottom, from below on the sides. */
function edgePoints(
	scene: MountScene,
	edge: MountEdge,
	halfWidth: number,
	halfHeight: number
): [number, number][] {
	const { count, insetM } = scene.points;
	const level = edge === 'top' || edge === 'bottom';
	const half = (level ? halfWidth : halfHeight) - insetM;
	return Array.from({ length: count }, (_, p) => {
		const along = count === 1 ? 0 : -half + (p * 2 * half) / (count - 1);
		if (edge === 'top') return [along, halfHeight - insetM];
		if (edge === 'bottom') return [along, -(halfHeight - insetM)];
		return [edge === 'right' ? halfWidth - insetM : -(halfWidth - insetM), along];
	});
}

/**
 * Which points on the edges of one table the sun does not reach, step by step: a string for each edge, 1 shaded,
 * 0 lit. A ray from the point to the sun is stopped by any table, from either side and the target's own too, by
 * obstacles, and by the skyline. Throws when the target is not among the tables or a step lacks poses.
 */
export function mountScene(scene: MountScene): Partial<Record<MountEdge, string>>[] {
	const target = scene.tables.findIndex((t) => t.id === scene.target);
	if (target < 0) throw new Error(`The target ${scene.target} is not among the tables`);
	const solids = scene.obstacles.map(sceneSolid);
	const skyline = prepareSkyline(scene.skyline ?? []);
	return scene.steps.map(({ sun, poses }, index) => {
		if (poses.length < scene.tables.length)
			throw new Error(`Step ${index} has fewer poses than there are tables`);
		const s = sunVector(sun.azimuthDeg, sun.elevationDeg);
		const hidden = sunHidden(skyline, sun.azimuthDeg, sun.elevationDeg);
		const tables = scene.tables.map((t, k): RayTable => ({
			centre: [t.eastM, t.northM, t.upM],
			...tableAxes(poses[k].azimuthDeg, poses[k].tiltDeg),
			halfWidth: t.widthM / 2,
			halfHeight: t.heightM / 2,
			halfGap: 0
		}));
		const { centre: c, u, v, n, halfWidth, halfHeight } = tables[target];
		const forward = scene.points.forwardM;
		const answer: Partial<Record<MountEdge, string>> = {};
		for (const edge of scene.points.edges) {
			let marks = '';
			for (const [x, y] of edgePoints(scene, edge, halfWidth, halfHeight)) {
				const p = [0, 1, 2].map((k) => c[k] + x * u[k] + y * v[k] + forward * n[k]);
				const shaded =
					hidden ||
					tables.some((table) => rayMeetsTable(p, s, table)) ||
					solids.some((solid) => rayMeetsSolid(p, s, solid));
				marks += shaded ? '1' : '0';
			}
			answer[edge] = marks;
		}
		return answer;
	});
}
