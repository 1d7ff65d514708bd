import { obstacleExtent, obstacleShape, ridgeLine, type Obstacle, type PlanPoint, type Plot } from '../core';
import { formatNumber } from '../i18n';
import type { PegRow } from '../schema/peg-row';
import type { PaperPoint } from './drawing';
import { insetLines } from './inset-lines';
import type { Extent, MapFrame } from './map-scale';
import type { Pen } from './pen';
import type { Segment } from './paper-boxes';
import type { PlacedTag, TagHindrances } from './place-tags';
import { sheetColours as c } from './sheet-colours';
import { simplifyRing } from './simplify-ring';

/** Line kinds of the map; the legend shows the same. */
export const mapStrokes = {
	boundary: { colour: c.ink, widthMm: 0.6 },
	setBack: { colour: c.inkSoft, widthMm: 0.3, dashMm: [3, 1.2] },
	reach: { colour: c.stop, widthMm: 0.25 },
	cross: { colour: c.ink, widthMm: 0.35 },
	contour: { colour: c.hair, widthMm: 0.18 },
	other: { colour: c.faint, widthMm: 0.18 },
	tree: { colour: c.clear, widthMm: 0.25, dashMm: [0.8, 0.6] },
	box: { colour: c.ink, widthMm: 0.3 }
};

/** Corners that deviate less than this on the paper are not drawn. */
const DRAWN_MM = 0.04;
const CROSS_ARM_MM = 1.2;

/** Crosses of the local grid with its metres written at the window's edge. */
export function drawGrid(pen: Pen, map: MapFrame): void {
	const stepM = [10, 20, 50, 100, 200, 500, 1000, 2000, 5000, 10_000, 20_000].find(
		(s) => s * map.mmPerM >= 38
	);
	if (!stepM) return;
	const { minEastM, maxEastM, minNorthM, maxNorthM } = map.shown;
	const { xMm, yMm, widthMm, heightMm } = map.window;
	const stroke = { colour: c.hair, widthMm: 0.18 };
	const ticks = (min: number, max: number) => {
		const values: number[] = [];
		for (let v = Math.ceil(min / stepM) * stepM; v <= max; v += stepM) values.push(v);
		return values;
	};
	const easts = ticks(minEastM, maxEastM);
	const norths = ticks(minNorthM, maxNorthM);
	for (const e of easts) {
		const [x] = map.toPaper([e, 0]);
		if (x < xMm + 14 || x > xMm + widthMm - 10) continue;
		pen.line('ground', [x, yMm + heightMm], [x, yMm + heightMm - 2.5], { colour: c.ink, widthMm: 0.25 });
		pen.text('ground', [x, yMm + heightMm - 3.6], `E ${formatNumber(e)}`, {
			anchor: 'middle',
			colour: c.inkSoft
		});
		for (const n of norths) {
			const [, y] = map.toPaper([0, n]);
			pen.line('ground', [x - 1.5, y], [x + 1.5, y], stroke);
			pen.line('ground', [x, y - 1.5], [x, y + 1.5], stroke);
		}
	}
	for (const n of norths) {
		const [, y] = map.toPaper([0, n]);
		if (y < yMm + 4 || y > yMm + heightMm - 8) continue;
		pen.line('ground', [xMm, y], [xMm + 2.5, y], { colour: c.ink, widthMm: 0.25 });
		pen.text('ground', [xMm + 3.4, y + 0.9], `N ${formatNumber(n)}`, { colour: c.inkSoft });
	}
}

export function drawPlot(pen: Pen, plot: Plot, map: MapFrame): void {
	for (const part of drawnParts(plot, map)) {
		for (const ring of [part.outer, ...part.holes]) {
			const points = ring.map((p) => map.toPaper(p));
			pen.polygon('boundary', [points], { stroke: mapStrokes.boundary });
			drawCornerMarks(pen, points);
		}
	}
	for (const chain of setBackChains(plot, map)) pen.path('set-back', chain, mapStrokes.setBack);
}

/** The set-back as lines on the paper. */
function setBackChains(plot: Plot, map: MapFrame): PaperPoint[][] {
	if (plot.setBackM <= 0 || plot.boundary.length === 0) return [];
	const chains = joinPieces(insetLines(drawnParts(plot, map), plot.setBackM));
	return chains.map((chain) => chain.map((p) => map.toPaper(p)));
}

/** The boundary without the corners that the paper cannot show. */
function drawnParts(plot: Plot, map: MapFrame): Plot['boundary'] {
	return plot.boundary.map((part) => ({
		outer: simplifyRing(part.outer, DRAWN_MM / map.mmPerM),
		holes: part.holes.map((hole) => simplifyRing(hole, DRAWN_MM / map.mmPerM))
	}));
}

/** What the map's tags keep off: boundary, set-back and crowns as lines, blocks as areas. */
export function tagHindrances(plot: Plot, map: MapFrame): TagHindrances {
	const rings = drawnParts(plot, map)
		.flatMap((part) => [part.outer, ...part.holes])
		.map((ring) => [...ring, ring[0]].map((p) => map.toPaper(p)));
	const shapes = plot.obstacles.map(obstacleShape);
	const crowns = shapes.flatMap((shape) => (shape.kind === 'circle' ? [circleRing(shape, map)] : []));
	const lines = [...rings, ...setBackChains(plot, map), ...crowns].flatMap((chain) =>
		chain.slice(1).map((to, i): Segment => [chain[i], to])
	);
	const blocks = shapes.flatMap((shape) =>
		shape.kind === 'rings' ? shape.rings.map((ring) => ring.map((p) => map.toPaper(p))) : []
	);
	return { lines, blocks };
}

function circleRing(circle: { centre: PlanPoint; radiusM: number }, map: MapFrame): PaperPoint[] {
	const [x, y] = map.toPaper(circle.centre);
	const r = circle.radiusM * map.mmPerM;
	return Array.from({ length: 17 }, (_, k): PaperPoint => {
		const a = (k * Math.PI) / 8;
		return [x + r * Math.sin(a), y - r * Math.cos(a)];
	});
}

/** A small square at each corner, left out where the last one stands nearer than 1.6 mm. */
function drawCornerMarks(pen: Pen, points: PaperPoint[]): void {
	let last: PaperPoint | null = null;
	for (const [x, y] of points) {
		if (last && Math.hypot(x - last[0], y - last[1]) < 1.6) continue;
		last = [x, y];
		pen.rect(
			'boundary',
			{ xMm: x - 0.7, yMm: y - 0.7, widthMm: 1.4, heightMm: 1.4 },
			{ fill: { colour: c.white }, stroke: { colour: c.ink, widthMm: 0.3 } }
		);
	}
}

/** Pieces that meet end to start as long lines, so that their dashes run on. */
export function joinPieces(pieces: { from: PlanPoint; to: PlanPoint }[]): PlanPoint[][] {
	const key = ([x, y]: PlanPoint) => `${Math.round(x * 1e4)},${Math.round(y * 1e4)}`;
	const starts = new Map<string, number[]>();
	pieces.forEach((piece, i) => {
		const at = starts.get(key(piece.from));
		if (at) at.push(i);
		else starts.set(key(piece.from), [i]);
	});
	const ends = new Set(pieces.map((piece) => key(piece.to)));
	const used = new Set<number>();
	const chains: PlanPoint[][] = [];
	// Open lines first, from their free ends; what is left then runs in rings.
	const order = pieces
		.map((_, i) => i)
		.sort((a, b) => Number(ends.has(key(pieces[a].from))) - Number(ends.has(key(pieces[b].from))));
	for (const start of order) {
		if (used.has(start)) continue;
		const chain: PlanPoint[] = [pieces[start].from];
		for (let i: number | undefined = start; i !== undefined;) {
			used.add(i);
			chain.push(pieces[i].to);
			i = starts.get(key(pieces[i].to))?.find((next) => !used.has(next));
		}
		chains.push(chain);
	}
	return chains;
}

export function drawObstacles(pen: Pen, obstacles: Obstacle[], map: MapFrame): void {
	for (const obstacle of obstacles) {
		const centre = map.toPaper([obstacle.eastM, obstacle.northM]);
		if (obstacle.kind === 'tree') {
			pen.circle('obstacles', centre, obstacle.crownRadiusM * map.mmPerM, {
				fill: { colour: c.clearTint, opacity: 0.7 },
				stroke: mapStrokes.tree
			});
			pen.circle('obstacles', centre, Math.max(0.35, obstacle.trunkRadiusM * map.mmPerM), {
				fill: { colour: c.clear }
			});
			continue;
		}
		const shape = obstacleShape(obstacle);
		if (shape.kind === 'circle') {
			// A mast is drawn large enough to be found.
			pen.circle('obstacles', centre, Math.max(0.6, shape.radiusM * map.mmPerM), {
				fill: { colour: c.obstacleTint },
				stroke: mapStrokes.box
			});
			pen.circle('obstacles', centre, 0.2, { fill: { colour: c.ink } });
			continue;
		}
		const fence = obstacle.kind === 'wall' && obstacle.transmission > 0;
		for (const ring of shape.rings) {
			pen.polygon('obstacles', [ring.map((p) => map.toPaper(p))], {
				...(fence ? {} : { fill: { colour: c.obstacleTint } }),
				stroke: mapStrokes.box
			});
		}
		const ridge = obstacle.kind === 'building' ? ridgeLine(obstacle) : null;
		if (ridge) pen.line('obstacles', map.toPaper(ridge[0]), map.toPaper(ridge[1]), mapStrokes.box);
	}
}

/** Reach circle and centre cross of each tracker; those of other sheets only thin and grey. */
export function drawTrackers(pen: Pen, rows: PegRow[], own: Set<string>, map: MapFrame): void {
	for (const row of rows) {
		const mine = own.has(row.trackerId);
		const [x, y] = map.toPaper([row.eastM, row.northM]);
		pen.circle('reach', [x, y], row.reachM * map.mmPerM, {
			stroke: mine ? mapStrokes.reach : mapStrokes.other
		});
		const arm = mine ? CROSS_ARM_MM : CROSS_ARM_MM * 0.7;
		const stroke = mine ? mapStrokes.cross : mapStrokes.other;
		pen.line('trackers', [x - arm, y], [x + arm, y], stroke);
		pen.line('trackers', [x, y - arm], [x, y + arm], stroke);
	}
}

export function drawTags(pen: Pen, tags: PlacedTag[]): void {
	for (const { leader } of tags) {
		if (leader) pen.line('tags', leader[0], leader[1], { colour: c.ink, widthMm: 0.2 });
	}
	for (const tag of tags) {
		pen.text('tags', tag.at, tag.text, {
			capMm: tag.capMm,
			weight: tag.optional ? 600 : 800,
			anchor: 'middle',
			colour: tag.optional ? c.inkSoft : c.ink,
			halo: c.white
		});
	}
}

export function drawOrigin(pen: Pen, map: MapFrame): void {
	const [x, y] = map.toPaper([0, 0]);
	pen.circle('ground', [x, y], 1.1, { stroke: { colour: c.inkSoft, widthMm: 0.25 } });
	pen.line('ground', [x - 2, y], [x + 2, y], { colour: c.inkSoft, widthMm: 0.2 });
	pen.line('ground', [x, y - 2], [x, y + 2], { colour: c.inkSoft, widthMm: 0.2 });
}

/** Whether any part of an obstacle can show in an extent. */
export function obstacleShows(obstacle: Obstacle, extent: Extent): boolean {
	const [westM, southM, eastM, northM] = obstacleExtent(obstacle);
	return (
		eastM > extent.minEastM &&
		westM < extent.maxEastM &&
		northM > extent.minNorthM &&
		southM < extent.maxNorthM
	);
}
