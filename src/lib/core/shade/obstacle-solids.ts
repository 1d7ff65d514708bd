import type { Obstacle } from '../document';
import { buildingSolids, buildingTopM } from './building-solids';
import { boxSolid, mastSolids } from './prism-solids';
import type { Solid } from './solid';
import { treeHeightM, treeSolids } from './tree-solids';
import { wallSolids } from './wall-solids';

/** What the bodies of an obstacle depend on besides itself. */
export interface ObstacleSite {
	/** Height of the ground at a plan point, metres. */
	groundAt: (eastM: number, northM: number) => number;
	/** Years that trees have grown since the plot was recorded. */
	treeYears: number;
	/** North positive; trees that do not say when they are in leaf go by it. */
	latitudeDeg: number;
}

/**
 * The convex bodies of an obstacle, each with the light that it lets through. Boxes, trees and masts stand on the ground
 * under their middle; buildings and walls say for themselves. Parts without size are left out.
 */
export function obstacleSolids(obstacle: Obstacle, site: ObstacleSite, source: number): Solid[] {
	const underM = () => site.groundAt(obstacle.eastM, obstacle.northM);
	switch (obstacle.kind) {
		case 'box': {
			const flat = !(obstacle.heightM > 0) || !(obstacle.sizeXM > 0) || !(obstacle.sizeYM > 0);
			return flat ? [] : [boxSolid(obstacle, underM(), source)];
		}
		case 'tree':
			return treeSolids(obstacle, underM(), site, source);
		case 'building':
			return buildingSolids(obstacle, site.groundAt, source);
		case 'wall':
			return wallSolids(obstacle, site.groundAt, source);
		case 'mast':
			return mastSolids(obstacle, underM(), source);
	}
}

/** Greatest height of an obstacle above the ground it is measured from, metres, after some years of growth. */
export function obstacleTopM(obstacle: Obstacle, treeYears = 0): number {
	if (obstacle.kind === 'tree') return treeHeightM(obstacle, treeYears);
	return obstacle.kind === 'building' ? buildingTopM(obstacle) : obstacle.heightM;
}
