import type { GroundPoint } from '../core';
import { readNumber } from '../i18n/parse-quantity';
import { MAX_GROUND_POINTS, MAX_REACH_M } from '../schema/plot';
import { groundFault } from '../schema/ground';

export interface HeightsProblem {
	/** From 1; null for the list as a whole. */
	line: number | null;
	message: string;
}

export interface HeightsRead {
	points: GroundPoint[];
	problems: HeightsProblem[];
	/** Problems beyond those listed. */
	more: number;
}

const MOST_PROBLEMS = 8;
const fields = ['east', 'north', 'height'] as const;
const limits = {
	east: [-MAX_REACH_M, MAX_REACH_M],
	north: [-MAX_REACH_M, MAX_REACH_M],
	height: [-1000, 9000]
};

/**
 * Heights as text: east, north, height in metres, one to a line, between blanks, tabs, semicolons or commas; a decimal
 * comma where commas don't part the numbers. Empty lines, lines that begin with # or // and a first line of words are
 * passed over. Any line that does not hold is told with its number, and then nothing should be taken.
 */
export function readHeights(text: string): HeightsRead {
	const points: GroundPoint[] = [];
	const lineOf: number[] = [];
	const problems: HeightsProblem[] = [];
	let more = 0;
	const tell = (line: number | null, message: string) => {
		if (problems.length < MOST_PROBLEMS) problems.push({ line, message });
		else more += 1;
	};
	let first = true;
	text.split(/\r\n|\n|\r/).forEach((raw, index) => {
		const line = raw.trim();
		if (line === '' || line.startsWith('#') || line.startsWith('//')) return;
		const isFirst = first;
		first = false;
		const cells = cellsOf(line);
		if (isFirst && !/\d/.test(line)) return;
		if (cells.length !== 3) {
			tell(index + 1, `${cells.length} values: give east, north and height.`);
			return;
		}
		const numbers: number[] = [];
		for (const [k, cell] of cells.entries()) {
			const value = readNumber(cell);
			const [low, high] = limits[fields[k]];
			if (value === null) {
				tell(index + 1, `“${cell.slice(0, 20)}” is no number for the ${fields[k]}.`);
				return;
			}
			if (value < low || value > high) {
				tell(index + 1, `The ${fields[k]} must lie between ${low} and ${high} m.`);
				return;
			}
			numbers.push(value);
		}
		points.push([numbers[0], numbers[1], numbers[2]]);
		lineOf.push(index + 1);
	});
	if (problems.length === 0) {
		if (points.length > MAX_GROUND_POINTS)
			tell(null, `${points.length} heights: at most ${MAX_GROUND_POINTS} are taken. Thin them out.`);
		else {
			const fault = groundFault(points);
			if (fault) tell(fault.index === null ? null : lineOf[fault.index], fault.message);
		}
	}
	return { points, problems, more };
}

/** The values of a line: parted by semicolons or tabs, else by blanks, else by commas. */
function cellsOf(line: string): string[] {
	if (/[;\t]/.test(line)) return line.split(/[;\t]/).map((cell) => cell.trim());
	const commas = line.split(',');
	// "1.5, 2.5, 3" has its blanks after commas; "1,5 2,5 3" has decimal commas between blanks.
	const byBlanks = line.split(/\s+/);
	if (byBlanks.length === 3 && !byBlanks.slice(0, 2).every((cell) => cell.endsWith(','))) return byBlanks;
	return commas.length > 1 ? commas.map((cell) => cell.trim()) : byBlanks;
}
