/** One column of a DataTable. */
export interface Column<Row> {
	key: string;
	label: string;
	/** Shown after the label, and in the CSV heading. */
	unit?: string;
	/** Numbers stand right. */
	align?: 'left' | 'right';
	/** What is sorted, copied and downloaded: plain numbers, so that a spreadsheet can read them. */
	value: (row: Row) => string | number | null;
	/** What is shown; the value itself when left out. */
	text?: (row: Row) => string;
}

export type Order = { key: string; down: boolean };

/** Rows in the order of one column; empty cells last, text in natural order (B2 before B10), equal rows stay as they stood. */
export function sortRows<Row>(
	rows: readonly Row[],
	columns: readonly Column<Row>[],
	order: Order | null
): Row[] {
	const column = order && columns.find(({ key }) => key === order.key);
	if (!column) return [...rows];
	const sign = order.down ? -1 : 1;
	return [...rows].sort((a, b) => {
		const [x, y] = [column.value(a), column.value(b)];
		if (x === null || y === null) return x === y ? 0 : x === null ? 1 : -1;
		if (typeof x === 'number' && typeof y === 'number') return sign * (x - y);
		return sign * String(x).localeCompare(String(y), 'en', { numeric: true });
	});
}

const heading = <Row>(column: Column<Row>) =>
	column.unit ? `${column.label} (${column.unit})` : column.label;

/** Tab-separated text with headings, for pasting into a spreadsheet. */
export function tableAsTsv<Row>(rows: readonly Row[], columns: readonly Column<Row>[]): string {
	const cell = (value: string | number | null) => String(value ?? '').replace(/[\t\r\n]+/g, ' ');
	return [columns.map(heading), ...rows.map((row) => columns.map((column) => cell(column.value(row))))]
		.map((cells) => cells.join('\t'))
		.join('\n');
}

/** CSV after RFC 4180: comma, CRLF, quotes doubled. Text that a spreadsheet would run as a formula gets a leading apostrophe. */
export function tableAsCsv<Row>(rows: readonly Row[], columns: readonly Column<Row>[]): string {
	const cell = (value: string | number | null) => {
		if (typeof value === 'number') return String(value);
		const text = (value ?? '').replace(/^(?=[=+\-@\t\r])/, "'");
		return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
	};
	return [columns.map(heading), ...rows.map((row) => columns.map((column) => column.value(row)))]
		.map((cells) => cells.map(cell).join(',') + '\r\n')
		.join('');
}
