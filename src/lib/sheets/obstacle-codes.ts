import type { Obstacle } from '../core';

/** `T1`, `T2` for trees and `B1` for boxes, in the plot's order: short names for the map, listed with the coordinates. */
export function obstacleCodes(obstacles: Obstacle[]): string[] {
	const counts = { tree: 0, box: 0 };
	return obstacles.map(({ kind }) => {
		counts[kind] += 1;
		return `${kind === 'tree' ? 'T' : 'B'}${counts[kind]}`;
	});
}
