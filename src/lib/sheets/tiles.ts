import type { PegRow } from '../schema/peg-row';

/** Most trackers on one setting-out sheet (common practice, no source). */
export const MAX_TRACKERS_A_SHEET = 100;

/**
 * Splits trackers into compact groups: the longer side of the extent is cut at the widest gap near its middle, again
 * and again, until every group may stand on one sheet. Groups come from north to south, then west to east.
 * @param fits whether a group can stand on one sheet
 */
export function splitIntoTiles(rows: PegRow[], fits: (rows: PegRow[]) => boolean): PegRow[][] {
	const done: PegRow[][] = [];
	const open = [rows];
	for (let group = open.pop(); group; group = open.pop()) {
		const halves = group.length > 1 && !fits(group) ? cutInTwo(group) : null;
		if (halves) open.push(...halves);
		else done.push(group);
	}
	const middle = (group: PegRow[], of: (row: PegRow) => number) =>
		group.reduce((sum, row) => sum + of(row), 0) / group.length;
	return done
		.map((group) => ({ group, east: middle(group, (r) => r.eastM), north: middle(group, (r) => r.northM) }))
		.sort((a, b) => (Math.abs(a.north - b.north) > 1 ? b.north - a.north : a.east - b.east))
		.map(({ group }) => group);
}

/** Null when all trackers stand on one spot, so that no cut helps. */
function cutInTwo(rows: PegRow[]): [PegRow[], PegRow[]] | null {
	const span = (of: (row: PegRow) => number) => {
		const values = rows.map(of);
		return Math.max(...values) - Math.min(...values);
	};
	const eastSpan = span((row) => row.eastM);
	const northSpan = span((row) => row.northM);
	if (Math.max(eastSpan, northSpan) < 1e-6) return null;
	const of = eastSpan >= northSpan ? (row: PegRow) => row.eastM : (row: PegRow) => row.northM;
	const sorted = [...rows].sort((a, b) => of(a) - of(b));
	let cut = -1;
	let widest = -1;
	// Gaps near the middle count full, those towards the ends less, so that halves stay alike.
	for (let i = 1; i < sorted.length; i += 1) {
		const balance = Math.min(i, sorted.length - i) / (sorted.length / 2);
		const gap = (of(sorted[i]) - of(sorted[i - 1])) * balance;
		if (gap > widest) [cut, widest] = [i, gap];
	}
	return [sorted.slice(0, cut), sorted.slice(cut)];
}
