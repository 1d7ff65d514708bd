import { describe, expect, it } from 'vitest';
import { sortRows, tableAsCsv, tableAsTsv, type Column } from './table';

type Row = { tag: string; loss: number | null };
const rows: Row[] = [
	{ tag: 'B10', loss: 0.2 },
	{ tag: 'B2', loss: null },
	{ tag: 'A1', loss: 0.1 }
];
const columns: Column<Row>[] = [
	{ key: 'tag', label: 'Tag', value: (row) => row.tag },
	{ key: 'loss', label: 'Loss', unit: '%', align: 'right', value: (row) => row.loss }
];
const tags = (list: Row[]) => list.map((row) => row.tag).join(' ');

describe('a table', () => {
	it('sorts tags in natural order and leaves empty cells last both ways', () => {
		expect(tags(sortRows(rows, columns, { key: 'tag', down: false }))).toBe('A1 B2 B10');
		expect(tags(sortRows(rows, columns, { key: 'loss', down: false }))).toBe('A1 B10 B2');
		expect(tags(sortRows(rows, columns, { key: 'loss', down: true }))).toBe('B10 A1 B2');
		expect(tags(sortRows(rows, columns, null))).toBe('B10 B2 A1');
	});

	it('writes CSV with quotes where RFC 4180 asks for them', () => {
		expect(tableAsCsv([{ tag: 'say "hi", all', loss: 1 }], columns)).toBe(
			'Tag,Loss (%)\r\n"say ""hi"", all",1\r\n'
		);
	});

	it('disarms text that a spreadsheet would run, and leaves negative numbers alone', () => {
		expect(tableAsCsv([{ tag: '=1+1', loss: -2 }], columns)).toBe("Tag,Loss (%)\r\n'=1+1,-2\r\n");
	});

	it('copies as tab-separated text', () => {
		expect(tableAsTsv([{ tag: 'a\tb', loss: null }], columns)).toBe('Tag\tLoss (%)\na b\t');
	});
});
