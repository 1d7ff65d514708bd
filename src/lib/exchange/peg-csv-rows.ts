import { groundHeightM, reachRadiusM, type Layout, type Place, type Plot } from '../core';
import type { PegRow } from '../schema/peg-row';
import { lonLatFromLocal } from './plan-projection';

/**
 * The trackers of a layout as they are set out, by tag in natural order (`A2` before `A10`).
 * Trackers whose model the layout does not hold are left out; the schema does not let such a layout in.
 */
export function pegRows(place: Place, plot: Plot, layout: Layout): PegRow[] {
	const models = new Map(layout.models.map((model) => [model.id, { model, reachM: reachRadiusM(model) }]));
	const toLonLat = lonLatFromLocal(place);
	const rows: PegRow[] = [];
	for (const tracker of [...layout.trackers].sort((a, b) => compareTags(a.tag, b.tag))) {
		const known = models.get(tracker.modelId);
		if (!known) continue;
		const own = layout.mounts.exceptions[tracker.id];
		const groundM = groundHeightM(plot.ground, tracker.eastM, tracker.northM);
		const axisHeightM = tracker.axisHeightM ?? known.model.axisHeightM;
		const [longitudeDeg, latitudeDeg] = toLonLat(tracker.eastM, tracker.northM);
		rows.push({
			number: rows.length + 1,
			trackerId: tracker.id,
			tag: tracker.tag,
			eastM: tracker.eastM,
			northM: tracker.northM,
			groundM,
			axisHeightM,
			axisLevelM: groundM + axisHeightM,
			latitudeDeg,
			longitudeDeg,
			modelId: known.model.id,
			modelName: known.model.name,
			reachM: known.reachM,
			stops: known.model.stops,
			posture: tracker.posture,
			mount: own ?? layout.mounts.common,
			ownMount: own !== undefined
		});
	}
	return rows;
}

/** Tags by their letters and, within them, by the size of their numbers; the same everywhere, whatever the language. */
export function compareTags(a: string, b: string): number {
	const [partsA, partsB] = [a, b].map((tag) => tag.match(/\d+|\D+/g) ?? []);
	for (let i = 0; i < Math.min(partsA.length, partsB.length); i += 1) {
		const [x, y] = [partsA[i], partsB[i]];
		if (/^\d/.test(x) && /^\d/.test(y)) {
			const difference = Number(x) - Number(y);
			if (difference) return difference;
		} else if (x !== y) return x < y ? -1 : 1;
	}
	return partsA.length - partsB.length || (a < b ? -1 : a > b ? 1 : 0);
}
