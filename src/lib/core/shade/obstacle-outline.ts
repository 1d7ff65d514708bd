import type { Obstacle, PlanPoint } from '../document';
import { buildingRing } from './building-solids';
import { boxRing } from './prism-solids';
import { wallRings } from './wall-solids';

/** What an obstacle covers on the plan: a circle, or outlines (open rings) that may touch. Metres. */
export type PlanShape =
	{ kind: 'circle'; centre: PlanPoint; radiusM: number } | { kind: 'rings'; rings: PlanPoint[][] };

/** Plan shape of an obstacle; of a tree its crown (or its trunk, where that is wider). */
export function obstacleShape(obstacle: Obstacle): PlanShape {
	switch (obstacle.kind) {
		case 'box':
			return { kind: 'rings', rings: [boxRing(obstacle)] };
		case 'building':
			return { kind: 'rings', rings: [buildingRing(obstacle)] };
		case 'wall':
			return { kind: 'rings', rings: wallRings(obstacle) };
		case 'tree':
			return {
				kind: 'circle',
				centre: [obstacle.eastM, obstacle.northM],
				radiusM: Math.max(obstacle.crownRadiusM, obstacle.trunkRadiusM)
			};
		case 'mast':
			return { kind: 'circle', centre: [obstacle.eastM, obstacle.northM], radiusM: obstacle.radiusM };
	}
}

/** West, south, east and north end of an obstacle on the plan, metres. */
export function obstacleExtent(
	obstacle: Obstacle
): [westM: number, southM: number, eastM: number, northM: number] {
	const shape = obstacleShape(obstacle);
	if (shape.kind === 'circle') {
		const [e, n] = shape.centre;
		return [e - shape.radiusM, n - shape.radiusM, e + shape.radiusM, n + shape.radiusM];
	}
	const box: [number, number, number, number] = [Infinity, Infinity, -Infinity, -Infinity];
	for (const [e, n] of shape.rings.flat()) {
		box[0] = Math.min(box[0], e);
		box[1] = Math.min(box[1], n);
		box[2] = Math.max(box[2], e);
		box[3] = Math.max(box[3], n);
	}
	return box[0] <= box[2] ? box : [obstacle.eastM, obstacle.northM, obstacle.eastM, obstacle.northM];
}
