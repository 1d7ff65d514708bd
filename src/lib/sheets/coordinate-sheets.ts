import { formatBearing, formatNumber } from '../i18n';
import type { PegRow } from '../schema/peg-row';
import { checkSums, toMillimetre } from './check-sums';
import { drawList, LIST_TOP_MM, listTitle, pagesOf, rowsThatFit, type ListColumn } from './list-sheet';
import { mountInShort } from './mount-words';
import type { Pen } from './pen';
import type { PlanContent } from './plan-content';
import { footStrip, framedSheet, upperSpace } from './sheet-frame';
import { sheetColours as c } from './sheet-colours';
import type { SheetBuilder } from './site-sheets';

const columns: ListColumn[] = [
	{ head: 'No.', widthMm: 12, align: 'right' },
	{ head: 'Tag', widthMm: 28, align: 'left' },
	{ head: 'E', unit: 'm', widthMm: 26, align: 'right' },
	{ head: 'N', unit: 'm', widthMm: 26, align: 'right' },
	{ head: 'Ground', unit: 'level, m', widthMm: 21, align: 'right' },
	{ head: 'Axis above', unit: 'ground, m', widthMm: 22, align: 'right' },
	{ head: 'Axis level', unit: 'm', widthMm: 21, align: 'right' },
	{ head: 'Latitude', unit: 'degrees, WGS84', widthMm: 31, align: 'right' },
	{ head: 'Longitude', unit: 'degrees, WGS84', widthMm: 32, align: 'right' },
	{ head: 'Reach', unit: 'radius, m', widthMm: 17, align: 'right' },
	{ head: 'Stops', unit: 'east, west side', widthMm: 26, align: 'right' },
	{ head: 'Tracker model', widthMm: 34, align: 'left' },
	{ head: 'Sensor mount', unit: 'facing the glass, mm', widthMm: 86, align: 'left' }
];

/** The coordinate table over as many sheets as it needs; check sums stand on every one. */
export function coordinateSheets(content: PlanContent): SheetBuilder[] {
	const perSheet = rowsThatFit(upperSpace.heightMm - LIST_TOP_MM - 4);
	const pages = pagesOf(content.rows, perSheet);
	return pages.map((rows, i) => (place) => {
		const name = pages.length > 1 ? `Coordinate table, page ${i + 1} of ${pages.length}` : 'Coordinate table';
		return framedSheet(content, place, { name, documentType: 'Coordinate table', scale: null }, (pen) => {
			const first = rows[0];
			const last = rows[rows.length - 1];
			listTitle(pen, name, `${first.tag} (${first.number}) to ${last.tag} (${last.number})`);
			const area = { ...upperSpace, xMm: upperSpace.xMm + 4, yMm: upperSpace.yMm + LIST_TOP_MM };
			const models = new Map(content.layout.models.map((model) => [model.id, model]));
			drawList(
				pen,
				area,
				columns,
				rows.map((row) => cells(row, models.get(row.modelId)))
			);
			drawListFoot(pen, content, rows);
		});
	});
}

function cells(row: PegRow, model: PlanContent['layout']['models'][number] | undefined): string[] {
	return [
		`${row.number}`,
		row.tag,
		formatNumber(toMillimetre(row.eastM), 3),
		formatNumber(toMillimetre(row.northM), 3),
		formatNumber(row.groundM, 3),
		formatNumber(row.axisHeightM, 3),
		formatNumber(row.axisLevelM, 3),
		formatNumber(row.latitudeDeg, 7),
		formatNumber(row.longitudeDeg, 7),
		formatNumber(row.reachM, 2),
		row.stops ? `${formatBearing(row.stops.fromDeg)} – ${formatBearing(row.stops.toDeg)}` : 'turns freely',
		row.modelName,
		row.mount && model ? `${row.ownMount ? 'OWN: ' : ''}${mountInShort(row.mount, model)}` : 'not chosen'
	];
}

function drawListFoot(pen: Pen, content: PlanContent, rows: PegRow[]): void {
	const { xMm: x, yMm: y } = footStrip;
	pen.rect('frame', footStrip, { fill: { colour: c.white }, stroke: { colour: c.ink, widthMm: 0.35 } });
	pen.text('words', [x + 5, y + 6], 'Check sums', { capMm: 2.4, weight: 800 });
	const page = checkSums(rows);
	const all = checkSums(content.rows);
	const line = (label: string, sums: { count: number; eastM: number; northM: number }, top: number) => {
		pen.text('words', [x + 5, top], label, { capMm: 2 });
		pen.text('words', [x + 60, top], formatNumber(sums.count), { capMm: 2, weight: 600, anchor: 'end' });
		pen.text('words', [x + 66, top], `Σ E  ${formatNumber(sums.eastM, 3)} m`, { capMm: 2, weight: 600 });
		pen.text('words', [x + 114, top], `Σ N  ${formatNumber(sums.northM, 3)} m`, { capMm: 2, weight: 600 });
	};
	line('trackers on this page', page, y + 11.4);
	line('trackers of the whole plan', all, y + 15.8);
	pen.paragraph(
		'words',
		[x + 5, y + 20],
		footStrip.widthMm - 10,
		'Sums of the figures as printed: add up the list that was loaded into the instrument and compare before the first peg. ' +
			'E and N are metres in the local grid, whose north is true north at the origin; levels are metres above the project’s height datum. ' +
			'Axis level is ground level plus axis height. Latitude and longitude are for finding the place, not for setting out to a millimetre.'
	);
}
