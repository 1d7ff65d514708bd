import type { BoxObstacle, Obstacle, PlanPoint, TreeObstacle } from '$lib/core';
import { toCentimetre } from './boundary-edit';

/** A name that no obstacle has yet: "Tree 2". */
function freshName(word: string, obstacles: readonly Obstacle[]): string {
	const names = new Set(obstacles.map((obstacle) => obstacle.name));
	let number = 1;
	while (names.has(`${word} ${number}`)) number += 1;
	return `${word} ${number}`;
}

/** A building to start from, to be given its own sizes. */
export function newBox(id: string, point: PlanPoint, obstacles: readonly Obstacle[]): BoxObstacle {
	const [eastM, northM] = toCentimetre(point);
	return {
		id,
		kind: 'box',
		name: freshName('Building', obstacles),
		eastM,
		northM,
		sizeXM: 10,
		sizeYM: 6,
		heightM: 4,
		turnDeg: 0
	};
}

/** A grown leafy tree to start from; crown that lets no beam through (common practice for trees in leaf, no source). */
export function newTree(id: string, point: PlanPoint, obstacles: readonly Obstacle[]): TreeObstacle {
	const [eastM, northM] = toCentimetre(point);
	return {
		id,
		kind: 'tree',
		name: freshName('Tree', obstacles),
		eastM,
		northM,
		heightM: 9,
		crownBaseM: 2.5,
		crownRadiusM: 3,
		trunkRadiusM: 0.25,
		crownTransmission: 0,
		growthMPerYear: 0.3,
		maxHeightM: 15
	};
}

/** Height of a tree after some years, metres: grows by the same amount each year until it is full-grown. */
export function treeHeightIn(tree: TreeObstacle, years: number): number {
	return Math.max(tree.heightM, Math.min(tree.maxHeightM, tree.heightM + tree.growthMPerYear * years));
}

/** Half the size of an obstacle in plan, metres: for fitting and hitting. */
export function planRadiusM(obstacle: Obstacle): number {
	return obstacle.kind === 'tree' ? obstacle.crownRadiusM : Math.hypot(obstacle.sizeXM, obstacle.sizeYM) / 2;
}

/** How far an obstacle reaches south of its middle in plan, metres, however it is turned: its name stands below that. */
export function southReachM(obstacle: Obstacle): number {
	if (obstacle.kind === 'tree') return obstacle.crownRadiusM;
	const turn = (obstacle.turnDeg * Math.PI) / 180;
	return (Math.abs(obstacle.sizeXM * Math.sin(turn)) + Math.abs(obstacle.sizeYM * Math.cos(turn))) / 2;
}
