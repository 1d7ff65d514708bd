import type { Obstacle } from '../core';

const letters: Record<Obstacle['kind'], string> = {
	tree: 'T',
	box: 'B',
	building: 'B',
	wall: 'W',
	mast: 'M'
};

/** `T1`, `T2` for trees, `B1` for buildings and blocks, `W1`, `M1`, in the plot's order: short names for the map. */
export function obstacleCodes(obstacles: Obstacle[]): string[] {
	const counts = new Map<string, number>();
	return obstacles.map(({ kind }) => {
		const letter = letters[kind];
		const number = (counts.get(letter) ?? 0) + 1;
		counts.set(letter, number);
		return `${letter}${number}`;
	});
}
