import type { LetterWeight } from './drawing';
import { lineWidthMm } from './font-book';
import { lettered } from './letters';

/** Smallest lettering on any sheet, capital height in millimetres. */
export const MIN_CAP_MM = 1.8;

/** Cuts a line so that it fits, ending in an ellipsis when something was cut. */
export function cutToWidth(text: string, widthMm: number, capMm: number, weight: LetterWeight): string {
	const line = lettered(text);
	if (lineWidthMm(line, capMm, weight) <= widthMm) return line;
	const characters = [...line];
	while (characters.length > 0) {
		characters.pop();
		const shorter = `${characters.join('').trimEnd()}…`;
		if (lineWidthMm(shorter, capMm, weight) <= widthMm) return shorter;
	}
	return '';
}

/** Lines that fit the width, broken at blanks, inside a word only when the word alone is too long. */
export function wrap(text: string, widthMm: number, capMm: number, weight: LetterWeight): string[] {
	const fits = (line: string) => lineWidthMm(line, capMm, weight) <= widthMm;
	const lines: string[] = [];
	let line = '';
	for (const word of lettered(text).split(/\s+/).filter(Boolean)) {
		const longer = line ? `${line} ${word}` : word;
		if (fits(longer)) {
			line = longer;
			continue;
		}
		if (line) lines.push(line);
		line = '';
		for (const character of word) {
			if (line && !fits(line + character)) {
				lines.push(line);
				line = '';
			}
			line += character;
		}
	}
	if (line) lines.push(line);
	return lines;
}

/** The largest of some sizes at which the text needs at most so many lines; at the smallest size the rest is cut. */
export function fitLines(
	text: string,
	widthMm: number,
	maxLines: number,
	capSizesMm: number[],
	weight: LetterWeight
): { lines: string[]; capMm: number } {
	for (const capMm of capSizesMm) {
		const lines = wrap(text, widthMm, capMm, weight);
		if (lines.length <= maxLines) return { lines, capMm };
	}
	const capMm = capSizesMm[capSizesMm.length - 1];
	const all = wrap(text, widthMm, capMm, weight);
	const kept = all.slice(0, maxLines - 1);
	return { lines: [...kept, cutToWidth(all.slice(maxLines - 1).join(' '), widthMm, capMm, weight)], capMm };
}
