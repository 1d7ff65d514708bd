import type { PegRow } from '../schema/peg-row';

/** Rounded to the millimetre, as every list prints it, so that a sum by hand agrees to the last digit. */
export const toMillimetre = (valueM: number) => Math.round(valueM * 1000) / 1000 + 0;

/** Sums of the printed figures: a list that was cut off or changed does not add up to them. */
export function checkSums(rows: PegRow[]): { count: number; eastM: number; northM: number } {
	// Summed in whole millimetres: no rounding gathers.
	const sum = (of: (row: PegRow) => number) =>
		rows.reduce((total, row) => total + Math.round(toMillimetre(of(row)) * 1000), 0) / 1000;
	return { count: rows.length, eastM: sum((row) => row.eastM), northM: sum((row) => row.northM) };
}

/** Two distances between far trackers, to be taped or measured once the pegs stand: metres on the level. */
export function checkDistances(rows: PegRow[]): { from: string; to: string; metres: number }[] {
	if (rows.length < 2) return [];
	const between = (a: PegRow, b: PegRow) => Math.hypot(a.eastM - b.eastM, a.northM - b.northM);
	const extreme = (of: (row: PegRow) => number) =>
		[
			rows.reduce((m, row) => (of(row) < of(m) ? row : m)),
			rows.reduce((m, row) => (of(row) > of(m) ? row : m))
		] as const;
	const pairs = [extreme((row) => row.eastM + row.northM), extreme((row) => row.eastM - row.northM)];
	return pairs
		.filter(([a, b]) => a !== b)
		.map(([a, b]) => ({ from: a.tag, to: b.tag, metres: toMillimetre(between(a, b)) }));
}
