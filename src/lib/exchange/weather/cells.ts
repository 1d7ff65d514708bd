import { formatNumber } from '$lib/i18n';
import { readText, refusal, type Refusal } from '../read-text';

/** Largest weather file that is read, bytes: a year of hours with every column stays under 2 MB. */
export const MAX_WEATHER_BYTES = 5_000_000;

/** A line of the file: its number from 1, and its cells. */
export interface WeatherLine {
	line: number;
	cells: string[];
}

/** What a column holds and how a missing value is marked. */
export interface WeatherColumn {
	/** From 0; `null` for a column that this file does not have. */
	index: number | null;
	/** As a person calls it, with its unit. */
	name: string;
	least: number;
	most: number;
	isMissing: (value: number) => boolean;
}

/** Zero offset of a sensor at night, W/m²: read as nothing. Lower values are no irradiance. */
export const NIGHT_OFFSET = -20;

/** The lines of a weather file, any line end, empty ones left out. City names in the old Windows letters are read too. */
export function weatherLines(
	input: Uint8Array | string,
	wanted: string
): { ok: true; lines: WeatherLine[]; warnings: string[] } | Refusal {
	const size = typeof input === 'string' ? input.length : input.byteLength;
	if (size > MAX_WEATHER_BYTES) {
		return refusal(
			'too-large',
			`The file has ${formatNumber(size / 1e6, 1)} MB; at most 5 MB are read.`,
			'Choose a file with one year of hours.'
		);
	}
	const warnings: string[] = [];
	let read = readText(input, wanted);
	if (!read.ok && read.problem === 'not-utf8' && typeof input !== 'string' && !isWide(input)) {
		warnings.push('The file is not written in UTF-8; its letters were read as Windows-1252.');
		read = readText(new TextDecoder('windows-1252').decode(input), wanted);
	}
	if (!read.ok) return read;
	const lines = read.text
		.split(/\r\n|\n|\r/)
		.map((text, index) => ({ line: index + 1, text }))
		.filter(({ text }) => text.replace(/[,\s"]/g, '') !== '')
		.map(({ line, text }) => ({ line, cells: splitCells(text) }));
	if (lines.length > 0 && lines[0].cells.length < 3 && /[;\t].*[;\t]/.test(lines[0].cells.join(','))) {
		return refusal(
			'wrong-separator',
			`Row ${lines[0].line} separates its columns by semicolons or tabs, not by commas.`,
			'Choose the file as it was downloaded; a spreadsheet has saved this one anew.'
		);
	}
	return { ok: true, lines, warnings };
}

function isWide(bytes: Uint8Array): boolean {
	return (bytes[0] === 0xff && bytes[1] === 0xfe) || (bytes[0] === 0xfe && bytes[1] === 0xff);
}

/** Cells of a line between commas; a quoted cell may hold commas and doubled quotes. */
function splitCells(text: string): string[] {
	if (!text.includes('"')) return text.split(',').map((cell) => cell.trim());
	const cells: string[] = [];
	let cell = '';
	let quoted = false;
	for (let i = 0; i < text.length; i++) {
		const letter = text[i];
		if (letter === '"' && quoted && text[i + 1] === '"') {
			cell += '"';
			i += 1;
		} else if (letter === '"') quoted = !quoted;
		else if (letter === ',' && !quoted) {
			cells.push(cell.trim());
			cell = '';
		} else cell += letter;
	}
	cells.push(cell.trim());
	return cells;
}

/** "Row 12, column 14 (global horizontal)": how a cell is named in a refusal. */
export function cellName(line: number, index: number, name: string): string {
	return `Row ${line}, column ${index + 1} (${name})`;
}

/** A decimal number with a point; NaN for anything else. */
export function plainNumber(cell: string): number {
	return /^[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d+)?$/.test(cell) ? Number(cell) : Number.NaN;
}

/** The value of a cell, null where it is empty or marked missing; or the refusal that names row and column. */
export function readValue(
	row: WeatherLine,
	column: WeatherColumn
): { ok: true; value: number | null } | Refusal {
	if (column.index === null) return { ok: true, value: null };
	const cell = row.cells[column.index] ?? '';
	if (cell === '') return { ok: true, value: null };
	const value = plainNumber(cell);
	const where = cellName(row.line, column.index, column.name);
	if (!Number.isFinite(value)) {
		return refusal(
			'not-a-number',
			`${where} is "${cell.slice(0, 30)}", not a number.`,
			'Write it with a decimal point, or leave the cell empty where the value is missing.'
		);
	}
	if (column.isMissing(value)) return { ok: true, value: null };
	if (value < column.least || value > column.most) {
		return refusal(
			'out-of-range',
			`${where} is ${cell}; it must lie from ${column.least} to ${column.most}.`,
			'Correct the value, or leave the cell empty where it is missing.'
		);
	}
	return { ok: true, value };
}

/** A number of the file's head that must be there and lie within bounds. */
export function readHead(
	row: WeatherLine,
	index: number,
	name: string,
	least: number,
	most: number
): { ok: true; value: number } | Refusal {
	const cell = row.cells[index] ?? '';
	const value = plainNumber(cell);
	if (value >= least && value <= most) return { ok: true, value };
	return refusal(
		'bad-head',
		`${cellName(row.line, index, name)} is "${cell.slice(0, 30)}"; it must be a number from ${least} to ${most}.`,
		`Write the ${name} of the station there.`
	);
}
