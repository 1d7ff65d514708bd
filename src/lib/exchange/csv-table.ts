import { refusal, type Refusal } from './read-text';

export interface TableRow {
	/** Line number in the file, from 1. */
	line: number;
	cells: string[];
}

export interface Table {
	/** Words of the first line when it holds no numbers. */
	heading: string[] | null;
	rows: TableRow[];
}

/** Rows beyond this are no list that a person made. */
const MAX_ROWS = 20_000;

/**
 * Splits lines into cells. Takes the separator that the file uses: semicolon, tab, comma, or blanks where a comma is the
 * decimal mark. Empty lines and lines that start with `#` are left out. Any line end will do.
 */
export function splitTable(text: string, wanted: string): ({ ok: true } & Table) | Refusal {
	const lines = text.split(/\r\n|\n|\r/);
	if (lines.length > MAX_ROWS) {
		return refusal(
			'too-many-rows',
			`The file has ${lines.length} lines.`,
			`Choose ${wanted} with one row a bearing.`
		);
	}
	if (text.trimStart().startsWith('<') || text.trimStart().startsWith('{')) {
		return refusal('wrong-type', `This is not ${wanted}.`, `Choose ${wanted}, one pair a line.`);
	}
	const filled = lines
		.map((content, index) => ({ line: index + 1, content: content.trim() }))
		.filter(({ content }) => content !== '' && !content.startsWith('#'));
	const separator = chooseSeparator(filled.map(({ content }) => content));
	const rows = filled.map(({ line, content }) => ({
		line,
		cells: trimTail(content.split(separator).map((cell) => cell.trim()))
	}));
	const hasHeading = rows.length > 0 && rows[0].cells.every((cell) => cell === '' || /\p{L}{3}/u.test(cell));
	return { ok: true, heading: hasHeading ? rows[0].cells : null, rows: hasHeading ? rows.slice(1) : rows };
}

function chooseSeparator(lines: string[]): string | RegExp {
	if (lines.some((line) => line.includes(';'))) return ';';
	if (lines.some((line) => line.includes('\t'))) return '\t';
	const numbers = lines.filter((line) => /^[\s"'+\u2212-]*[\d.,]/.test(line));
	if (numbers.length > 0 && numbers.every((line) => /^\S+\s+\S+$/.test(line) && !/,\s/.test(line)))
		return /\s+/;
	return ',';
}

/** Spreadsheets end short rows with empty cells. */
function trimTail(cells: string[]): string[] {
	const kept = [...cells];
	while (kept.length > 2 && kept[kept.length - 1] === '') kept.pop();
	return kept;
}
