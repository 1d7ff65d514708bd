import type { Mount, MountEdge } from '../document';
import type { MountPlaceResult } from '../results';
import { rankMount } from './classes';

/** Preferred edges when figures are equal: the top sees most, the bottom collects snow and splash. */
const EDGE_ORDER: Record<MountEdge, number> = { top: 0, right: 1, left: 2, bottom: 3 };

/** The best place of one tracker: class, then blind time, shade, longest run; equal figures prefer the top middle. */
export function comparePlaces(a: MountPlaceResult, b: MountPlaceResult): number {
	return (
		rankMount(a).rank - rankMount(b).rank ||
		a.blindHours - b.blindHours ||
		a.shadedHours - b.shadedHours ||
		a.longestRunMinutes - b.longestRunMinutes ||
		a.runUpMeanMinutes - b.runUpMeanMinutes ||
		compareMounts(a.mount, b.mount)
	);
}

export function compareMounts(a: Mount, b: Mount): number {
	return (
		EDGE_ORDER[a.edge] - EDGE_ORDER[b.edge] || Math.abs(a.alongM) - Math.abs(b.alongM) || a.alongM - b.alongM
	);
}

/** Part of a field that may be left to exceptions when the common place is chosen. */
const LEFT_OUT = 0.05;

/**
 * The place that serves a whole field best. `results[i][c]` is place c on tracker i, the same c being the same place on
 * each. First the worst class when the worst twentieth of the trackers is left to exceptions (in fields under 20 nobody
 * is left out), then how many are worse than sound, then blind time and shade of the field; equal figures prefer the
 * top middle.
 */
export function chooseCommon(results: readonly (readonly MountPlaceResult[])[]): number {
	const places = results[0]?.length ?? 0;
	const leftOut = Math.floor(results.length * LEFT_OUT);
	let best = 0;
	let bestScore: number[] | null = null;
	for (let c = 0; c < places; c++) {
		const ranks = results.map((own) => rankMount(own[c]).rank).sort((a, b) => b - a);
		const sum = (key: 'blindHours' | 'shadedHours') =>
			Math.round(results.reduce((total, own) => total + own[c][key], 0) * 1e3);
		const score = [
			ranks[leftOut],
			ranks.filter((rank) => rank > 1).length,
			sum('blindHours'),
			sum('shadedHours')
		];
		let order = 0;
		if (bestScore !== null) {
			for (let k = 0; k < score.length && order === 0; k++) order = score[k] - bestScore[k];
			if (order === 0) order = compareMounts(results[0][c].mount, results[0][best].mount);
		}
		if (bestScore === null || order < 0) {
			best = c;
			bestScore = score;
		}
	}
	return best;
}
