import type { PaperRect } from './drawing';
import type { Pen } from './pen';
import { upperSpace } from './sheet-frame';
import { sheetColours as c } from './sheet-colours';
import { cutToWidth } from './text-fit';

export interface ListColumn {
	head: string;
	/** Second line of the head: the unit. */
	unit?: string;
	widthMm: number;
	align: 'left' | 'right';
}

const HEAD_MM = 9.6;
export const ROW_MM = 4.9;

/** How many rows a list of this height holds. */
export function rowsThatFit(heightMm: number): number {
	return Math.max(1, Math.floor((heightMm - HEAD_MM) / ROW_MM));
}

/** Space for the title over a list that has its sheet to itself. */
export const LIST_TOP_MM = 11;

/** Title of a list that has its sheet to itself, with a note at the right. */
export function listTitle(pen: Pen, text: string, note: string): void {
	pen.text('words', [upperSpace.xMm + 5, upperSpace.yMm + 7.6], text, { capMm: 3.4, weight: 800 });
	pen.text('words', [upperSpace.xMm + 385, upperSpace.yMm + 7.6], note, {
		capMm: 2.2,
		anchor: 'end',
		colour: c.inkSoft
	});
}

/** Rows by the sheets that they need. */
export function pagesOf<T>(items: T[], size: number): T[][] {
	const pages: T[][] = [];
	for (let i = 0; i < items.length; i += size) pages.push(items.slice(i, i + size));
	return pages;
}

/**
 * A ruled list with a head; text that is too wide ends in an ellipsis.
 * @param shaded which rows lie on a tint; every second one when not told
 */
export function drawList(
	pen: Pen,
	area: PaperRect,
	columns: ListColumn[],
	rows: string[][],
	capMm = 2,
	shaded: (row: number) => boolean = (row) => row % 2 === 1
): void {
	const { xMm: x, yMm: y } = area;
	const width = columns.reduce((sum, column) => sum + column.widthMm, 0);
	pen.rect('table', { xMm: x, yMm: y, widthMm: width, heightMm: HEAD_MM }, { fill: { colour: c.frost } });
	const put = (
		text: string,
		row: number,
		column: ListColumn,
		left: number,
		weight: 400 | 600,
		small = false
	) => {
		const right = column.align === 'right';
		const size = small ? 1.8 : capMm;
		const shown = cutToWidth(text, column.widthMm - 2.4, size, weight);
		pen.text('table', [right ? left + column.widthMm - 1.2 : left + 1.2, row], shown, {
			capMm: size,
			weight,
			anchor: right ? 'end' : 'start',
			...(small ? { colour: c.inkSoft } : {})
		});
	};
	let left = x;
	for (const column of columns) {
		put(column.head, y + 4, column, left, 600);
		if (column.unit) put(column.unit, y + 7.8, column, left, 400, true);
		left += column.widthMm;
	}
	rows.forEach((cells, i) => {
		const top = y + HEAD_MM + i * ROW_MM;
		if (shaded(i)) {
			pen.rect(
				'table',
				{ xMm: x, yMm: top, widthMm: width, heightMm: ROW_MM },
				{ fill: { colour: c.frost, opacity: 0.45 } }
			);
		}
		let cellLeft = x;
		columns.forEach((column, k) => {
			put(cells[k] ?? '', top + ROW_MM / 2 + capMm / 2, column, cellLeft, k === 0 ? 600 : 400);
			cellLeft += column.widthMm;
		});
	});
	const bottom = y + HEAD_MM + rows.length * ROW_MM;
	for (const at of [y, y + HEAD_MM, bottom]) {
		pen.line('table', [x, at], [x + width, at], { colour: c.ink, widthMm: 0.25 });
	}
}
