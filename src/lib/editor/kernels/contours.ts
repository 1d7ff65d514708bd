import {
	boundaryEdges,
	measuredContours,
	stretchesOnLand,
	type BoundaryPart,
	type Ground,
	type PlanPoint
} from '$lib/core';
import { extentOf } from './pick';
import type { PlanSegment } from './set-back-line';

const mostLines = 200;

/** Contour lines of sloping or measured ground inside the boundary, every `stepM` of height; none on level ground. */
export function contourLines(ground: Ground, boundary: readonly BoundaryPart[], stepM = 1): PlanSegment[] {
	if (ground.kind === 'level' || boundary.length === 0) return [];
	if (ground.kind !== 'plane') {
		const box = extentOf(boundary.flatMap((part) => part.outer));
		if (!box) return [];
		return measuredContours(ground, stepM, box).flatMap(({ from, to }) =>
			stretchesOnLand(boundary, from, to)
		);
	}
	if (ground.risePercent === 0) return [];
	const bearing = (ground.riseTowardsDeg * Math.PI) / 180;
	const rise: PlanPoint = [Math.sin(bearing), Math.cos(bearing)];
	const along: PlanPoint = [rise[1], -rise[0]];
	const perMetre = ground.risePercent / 100;
	const edges = boundaryEdges(boundary).map(([x0, y0, x1, y1]) => ({
		h0: (x0 * rise[0] + y0 * rise[1]) * perMetre,
		h1: (x1 * rise[0] + y1 * rise[1]) * perMetre,
		a0: x0 * along[0] + y0 * along[1],
		a1: x1 * along[0] + y1 * along[1]
	}));
	const lowest = edges.reduce((low, { h0 }) => Math.min(low, h0), Infinity);
	const highest = edges.reduce((high, { h0 }) => Math.max(high, h0), -Infinity);
	const lines: PlanSegment[] = [];
	const first = Math.ceil(lowest / stepM);
	const last = Math.min(Math.floor(highest / stepM), first + mostLines);
	for (let level = first; level <= last; level += 1) {
		const height = level * stepM;
		const crossings = edges
			.filter(({ h0, h1 }) => h0 > height !== h1 > height)
			.map(({ h0, h1, a0, a1 }) => a0 + ((a1 - a0) * (height - h0)) / (h1 - h0))
			.sort((a, b) => a - b);
		const up = height / perMetre;
		for (let i = 0; i + 1 < crossings.length; i += 2) {
			// A level that only touches the edge gives no line.
			if (crossings[i + 1] - crossings[i] < 1e-6) continue;
			const point = (a: number): PlanPoint => [a * along[0] + up * rise[0], a * along[1] + up * rise[1]];
			lines.push([point(crossings[i]), point(crossings[i + 1])]);
		}
	}
	return lines;
}
