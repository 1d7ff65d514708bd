import type { PlanPoint } from '$lib/core';
import type { PlanSegment } from '../kernels/set-back-line';

/** Path data in metres with y down, to be put under the view's own transform. Centimetres are enough for the eye. */
function pair([east, north]: readonly [number, number, ...number[]]): string {
	return `${Math.round(east * 1000) / 1000} ${Math.round(-north * 1000) / 1000}`;
}

export function closedPath(ring: readonly (readonly [number, number, ...number[]])[]): string {
	return ring.length === 0 ? '' : `M${ring.map(pair).join('L')}Z`;
}

export function segmentPath(segments: readonly PlanSegment[]): string {
	return segments.map(([from, to]) => `M${pair(from)}L${pair(to)}`).join('');
}

export function circlePath(centre: PlanPoint, radiusM: number): string {
	const west = pair([centre[0] - radiusM, centre[1]]);
	const east = pair([centre[0] + radiusM, centre[1]]);
	const r = Math.round(radiusM * 1000) / 1000;
	return `M${west}A${r} ${r} 0 1 1 ${east}A${r} ${r} 0 1 1 ${west}Z`;
}
