import type { PlanPoint } from '$lib/core';

/** A plan fitted into a picture, north up; null while there is nothing to draw. */
export interface FittedPlan {
	rings: string;
	dots: { x: number; y: number }[];
	/** Radius of a dot that reads at this scale, px. */
	dotPx: number;
}

export function fitPlan(
	plan: { boundary: PlanPoint[][]; trackers: PlanPoint[] },
	widthPx: number,
	heightPx: number,
	marginPx = 12
): FittedPlan | null {
	const points = [...plan.boundary.flat(), ...plan.trackers];
	if (points.length === 0) return null;
	const range = (axis: 0 | 1) => {
		let [low, high] = [Infinity, -Infinity];
		for (const point of points) {
			low = Math.min(low, point[axis]);
			high = Math.max(high, point[axis]);
		}
		return { middle: (low + high) / 2, size: Math.max(high - low, 1) };
	};
	const [east, north] = [range(0), range(1)];
	const scale = Math.min((widthPx - 2 * marginPx) / east.size, (heightPx - 2 * marginPx) / north.size);
	const x = ([e]: PlanPoint) => Number((widthPx / 2 + (e - east.middle) * scale).toFixed(1));
	const y = ([, n]: PlanPoint) => Number((heightPx / 2 - (n - north.middle) * scale).toFixed(1));
	return {
		rings: plan.boundary
			.map((ring) => `${ring.map((point, index) => `${index ? 'L' : 'M'}${x(point)} ${y(point)}`).join('')}Z`)
			.join(''),
		dots: plan.trackers.map((point) => ({ x: x(point), y: y(point) })),
		dotPx: Math.min(Math.max(scale * 2, 1.4), 4)
	};
}
