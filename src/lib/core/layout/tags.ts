import { RADIANS_PER_DEGREE } from '../conventions';
import type { PlanPoint } from '../document';

/** Row letters: 0 is A, 25 is Z, 26 is AA. */
export function rowLetters(index: number): string {
	let rest = index;
	let letters = '';
	do {
		letters = String.fromCharCode(65 + (rest % 26)) + letters;
		rest = Math.floor(rest / 26) - 1;
	} while (rest >= 0);
	return letters;
}

function rowIndex(letters: string): number {
	let index = 0;
	for (const letter of letters) index = index * 26 + (letter.charCodeAt(0) - 64);
	return index - 1;
}

export interface TagOptions {
	/** Points whose distance across the rows is below this belong to one row; half the row pitch serves. */
	rowToleranceM?: number;
	/** Clockwise turn of the rows against east-west. */
	turnDeg?: number;
}

/**
 * Tags for new points, in the points' order: rows lettered from north to south, numbered 01.. from west to east. The
 * letters begin after the last row letter that is already used, so that no tag of a layout is ever given twice.
 */
export function nextTags(
	existing: readonly string[],
	points: readonly PlanPoint[],
	options: TagOptions = {}
): string[] {
	let used = -1;
	for (const tag of existing) {
		const letters = /^([A-Z]{1,3})\d+$/.exec(tag);
		if (letters) used = Math.max(used, rowIndex(letters[1]));
	}
	const turn = (options.turnDeg ?? 0) * RADIANS_PER_DEGREE;
	const tolerance = options.rowToleranceM ?? 2;
	const placed = points.map(([east, north], index) => ({
		index,
		along: east * Math.cos(turn) - north * Math.sin(turn),
		across: east * Math.sin(turn) + north * Math.cos(turn)
	}));
	placed.sort((a, b) => b.across - a.across || a.along - b.along || a.index - b.index);
	const rows: (typeof placed)[] = [];
	let rowStart = Infinity;
	for (const point of placed) {
		if (rows.length === 0 || rowStart - point.across > tolerance) {
			rows.push([]);
			rowStart = point.across;
		}
		rows[rows.length - 1].push(point);
	}
	const tags = new Array<string>(points.length);
	rows.forEach((row, r) => {
		row.sort((a, b) => a.along - b.along || a.index - b.index);
		const digits = Math.max(2, String(row.length).length);
		const letters = rowLetters(used + 1 + r);
		row.forEach((point, k) => {
			const tag = `${letters}${String(k + 1).padStart(digits, '0')}`;
			tags[point.index] = tag;
		});
	});
	return tags;
}
