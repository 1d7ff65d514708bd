import { obstacleTopM, treeHeightM, type Obstacle } from '../core';
import { formatNumber } from '../i18n';
import { drawList, LIST_TOP_MM, listTitle, pagesOf, rowsThatFit, type ListColumn } from './list-sheet';
import { obstacleCodes } from './obstacle-codes';
import type { PlanContent } from './plan-content';
import { framedSheet, upperSpace } from './sheet-frame';
import type { SheetBuilder } from './site-sheets';
import { treesInWords } from './tree-years';

const before: ListColumn[] = [
	{ head: 'Code', widthMm: 18, align: 'left' },
	{ head: 'Kind', widthMm: 22, align: 'left' },
	{ head: 'Name', widthMm: 90, align: 'left' },
	{ head: 'E', unit: 'm', widthMm: 26, align: 'right' },
	{ head: 'N', unit: 'm', widthMm: 26, align: 'right' },
	{ head: 'Height today', unit: 'above ground, m', widthMm: 28, align: 'right' }
];
const after: ListColumn[] = [
	{ head: 'Size', unit: 'm', widthMm: 58, align: 'left' },
	{ head: 'Growth', unit: 'm a year', widthMm: 24, align: 'right' }
];

/** Obstacles by the codes on the map, with the heights that the shade was computed with; no sheet when there are none. */
export function obstacleSheets(content: PlanContent): SheetBuilder[] {
	const { treeYears } = content.heading;
	const codes = obstacleCodes(content.plot.obstacles);
	const grown = treeYears !== null && treeYears > 0;
	const columns = grown ? [...before, computedColumn(treeYears), ...after] : [...before, ...after];
	const lines = content.plot.obstacles.map((obstacle, i) =>
		cells(obstacle, codes[i], grown ? treeYears : null)
	);
	const pages = pagesOf(lines, rowsThatFit(upperSpace.heightMm - LIST_TOP_MM - 4));
	return pages.map((rows, i) => (place) => {
		const name = pages.length > 1 ? `Obstacles, page ${i + 1} of ${pages.length}` : 'Obstacles';
		return framedSheet(content, place, { name, documentType: 'Coordinate table', scale: null }, (pen) => {
			listTitle(pen, name, heightsInWords(content));
			const area = { ...upperSpace, xMm: upperSpace.xMm + 4, yMm: upperSpace.yMm + LIST_TOP_MM };
			drawList(pen, area, columns, rows);
		});
	});
}

function computedColumn(years: number): ListColumn {
	return { head: 'Shade computed with, m', unit: treesInWords(years), widthMm: 46, align: 'right' };
}

/** Which heights the shade was computed with. */
function heightsInWords({ heading, plot }: PlanContent): string {
	const { treeYears } = heading;
	if (treeYears === null) return 'heights of today; no shade run stands behind this layout';
	const trees = plot.obstacles.flatMap((each) => (each.kind === 'tree' ? [each] : []));
	if (treeYears <= 0 || trees.length === 0) return 'heights of today, as the shade was computed with';
	const only = trees.length === 1 ? `: ${formatNumber(treeHeightM(trees[0], treeYears), 2)} m` : '';
	return `heights of today; shade computed with ${treesInWords(treeYears)}${only}`;
}

const kindWords: Record<Obstacle['kind'], string> = {
	tree: 'tree',
	box: 'block',
	building: 'building',
	wall: 'wall',
	mast: 'mast'
};

/** Size of an obstacle in words, metres. */
function sizeInWords(obstacle: Obstacle): string {
	switch (obstacle.kind) {
		case 'tree':
			return `crown radius ${formatNumber(obstacle.crownRadiusM, 2)}, from ${formatNumber(obstacle.crownBaseM, 2)} up`;
		case 'box':
			return `${formatNumber(obstacle.sizeXM, 2)} × ${formatNumber(obstacle.sizeYM, 2)}, turned ${formatNumber(obstacle.turnDeg, 1)}°`;
		case 'building': {
			const corners = `${formatNumber(obstacle.corners.length)} corners`;
			const { roof } = obstacle;
			return roof.kind === 'flat'
				? `${corners}, flat roof`
				: `${corners}, eaves ${formatNumber(obstacle.heightM, 2)}, ridge along ${formatNumber(roof.ridgeDeg, 1)}°`;
		}
		case 'wall': {
			const lengthM = obstacle.line
				.slice(1)
				.reduce((sum, [e, n], k) => sum + Math.hypot(e - obstacle.line[k][0], n - obstacle.line[k][1]), 0);
			const passes =
				obstacle.transmission > 0 ? `, ${formatNumber(100 * obstacle.transmission)} % passes` : '';
			return `${formatNumber(lengthM, 2)} long, ${formatNumber(obstacle.thicknessM, 2)} thick${passes}`;
		}
		case 'mast':
			return `radius ${formatNumber(obstacle.radiusM, 2)}`;
	}
}

function cells(obstacle: Obstacle, code: string, treeYears: number | null): string[] {
	return [
		code,
		obstacle.kind === 'wall' && obstacle.transmission > 0 ? 'fence' : kindWords[obstacle.kind],
		obstacle.name,
		formatNumber(obstacle.eastM, 2),
		formatNumber(obstacle.northM, 2),
		formatNumber(obstacleTopM(obstacle), 2),
		...(treeYears === null ? [] : [formatNumber(obstacleTopM(obstacle, treeYears), 2)]),
		sizeInWords(obstacle),
		obstacle.kind === 'tree' ? formatNumber(obstacle.growthMPerYear, 2) : ''
	];
}
