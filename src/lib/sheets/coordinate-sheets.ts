import type { Obstacle } from '../core';
import { formatBearing, formatNumber } from '../i18n';
import type { PegRow } from '../schema/peg-row';
import { checkSums, toMillimetre } from './check-sums';
import { drawList, rowsThatFit, type ListColumn } from './list-sheet';
import { mountInShort } from './mount-words';
import { obstacleCodes } from './obstacle-codes';
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
const TOP_MM = 11;

/** The coordinate table over as many sheets as it needs; check sums stand on every one. */
export function coordinateSheets(content: PlanContent): SheetBuilder[] {
	const perSheet = rowsThatFit(upperSpace.heightMm - TOP_MM - 4);
	const pages = chunks(content.rows, perSheet);
	return pages.map((rows, i) => (place) => {
		const name = pages.length > 1 ? `Coordinate table, page ${i + 1} of ${pages.length}` : 'Coordinate table';
		return framedSheet(content, place, { name, documentType: 'Coordinate table', scale: null }, (pen) => {
			const first = rows[0];
			const last = rows[rows.length - 1];
			title(pen, name, `${first.tag} (${first.number}) to ${last.tag} (${last.number})`);
			const area = { ...upperSpace, xMm: upperSpace.xMm + 4, yMm: upperSpace.yMm + TOP_MM };
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

const obstacleColumns: ListColumn[] = [
	{ head: 'Code', widthMm: 18, align: 'left' },
	{ head: 'Kind', widthMm: 22, align: 'left' },
	{ head: 'Name', widthMm: 96, align: 'left' },
	{ head: 'E', unit: 'm', widthMm: 28, align: 'right' },
	{ head: 'N', unit: 'm', widthMm: 28, align: 'right' },
	{ head: 'Height', unit: 'above ground, m', widthMm: 32, align: 'right' },
	{ head: 'Size', unit: 'm', widthMm: 60, align: 'left' },
	{ head: 'Growth', unit: 'm a year', widthMm: 24, align: 'right' }
];

/** Obstacles by the codes on the map; no sheet when there are none. */
export function obstacleSheets(content: PlanContent): SheetBuilder[] {
	const codes = obstacleCodes(content.plot.obstacles);
	const lines = content.plot.obstacles.map((obstacle, i) => obstacleCells(obstacle, codes[i]));
	const pages = chunks(lines, rowsThatFit(upperSpace.heightMm - TOP_MM - 4));
	return pages.map((rows, i) => (place) => {
		const name = pages.length > 1 ? `Obstacles, page ${i + 1} of ${pages.length}` : 'Obstacles';
		return framedSheet(content, place, { name, documentType: 'Coordinate table', scale: null }, (pen) => {
			title(pen, name, 'as the shade was computed with');
			const area = { ...upperSpace, xMm: upperSpace.xMm + 4, yMm: upperSpace.yMm + TOP_MM };
			drawList(pen, area, obstacleColumns, rows);
		});
	});
}

function obstacleCells(obstacle: Obstacle, code: string): string[] {
	const tree = obstacle.kind === 'tree';
	return [
		code,
		tree ? 'tree' : 'block',
		obstacle.name,
		formatNumber(obstacle.eastM, 2),
		formatNumber(obstacle.northM, 2),
		formatNumber(obstacle.heightM, 2),
		tree
			? `crown radius ${formatNumber(obstacle.crownRadiusM, 2)}, from ${formatNumber(obstacle.crownBaseM, 2)} up`
			: `${formatNumber(obstacle.sizeXM, 2)} × ${formatNumber(obstacle.sizeYM, 2)}, turned ${formatNumber(obstacle.turnDeg, 1)}°`,
		tree ? formatNumber(obstacle.growthMPerYear, 2) : ''
	];
}

/** What was open when the plan was issued, and the reason to issue all the same; no sheet when nothing was. */
export function openPointSheets(content: PlanContent): SheetBuilder[] {
	if (content.openPoints.length === 0) return [];
	const list: ListColumn[] = [
		{ head: 'No.', widthMm: 14, align: 'right' },
		{ head: 'Open point', widthMm: 300, align: 'left' },
		{ head: 'Settled: name, date', widthMm: 66, align: 'left' }
	];
	const rows = content.openPoints.map((point, i) => [`${i + 1}`, point, '']);
	const top = TOP_MM + 16;
	const pages = chunks(rows, rowsThatFit(upperSpace.heightMm - top - 4));
	return pages.map((part, i) => (place) => {
		const name = pages.length > 1 ? `Open points, page ${i + 1} of ${pages.length}` : 'Open points';
		return framedSheet(content, place, { name, documentType: 'Issue record', scale: null }, (pen) => {
			title(pen, name, 'at the time of issue');
			pen.paragraph(
				'words',
				[upperSpace.xMm + 5, upperSpace.yMm + TOP_MM],
				370,
				`Reason to issue: ${content.heading.reason || 'none given yet'}`,
				{ capMm: 2.2, weight: 600 }
			);
			drawList(pen, { ...upperSpace, xMm: upperSpace.xMm + 4, yMm: upperSpace.yMm + top }, list, part);
		});
	});
}

function title(pen: Pen, text: string, note: string): void {
	pen.text('words', [upperSpace.xMm + 5, upperSpace.yMm + 7.6], text, { capMm: 3.4, weight: 800 });
	pen.text('words', [upperSpace.xMm + 385, upperSpace.yMm + 7.6], note, {
		capMm: 2.2,
		anchor: 'end',
		colour: c.inkSoft
	});
}

function chunks<T>(items: T[], size: number): T[][] {
	const pages: T[][] = [];
	for (let i = 0; i < items.length; i += size) pages.push(items.slice(i, i + size));
	return pages;
}
