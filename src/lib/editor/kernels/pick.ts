import type { PlanPoint, Tracker } from '$lib/core';

export interface PlanBox {
	westM: number;
	eastM: number;
	southM: number;
	northM: number;
}

export function boxOf(a: PlanPoint, b: PlanPoint): PlanBox {
	return {
		westM: Math.min(a[0], b[0]),
		eastM: Math.max(a[0], b[0]),
		southM: Math.min(a[1], b[1]),
		northM: Math.max(a[1], b[1])
	};
}

/** Smallest box around points; null for none. */
export function extentOf(points: readonly PlanPoint[]): PlanBox | null {
	if (points.length === 0) return null;
	const box = { westM: Infinity, eastM: -Infinity, southM: Infinity, northM: -Infinity };
	for (const [eastM, northM] of points) {
		box.westM = Math.min(box.westM, eastM);
		box.eastM = Math.max(box.eastM, eastM);
		box.southM = Math.min(box.southM, northM);
		box.northM = Math.max(box.northM, northM);
	}
	return box;
}

/** Trackers whose foot lies in the box, edges included. */
export function idsInBox(trackers: readonly Tracker[], box: PlanBox): string[] {
	return trackers
		.filter(
			({ eastM, northM }) =>
				eastM >= box.westM && eastM <= box.eastM && northM >= box.southM && northM <= box.northM
		)
		.map(({ id }) => id);
}

/** Index of the tracker whose foot is nearest to the point within `reachM`; -1 for none. */
export function nearestFoot(trackers: readonly Tracker[], point: PlanPoint, reachM: number): number {
	let best = -1;
	let bestM = reachM;
	trackers.forEach((tracker, index) => {
		const distanceM = Math.hypot(tracker.eastM - point[0], tracker.northM - point[1]);
		if (distanceM <= bestM) {
			best = index;
			bestM = distanceM;
		}
	});
	return best;
}

/** The selection after a click: alone, or with shift added to or taken from what was selected. */
export function selectionAfterClick(
	selected: readonly string[],
	hitId: string | null,
	additive: boolean
): string[] {
	if (hitId === null) return additive ? [...selected] : [];
	if (!additive) return [hitId];
	return selected.includes(hitId) ? selected.filter((id) => id !== hitId) : [...selected, hitId];
}
