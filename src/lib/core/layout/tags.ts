import { RADIANS_PER_DEGREE } from '../conventions';
import type { PlanPoint } from '../document';

/** Letters of rows: no I and no O, which a number beside them turns into 1 and 0. */
const ROW_ALPHABET = 'ABCDEFGHJKLMNPQRSTUVWXYZ';

/** Row letters: 0 is A, 23 is Z, 24 is AA; I and O are passed over. */
export function rowLetters(index: number): string {
	let rest = index;
	let letters = '';
	do {
		letters = ROW_ALPHABET[rest % ROW_ALPHABET.length] + letters;
		rest = Math.floor(rest / ROW_ALPHABET.length) - 1;
	} while (rest >= 0);
	return letters;
}

/** Place of row letters in their order; a letter that is passed over (typed by hand) counts as the one before it. */
function rowIndex(letters: string): number {
	let index = 0;
	for (const letter of letters) {
		const place = [...ROW_ALPHABET].filter((known) => known <= letter).length;
		index = index * ROW_ALPHABET.length + place;
	}
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
