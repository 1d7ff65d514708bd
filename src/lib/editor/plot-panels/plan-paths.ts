import type { BoundaryPart, PlanPoint } from '$lib/core';
import { toScreen, type PlanCamera } from '../kernels/plan-camera';
import type { PlanSegment } from '../kernels/set-back-line';

/** SVG path of a line of plan points; closed when told so. */
export function pathOf(camera: PlanCamera, points: readonly PlanPoint[], closed = true): string {
	if (points.length === 0) return '';
	const body = points
		.map((point, index) => {
			const [x, y] = toScreen(camera, point);
			return `${index === 0 ? 'M' : 'L'}${x.toFixed(1)} ${y.toFixed(1)}`;
		})
		.join('');
	return closed ? `${body}Z` : body;
}

/** Outlines and holes of all parts; fill with the even-odd rule. */
export function boundaryPathOf(camera: PlanCamera, parts: readonly BoundaryPart[]): string {
	return parts.flatMap((part) => [part.outer, ...part.holes].map((ring) => pathOf(camera, ring))).join('');
}

export function segmentsPathOf(camera: PlanCamera, segments: readonly PlanSegment[]): string {
	let path = '';
	let last: PlanPoint | null = null;
	for (const [from, to] of segments) {
		if (last !== from) {
			const [x, y] = toScreen(camera, from);
			path += `M${x.toFixed(1)} ${y.toFixed(1)}`;
		}
		const [x, y] = toScreen(camera, to);
		path += `L${x.toFixed(1)} ${y.toFixed(1)}`;
		last = to;
	}
	return path;
}

/** A round length of 1, 2 or 5 times a power of ten that is at least so many pixels long. */
export function roundLengthM(pxPerM: number, leastPx: number): number {
	const least = leastPx / pxPerM;
	const power = 10 ** Math.floor(Math.log10(least));
	return (
		[1, 2, 5, 10].map((step) => step * power).find((length) => length >= least * (1 - 1e-9)) ?? 10 * power
	);
}
