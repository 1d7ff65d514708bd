import type { BoundaryPart, PlanPoint } from '$lib/core/document';

/** Fits plan metres into a picture: east to the right, north up. */
export interface PlanView {
	widthPx: number;
	heightPx: number;
	pxPerM: number;
	x(eastM: number): number;
	y(northM: number): number;
}

/** Fits all points with a margin into a width; the height follows the plan, held between the two limits given. */
export function fitPlan(
	points: readonly PlanPoint[],
	widthPx: number,
	limits: { leastPx: number; mostPx: number; marginPx: number }
): PlanView {
	const shown = points.length ? points : ([[0, 0]] as PlanPoint[]);
	const easts = shown.map((point) => point[0]);
	const norths = shown.map((point) => point[1]);
	const [west, east] = [smallest(easts), -smallest(easts.map((value) => -value))];
	const [south, north] = [smallest(norths), -smallest(norths.map((value) => -value))];
	const spanE = Math.max(east - west, 10);
	const spanN = Math.max(north - south, 10);
	const innerW = Math.max(widthPx - 2 * limits.marginPx, 10);
	const wished = (spanN * innerW) / spanE + 2 * limits.marginPx;
	const heightPx = Math.min(Math.max(wished, limits.leastPx), limits.mostPx);
	const pxPerM = Math.min(innerW / spanE, (heightPx - 2 * limits.marginPx) / spanN);
	const [midE, midN] = [(west + east) / 2, (south + north) / 2];
	return {
		widthPx,
		heightPx,
		pxPerM,
		x: (eastM) => widthPx / 2 + (eastM - midE) * pxPerM,
		y: (northM) => heightPx / 2 - (northM - midN) * pxPerM
	};
}

/** Least of many; spreading ten thousand arguments into Math.min is not safe everywhere. */
function smallest(values: readonly number[]): number {
	return values.reduce((least, value) => Math.min(least, value), Infinity);
}

/** SVG path of the boundary parts, holes included (draw it with the even-odd rule). */
export function boundaryPath(parts: readonly BoundaryPart[], view: PlanView): string {
	const ring = (points: readonly PlanPoint[]) =>
		points
			.map(([e, n], index) => `${index ? 'L' : 'M'}${view.x(e).toFixed(1)} ${view.y(n).toFixed(1)}`)
			.join('') + 'Z';
	return parts.flatMap((part) => [part.outer, ...part.holes].map(ring)).join('');
}

/** A round length for a scale bar that takes at most a share of the picture: 1, 2 or 5 times a power of ten. */
export function scaleBarM(pxPerM: number, mostPx: number): number {
	const most = mostPx / pxPerM;
	const power = 10 ** Math.floor(Math.log10(most));
	return [5, 2, 1].map((step) => step * power).find((length) => length <= most * (1 + 1e-9)) ?? power;
}
