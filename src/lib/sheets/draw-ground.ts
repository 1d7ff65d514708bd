import {
	groundHeightM,
	insideBoundary,
	isMeasured,
	measuredContours,
	stretchesOnLand,
	type PlanPoint,
	type Plot
} from '../core';
import { formatNumber } from '../i18n';
import { mapStrokes } from './draw-map';
import type { MapFrame } from './map-scale';
import type { Pen } from './pen';
import { sheetColours as c } from './sheet-colours';

/** Contours run this far over the boundary on the paper, so that levels can be read at its corners. */
const OVER_MM = 4;
/** The level stands this far beyond the contour's end. */
const LABEL_MM = 2.5;

/** Steps of contours of measured ground, metres; one that gives at most `MOST_LEVELS` of them is taken. */
const STEPS_M = [0.1, 0.2, 0.25, 0.5, 1, 2, 5, 10, 20, 50, 100];
const MOST_LEVELS = 14;
/** Heights are looked at so many times along each side of the window to find its lowest and highest. */
const LOOKS = 24;

/** Contours of measured ground on the land, each level written once, well inside the window. */
function drawMeasuredGround(pen: Pen, plot: Plot, map: MapFrame): void {
	const { minEastM, maxEastM, minNorthM, maxNorthM } = map.shown;
	let lowest = Infinity;
	let highest = -Infinity;
	for (let i = 0; i <= LOOKS; i += 1) {
		for (let j = 0; j <= LOOKS; j += 1) {
			const east = minEastM + (i / LOOKS) * (maxEastM - minEastM);
			const north = minNorthM + (j / LOOKS) * (maxNorthM - minNorthM);
			if (plot.boundary.length > 0 && !insideBoundary(plot.boundary, east, north)) continue;
			const heightM = groundHeightM(plot.ground, east, north);
			lowest = Math.min(lowest, heightM);
			highest = Math.max(highest, heightM);
		}
	}
	const stepM = STEPS_M.find((step) => (highest - lowest) / step <= MOST_LEVELS) ?? 200;
	const box = { westM: minEastM, eastM: maxEastM, southM: minNorthM, northM: maxNorthM };
	const written = new Map<number, [number, number]>();
	const { xMm, yMm, widthMm, heightMm } = map.window;
	for (const piece of measuredContours(plot.ground, stepM, box)) {
		const stretches = plot.boundary.length
			? stretchesOnLand(plot.boundary, piece.from, piece.to)
			: [[piece.from, piece.to]];
		for (const [from, to] of stretches) {
			const [p, q] = [map.toPaper(from), map.toPaper(to)];
			pen.line('ground', p, q, mapStrokes.contour);
			const inWindow =
				p[0] > xMm + 16 && p[0] < xMm + widthMm - 7 && p[1] > yMm + 7 && p[1] < yMm + heightMm - 9;
			// The easternmost spot of each level.
			const known = written.get(piece.heightM);
			if (inWindow && (!known || p[0] > known[0])) written.set(piece.heightM, [p[0], p[1]]);
		}
	}
	for (const [level, at] of written) {
		pen.text('ground', [at[0], at[1] + 0.9], formatNumber(level, stepM < 1 ? 2 : 0), {
			colour: c.faint,
			anchor: 'middle',
			halo: c.white
		});
	}
}

/** Contours of a sloping plot where its land is, each with its level at one end. */
export function drawGround(pen: Pen, plot: Plot, map: MapFrame): void {
	const { ground } = plot;
	if (isMeasured(ground)) {
		drawMeasuredGround(pen, plot, map);
		return;
	}
	if (ground.kind !== 'plane' || ground.risePercent <= 0) return;
	const a = (ground.riseTowardsDeg * Math.PI) / 180;
	const gradient = ground.risePercent / 100;
	const intervalM = contourIntervalM(ground.risePercent, map.mmPerM);
	const { minEastM, maxEastM, minNorthM, maxNorthM } = map.shown;
	const corners: PlanPoint[] = [
		[minEastM, minNorthM],
		[maxEastM, minNorthM],
		[maxEastM, maxNorthM],
		[minEastM, maxNorthM]
	];
	const levels = corners.map(([e, n]) => ground.heightM + gradient * (e * Math.sin(a) + n * Math.cos(a)));
	const reachM = Math.hypot(maxEastM - minEastM, maxNorthM - minNorthM);
	const middle: PlanPoint = [(minEastM + maxEastM) / 2, (minNorthM + maxNorthM) / 2];
	const along = middle[0] * Math.cos(a) - middle[1] * Math.sin(a);
	const first = Math.ceil(Math.min(...levels) / intervalM);
	for (let i = first; i * intervalM <= Math.max(...levels); i += 1) {
		const level = i * intervalM;
		const up = (level - ground.heightM) / gradient;
		const at = (s: number): PlanPoint => [
			up * Math.sin(a) + (along + s) * Math.cos(a),
			up * Math.cos(a) - (along + s) * Math.sin(a)
		];
		const spans = plot.boundary.length
			? overLand(plot, at, OVER_MM / map.mmPerM)
			: [[-reachM, reachM] as Span];
		let label: [number, number] | null = null;
		for (const [from, to] of spans) {
			pen.line('ground', map.toPaper(at(from)), map.toPaper(at(to)), mapStrokes.contour);
			label = lastInside(map, at, from, to + LABEL_MM / map.mmPerM) ?? label;
		}
		if (label) {
			pen.text('ground', [label[0], label[1] + 0.9], formatNumber(level, intervalM < 1 ? 2 : 0), {
				colour: c.faint,
				anchor: 'middle',
				halo: c.white
			});
		}
	}
}

type Span = [from: number, to: number];

/**
 * Stretches of a straight line, by distance along it, that lie on the land or not further than `overM` from where it
 * enters or leaves it.
 * @param at the point at a distance, metres
 */
export function overLand(plot: Plot, at: (s: number) => PlanPoint, overM: number): Span[] {
	const [p, q] = [at(0), at(1)];
	const [dx, dy] = [q[0] - p[0], q[1] - p[1]];
	const spans: Span[] = [];
	for (const { outer } of plot.boundary) {
		const crossings: number[] = [];
		outer.forEach(([ax, ay], i) => {
			const [bx, by] = outer[(i + 1) % outer.length];
			const sideA = (ax - p[0]) * dy - (ay - p[1]) * dx;
			const sideB = (bx - p[0]) * dy - (by - p[1]) * dx;
			if (sideA > 0 === sideB > 0) return;
			const t = sideA / (sideA - sideB);
			crossings.push((ax + t * (bx - ax) - p[0]) * dx + (ay + t * (by - ay) - p[1]) * dy);
		});
		crossings.sort((x, y) => x - y);
		for (let i = 0; i + 1 < crossings.length; i += 2) {
			spans.push([crossings[i] - overM, crossings[i + 1] + overM]);
		}
	}
	spans.sort((x, y) => x[0] - y[0]);
	return spans.reduce<Span[]>((joined, [from, to]) => {
		const last = joined[joined.length - 1];
		if (last && from <= last[1]) last[1] = Math.max(last[1], to);
		else joined.push([from, to]);
		return joined;
	}, []);
}

/** The end of a contour's stretch, or the last spot of it that lies well inside the window, on the paper. */
function lastInside(
	map: MapFrame,
	at: (s: number) => PlanPoint,
	from: number,
	to: number
): [number, number] | null {
	const { xMm, yMm, widthMm, heightMm } = map.window;
	for (let k = 200; k >= 0; k -= 1) {
		const [x, y] = map.toPaper(at(from + ((to - from) * k) / 200));
		if (x > xMm + 16 && x < xMm + widthMm - 7 && y > yMm + 7 && y < yMm + heightMm - 9) return [x, y];
	}
	return null;
}

/** A round interval that puts contours at least 14 mm apart on the paper. */
export function contourIntervalM(risePercent: number, mmPerM: number): number {
	const least = (14 / mmPerM) * (risePercent / 100);
	const power = 10 ** Math.floor(Math.log10(least));
	return [1, 2, 5, 10].map((k) => k * power).find((step) => step >= least) ?? 10 * power;
}
