import { nextTags, type PlanPoint, type Tracker } from '$lib/core';

const tagPattern = /^([A-Z]{1,3})(\d+)$/;

/**
 * Tag for one more tracker: the next free number of the row that it joins (the nearest tracker within `toleranceM` north or south
 * gives the row), else the first number of a new row.
 */
export function tagForOne(trackers: readonly Tracker[], point: PlanPoint, toleranceM = 2): string {
	const neighbours = trackers
		.filter(({ tag, northM }) => tagPattern.test(tag) && Math.abs(northM - point[1]) <= toleranceM)
		.sort((a, b) => Math.abs(a.eastM - point[0]) - Math.abs(b.eastM - point[0]));
	const letters = neighbours[0] ? tagPattern.exec(neighbours[0].tag)?.[1] : undefined;
	if (letters === undefined)
		return nextTags(
			trackers.map(({ tag }) => tag),
			[point]
		)[0];
	let highest = 0;
	for (const { tag } of trackers) {
		const parts = tagPattern.exec(tag);
		if (parts?.[1] === letters) highest = Math.max(highest, Number(parts[2]));
	}
	return letters + String(highest + 1).padStart(2, '0');
}
