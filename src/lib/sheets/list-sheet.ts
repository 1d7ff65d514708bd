import type { PaperRect } from './drawing';
import type { Pen } from './pen';
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

/** A ruled list with a head; text that is too wide ends in an ellipsis. */
export function drawList(
	pen: Pen,
	area: PaperRect,
	columns: ListColumn[],
	rows: string[][],
	capMm = 2
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
		if (i % 2) {
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
