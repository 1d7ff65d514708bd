import type { Mount, TrackerModel } from '../core';
import type { PegRow } from '../schema/peg-row';
import { drawList, rowsThatFit, type ListColumn } from './list-sheet';
import { millimetres, mountDimensions } from './mount-words';
import type { Pen } from './pen';
import type { PlanContent } from './plan-content';
import { framedSheet, upperSpace } from './sheet-frame';
import { sheetColours as c } from './sheet-colours';
import type { SheetBuilder } from './site-sheets';

const columns: ListColumn[] = [
	{ head: 'Tag', widthMm: 18, align: 'left' },
	{ head: 'Edge', widthMm: 15, align: 'left' },
	{ head: 'Side', widthMm: 12, align: 'left' },
	{ head: 'from side', unit: 'mm', widthMm: 17, align: 'right' },
	{ head: 'from top', unit: 'mm', widthMm: 17, align: 'right' },
	{ head: 'out', unit: 'mm', widthMm: 13, align: 'right' },
	{ head: 'ahead', unit: 'mm', widthMm: 13, align: 'right' }
];
const listWidthMm = columns.reduce((sum, column) => sum + column.widthMm, 0);

/** The list's place on the mount drawing: above the postures, with a line under it for where it goes on. */
const onDrawing = { xMm: 300, yMm: 33, widthMm: listWidthMm, heightMm: 82 };
const TOP_MM = 13;
const BESIDE_MM = 18;
const LISTS_A_SHEET = 3;

/** Trackers of a model that have their own place, in the order of setting out. */
function exceptionsOf(content: PlanContent, model: TrackerModel): PegRow[] {
	return content.rows.filter((row) => row.ownMount && row.mount && row.modelId === model.id);
}

/** Those that stand on the mount drawing, and those that follow. */
function splitExceptions(own: PegRow[]): { here: PegRow[]; later: PegRow[] } {
	const room = rowsThatFit(onDrawing.heightMm);
	return { here: own.slice(0, room), later: own.slice(room) };
}

function cells(row: PegRow, model: TrackerModel): string[] {
	const d = mountDimensions(row.mount as Mount, model);
	return [
		row.tag,
		d.edge,
		d.side,
		millimetres(d.fromSideM),
		millimetres(d.fromTopM),
		millimetres(d.outM),
		millimetres(d.forwardM)
	];
}

/**
 * Exceptions on the mount drawing itself.
 * @param nextSheet number of the sheet on which the rest follows, when there is a rest
 */
export function drawExceptions(pen: Pen, content: PlanContent, model: TrackerModel, nextSheet: number): void {
	const { xMm: x, yMm: y, heightMm } = onDrawing;
	const own = exceptionsOf(content, model);
	const head = own.length > 0 ? `Exceptions: ${own.length}` : 'Exceptions';
	pen.text('words', [x, y - 3], head, { capMm: 2.6, weight: 800 });
	if (own.length === 0) {
		pen.paragraph(
			'words',
			[x, y - 0.6],
			104,
			content.layout.mounts.common ? 'None: this place is for every tracker of this model.' : 'None listed.'
		);
		return;
	}
	const { here, later } = splitExceptions(own);
	drawList(
		pen,
		onDrawing,
		columns,
		here.map((row) => cells(row, model))
	);
	if (later.length > 0) {
		pen.text('words', [x + 1.2, y + heightMm + 2.6], `and ${later.length} more: see sheet ${nextSheet}`, {
			capMm: 2,
			weight: 800,
			colour: c.stop
		});
	}
}

/** Sheets for the exceptions that find no room on the mount drawing; none when all do. */
export function exceptionSheets(content: PlanContent, model: TrackerModel, drawing: string): SheetBuilder[] {
	const { later } = splitExceptions(exceptionsOf(content, model));
	const perList = rowsThatFit(upperSpace.heightMm - TOP_MM - 4);
	const perSheet = perList * LISTS_A_SHEET;
	const pages = Math.ceil(later.length / perSheet);
	return Array.from({ length: pages }, (_, page) => (place) => {
		const rows = later.slice(page * perSheet, (page + 1) * perSheet);
		const name = `${drawing}, exceptions${pages > 1 ? ` ${page + 1} of ${pages}` : ''}`;
		return framedSheet(content, place, { name, documentType: 'Mount drawing', scale: null }, (pen) => {
			const { xMm, yMm } = upperSpace;
			pen.text('words', [xMm + 5, yMm + 7.6], name, { capMm: 3.4, weight: 800 });
			pen.text(
				'words',
				[xMm + 385, yMm + 7.6],
				'seen facing the glass, from the glass edges to the centre of the sensor head',
				{ capMm: 2.2, anchor: 'end', colour: c.inkSoft }
			);
			for (let k = 0; k * perList < rows.length; k += 1) {
				const area = { ...onDrawing, xMm: xMm + 5 + k * (listWidthMm + BESIDE_MM), yMm: yMm + TOP_MM };
				const part = rows.slice(k * perList, (k + 1) * perList);
				drawList(
					pen,
					area,
					columns,
					part.map((row) => cells(row, model))
				);
			}
		});
	});
}
