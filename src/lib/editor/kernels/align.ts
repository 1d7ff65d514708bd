import type { PlanPoint, Tracker } from '$lib/core';

/** A line that a dragged tracker has fallen into: the trackers on it share an east or a north value. */
export interface AlignGuide {
	axis: 'east' | 'north';
	valueM: number;
}

export interface Aligned {
	point: PlanPoint;
	guides: AlignGuide[];
}

/** Nearest value within tolerance; null for none. */
function nearestValue(values: readonly number[], valueM: number, toleranceM: number): number | null {
	let best: number | null = null;
	let bestM = toleranceM;
	for (const candidate of values) {
		const distanceM = Math.abs(candidate - valueM);
		if (distanceM <= bestM) {
			best = candidate;
			bestM = distanceM;
		}
	}
	return best;
}

/**
 * Lets a point fall into line with other trackers: its east value, its north value, or both, when they are within
 * `toleranceM` of one of theirs.
 */
export function alignPoint(point: PlanPoint, others: readonly Tracker[], toleranceM: number): Aligned {
	const east = nearestValue(
		others.map((other) => other.eastM),
		point[0],
		toleranceM
	);
	const north = nearestValue(
		others.map((other) => other.northM),
		point[1],
		toleranceM
	);
	const guides: AlignGuide[] = [];
	if (east !== null) guides.push({ axis: 'east', valueM: east });
	if (north !== null) guides.push({ axis: 'north', valueM: north });
	return { point: [east ?? point[0], north ?? point[1]], guides };
}
