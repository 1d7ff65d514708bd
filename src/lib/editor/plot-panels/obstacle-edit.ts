import {
	type BoxObstacle,
	type BuildingObstacle,
	type MastObstacle,
	type Obstacle,
	type PlanPoint,
	type TreeObstacle,
	type WallObstacle
} from '$lib/core';
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

/** An upright pole to start from. */
export function newMast(id: string, point: PlanPoint, obstacles: readonly Obstacle[]): MastObstacle {
	const [eastM, northM] = toCentimetre(point);
	return { id, kind: 'mast', name: freshName('Mast', obstacles), eastM, northM, heightM: 9, radiusM: 0.15 };
}

/** Corners as offsets from the first of them, to the centimetre. */
function fromFirst(points: readonly PlanPoint[]): { eastM: number; northM: number; offsets: PlanPoint[] } {
	const [eastM, northM] = toCentimetre(points[0]);
	return {
		eastM,
		northM,
		offsets: points.map((point) => toCentimetre([point[0] - eastM, point[1] - northM]))
	};
}

/** A building on a footprint of drawn corners, to be given its own height and roof. */
export function newBuilding(
	id: string,
	corners: readonly PlanPoint[],
	obstacles: readonly Obstacle[]
): BuildingObstacle {
	const { eastM, northM, offsets } = fromFirst(corners);
	const name = freshName('Building', obstacles);
	return {
		id,
		kind: 'building',
		name,
		eastM,
		northM,
		corners: offsets,
		heightM: 4,
		roof: { kind: 'flat' }
	};
}

/** A wall along a drawn line, to be given its own sizes. */
export function newWall(
	id: string,
	line: readonly PlanPoint[],
	obstacles: readonly Obstacle[]
): WallObstacle {
	const { eastM, northM, offsets } = fromFirst(line);
	const name = freshName('Wall', obstacles);
	return {
		id,
		kind: 'wall',
		name,
		eastM,
		northM,
		line: offsets,
		heightM: 2,
		thicknessM: 0.2,
		transmission: 0
	};
}

/** Bearing of the longest side of a footprint, 0..180: a ridge mostly runs along it. */
export function longestSideDeg(corners: readonly PlanPoint[]): number {
	let longest = 0;
	let bearing = 0;
	corners.forEach((from, k) => {
		const to = corners[(k + 1) % corners.length];
		const length = Math.hypot(to[0] - from[0], to[1] - from[1]);
		if (length <= longest) return;
		longest = length;
		bearing = (Math.atan2(to[0] - from[0], to[1] - from[1]) * 180) / Math.PI;
	});
	return Math.round((((bearing % 180) + 180) % 180) * 10) / 10;
}

const kindWords: Record<Obstacle['kind'], string> = {
	box: 'box',
	tree: 'tree',
	building: 'building',
	wall: 'wall',
	mast: 'mast'
};

/** What an obstacle is, in a word. */
export function kindWord(obstacle: Obstacle): string {
	return obstacle.kind === 'wall' && obstacle.transmission > 0 ? 'fence' : kindWords[obstacle.kind];
}
