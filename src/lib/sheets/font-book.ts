import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import * as fontkit from 'fontkit';
import type { LetterWeight } from './drawing';

/** The files that the sheet face comes in, first choice first. */
export const fontSubsets = ['latin', 'latin-ext', 'greek', 'cyrillic', 'cyrillic-ext', 'vietnamese'] as const;
export type FontSubset = (typeof fontSubsets)[number];

/** Height of Manrope's capitals and its em, in font units (read from the shipped files; a test compares). */
export const CAP_HEIGHT_PER_EM = 1440 / 2000;

interface SheetFont {
	bytes: Buffer;
	face: fontkit.Font;
	/** Advance width over em, by code point. */
	widths: Map<number, number>;
}

const require = createRequire(import.meta.url);
const book = new Map<string, SheetFont>();

/** The `.woff` file of one subset and weight: the PDF writer draws nothing from `.woff2`. Read once, kept. */
export function sheetFont(subset: FontSubset, weight: LetterWeight): SheetFont {
	const key = `${subset}-${weight}`;
	const known = book.get(key);
	if (known) return known;
	const file = require.resolve(`@fontsource/manrope/files/manrope-${subset}-${weight}-normal.woff`);
	const bytes = readFileSync(file);
	const opened = fontkit.create(bytes);
	if (!('layout' in opened)) throw new Error(`The font file ${key} holds a collection, not one face.`);
	const font = { bytes, face: opened, widths: new Map<number, number>() };
	book.set(key, font);
	return font;
}

const subsetOf = new Map<number, FontSubset | null>();

/** The first subset that holds a glyph for this code point, or null. All weights hold the same characters. */
export function fontOf(codePoint: number): FontSubset | null {
	const known = subsetOf.get(codePoint);
	if (known !== undefined) return known;
	const found = fontSubsets.find((subset) => sheetFont(subset, 400).face.hasGlyphForCodePoint(codePoint));
	subsetOf.set(codePoint, found ?? null);
	return found ?? null;
}

export interface FontRun {
	subset: FontSubset;
	text: string;
}

/** Splits text that went through `lettered` into runs of one font file each. A character no font has is left out. */
export function fontRuns(text: string): FontRun[] {
	const runs: FontRun[] = [];
	for (const character of text) {
		const subset = fontOf(character.codePointAt(0) ?? 32);
		if (!subset) continue;
		const last = runs[runs.length - 1];
		if (last && last.subset === subset) last.text += character;
		else runs.push({ subset, text: character });
	}
	return runs;
}

/**
 * Width of one line in millimetres, letter by letter without kerning: within 2 % of the drawn width and rarely below
 * it. For fitting only; the PDF writer measures again for exact anchoring.
 */
export function lineWidthMm(text: string, capMm: number, weight: LetterWeight): number {
	let ems = 0;
	for (const character of text) {
		const code = character.codePointAt(0) ?? 32;
		const subset = fontOf(code);
		if (!subset) continue;
		const font = sheetFont(subset, weight);
		let width = font.widths.get(code);
		if (width === undefined) {
			width = font.face.glyphForCodePoint(code).advanceWidth / font.face.unitsPerEm;
			font.widths.set(code, width);
		}
		ems += width;
	}
	return (ems * capMm) / CAP_HEIGHT_PER_EM;
}
