import type { GroundPoint } from '$lib/core';

/** What reading pasted heights gives: the heights, and per line what is wrong. */
export type ReadHeights = (text: string) => {
	points: GroundPoint[];
	problems: { line: number | null; message: string }[];
	more: number;
};
