import { obstacleExtent, type PlanPoint } from '../core';
import { formatNumber } from '../i18n';
import type { PegRow } from '../schema/peg-row';
import {
	drawGrid,
	drawObstacles,
	drawOrigin,
	drawPlot,
	drawTags,
	drawTrackers,
	obstacleShows,
	tagHindrances
} from './draw-map';
import { drawGround } from './draw-ground';
import type { PaperRect, Sheet } from './drawing';
import { obstacleCodes } from './obstacle-codes';
import { chooseReduction, extentOf, MapFrame, type Extent } from './map-scale';
import { placeTags, type PlacedTag, type TagWish } from './place-tags';
import type { Pen } from './pen';
import type { PlanContent } from './plan-content';
import { drawSiteFoot } from './site-foot';
import { drawSidePanel } from './side-panel';
import { framedSheet, upperSpace, type SheetPlace } from './sheet-frame';
import { sheetColours as c } from './sheet-colours';
import { MAX_TRACKERS_A_SHEET, splitIntoTiles } from './tiles';

const PANEL_MM = 86;
const sidePanel: PaperRect = {
	xMm: upperSpace.xMm + upperSpace.widthMm - PANEL_MM,
	yMm: upperSpace.yMm,
	widthMm: PANEL_MM,
	heightMm: upperSpace.heightMm
};
const mapWindow: PaperRect = { ...upperSpace, widthMm: upperSpace.widthMm - PANEL_MM };
/** Kept clear inside the window for grid figures. */
const INSET_MM = 13;
/** Larger scales than this show nothing more that is set out. */
const LARGEST_REDUCTION = 100;
/** Land shown around a group of trackers on its own sheet. */
const AROUND_GROUP_M = 4;

export type SheetBuilder = (place: SheetPlace) => Sheet;

/**
 * The setting-out sheets: one with everything while that stays readable; else a key plan and a sheet for each group of
 * at most 100 trackers, every one at the largest scale of ISO 5455 that fits.
 */
export function siteSheets(content: PlanContent): SheetBuilder[] {
	const whole = wholeMap(content);
	const all = new Set(content.rows.map((row) => row.trackerId));
	const tags = mapTags(content, content.rows, whole, false);
	if (content.rows.length <= MAX_TRACKERS_A_SHEET && tags) {
		return [siteSheet(content, 'Site and setting-out plan', whole, all, tags, [])];
	}
	const groups = splitIntoTiles(content.rows, (rows) => {
		return rows.length <= MAX_TRACKERS_A_SHEET && mapTags(content, rows, groupMap(rows), false) !== null;
	});
	if (groups.length === 1) {
		const forced = mapTags(content, content.rows, whole, true) ?? [];
		return [siteSheet(content, 'Site and setting-out plan', whole, all, forced, [])];
	}
	const sheets = groups.map((rows, i) => {
		const map = groupMap(rows);
		const own = new Set(rows.map((row) => row.trackerId));
		const name = `Setting-out plan, part ${i + 1} of ${groups.length} (${rows.length} trackers)`;
		const placed = mapTags(content, rows, map, false) ?? mapTags(content, rows, map, true) ?? [];
		return siteSheet(content, name, map, own, placed, []);
	});
	const outlines = groups.map((rows, i) => ({ extent: groupExtent(rows), after: i + 1 }));
	return [
		siteSheet(content, 'Site plan and key to the setting-out sheets', whole, all, [], outlines),
		...sheets
	];
}

function wholeMap(content: PlanContent): MapFrame {
	const points: { at: PlanPoint; marginM: number }[] = [];
	for (const part of content.plot.boundary) for (const at of part.outer) points.push({ at, marginM: 0 });
	for (const row of content.rows) points.push({ at: [row.eastM, row.northM], marginM: row.reachM });
	const core = extentOf(points) ?? { minEastM: -10, maxEastM: 10, minNorthM: -10, maxNorthM: 10 };
	// Obstacles that touch the land's extent belong on the sheet; a far one must not shrink everything.
	for (const obstacle of content.plot.obstacles) {
		if (!obstacleShows(obstacle, grown(core, 5))) continue;
		const [westM, southM, eastM, northM] = obstacleExtent(obstacle);
		if (Math.max(eastM - westM, northM - southM) >= 50) continue;
		points.push({ at: [westM, southM], marginM: 0 }, { at: [eastM, northM], marginM: 0 });
	}
	return frameFor(extentOf(points) ?? core);
}

function groupExtent(rows: PegRow[]): Extent {
	const extent = extentOf(rows.map((row) => ({ at: [row.eastM, row.northM], marginM: row.reachM })));
	if (!extent) throw new RangeError('A group of trackers is empty.');
	return grown(extent, AROUND_GROUP_M);
}

const groupMap = (rows: PegRow[]) => frameFor(groupExtent(rows));

function grown(extent: Extent, byM: number): Extent {
	return {
		minEastM: extent.minEastM - byM,
		minNorthM: extent.minNorthM - byM,
		maxEastM: extent.maxEastM + byM,
		maxNorthM: extent.maxNorthM + byM
	};
}

function frameFor(extent: Extent): MapFrame {
	const size: [number, number] = [extent.maxEastM - extent.minEastM, extent.maxNorthM - extent.minNorthM];
	const room: [number, number] = [mapWindow.widthMm - 2 * INSET_MM, mapWindow.heightMm - 2 * INSET_MM];
	return new MapFrame(mapWindow, extent, chooseReduction(size, room, LARGEST_REDUCTION));
}

function mapTags(content: PlanContent, rows: PegRow[], map: MapFrame, far: boolean): PlacedTag[] | null {
	const wishes: TagWish[] = rows.map((row) => ({
		text: row.tag,
		at: map.toPaper([row.eastM, row.northM]),
		radiusMm: row.reachM * map.mmPerM
	}));
	const codes = obstacleCodes(content.plot.obstacles);
	content.plot.obstacles.forEach((obstacle, i) => {
		if (!obstacleShows(obstacle, map.shown)) return;
		wishes.push({
			text: codes[i],
			at: map.toPaper([obstacle.eastM, obstacle.northM]),
			radiusMm: 0,
			optional: true
		});
	});
	return placeTags(wishes, inner(mapWindow, 1), far, tagHindrances(content.plot, map));
}

function inner(rect: PaperRect, byMm: number): PaperRect {
	return {
		xMm: rect.xMm + byMm,
		yMm: rect.yMm + byMm,
		widthMm: rect.widthMm - 2 * byMm,
		heightMm: rect.heightMm - 2 * byMm
	};
}

function siteSheet(
	content: PlanContent,
	name: string,
	map: MapFrame,
	own: Set<string>,
	tags: PlacedTag[],
	outlines: { extent: Extent; after: number }[]
): SheetBuilder {
	const scale = `1:${map.reduction}`;
	return (place) =>
		framedSheet(content, place, { name, documentType: 'Setting-out plan', scale }, (pen) => {
			pen.clipped('ground', map.window, (inside) => {
				drawGround(inside, content.plot, map);
				drawGrid(inside, map);
				drawObstacles(inside, content.plot.obstacles, map);
				drawPlot(inside, content.plot, map);
				drawOrigin(inside, map);
				drawTrackers(inside, content.rows, own, map);
				drawTags(inside, tags);
				for (const { extent, after } of outlines) {
					drawOutline(inside, map, extent, `sheet ${place.number + after}`);
				}
			});
			drawSidePanel(pen, content, sidePanel);
			drawSiteFoot(pen, content, map.reduction, hiddenNote(content, map));
		});
}

function drawOutline(pen: Pen, map: MapFrame, extent: Extent, label: string): void {
	const [x0, y0] = map.toPaper([extent.minEastM, extent.maxNorthM]);
	const [x1, y1] = map.toPaper([extent.maxEastM, extent.minNorthM]);
	pen.rect(
		'words',
		{ xMm: x0, yMm: y0, widthMm: x1 - x0, heightMm: y1 - y0 },
		{ stroke: { colour: c.sun, widthMm: 0.5, dashMm: [5, 1.5] } }
	);
	pen.text('words', [(x0 + x1) / 2, (y0 + y1) / 2 + 2], label, {
		capMm: 4,
		weight: 800,
		anchor: 'middle',
		halo: c.white
	});
}

function hiddenNote(content: PlanContent, map: MapFrame): string | null {
	const hidden = content.plot.obstacles.filter((obstacle) => !obstacleShows(obstacle, map.shown)).length;
	if (!hidden) return null;
	return `${formatNumber(hidden)} ${hidden === 1 ? 'obstacle lies' : 'obstacles lie'} outside this sheet.`;
}
