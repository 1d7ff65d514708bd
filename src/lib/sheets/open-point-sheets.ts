import { drawList, LIST_TOP_MM, listTitle, pagesOf, rowsThatFit, type ListColumn } from './list-sheet';
import type { PlanContent } from './plan-content';
import { framedSheet, upperSpace } from './sheet-frame';
import type { SheetBuilder } from './site-sheets';
import { wrap } from './text-fit';

const columns: ListColumn[] = [
	{ head: 'No.', widthMm: 14, align: 'right' },
	{ head: 'Open point', widthMm: 300, align: 'left' },
	{ head: 'Settled: name, date', widthMm: 66, align: 'left' }
];
const CAP_MM = 2;
const TOP_MM = LIST_TOP_MM + 16;

/** What was open when the plan was issued, in full, and the reason to issue all the same; no sheet when nothing was. */
export function openPointSheets(content: PlanContent): SheetBuilder[] {
	// A long point takes several lines of the list under one number.
	const lines = content.openPoints.flatMap((point, i) =>
		wrap(point, columns[1].widthMm - 3, CAP_MM, 400).map((text, k) => ({
			number: k ? '' : `${i + 1}`,
			text,
			i
		}))
	);
	const pages = pagesOf(lines, rowsThatFit(upperSpace.heightMm - TOP_MM - 4));
	return pages.map((part, page) => (place) => {
		const name = pages.length > 1 ? `Open points, page ${page + 1} of ${pages.length}` : 'Open points';
		return framedSheet(content, place, { name, documentType: 'Issue record', scale: null }, (pen) => {
			listTitle(pen, name, 'at the time of issue');
			pen.paragraph(
				'words',
				[upperSpace.xMm + 5, upperSpace.yMm + LIST_TOP_MM],
				370,
				`Reason to issue: ${content.heading.reason || 'none given yet'}`,
				{ capMm: 2.2, weight: 600 }
			);
			const area = { ...upperSpace, xMm: upperSpace.xMm + 4, yMm: upperSpace.yMm + TOP_MM };
			const rows = part.map(({ number, text }) => [number, text, '']);
			drawList(pen, area, columns, rows, CAP_MM, (row) => part[row].i % 2 === 1);
		});
	});
}
