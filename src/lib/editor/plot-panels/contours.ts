import { groundHeightM, groundSurface, measuredContours, type Ground, type PlanPoint } from '$lib/core';
import type { PlanBox } from '../kernels/pick';

export interface Contour {
	heightM: number;
	from: PlanPoint;
	to: PlanPoint;
}

const STEPS_M = [0.1, 0.2, 0.5, 1, 2, 5, 10, 20, 50, 100];

export interface Contours {
	/** Height from one contour to the next, 0 for none. */
	stepM: number;
	lines: Contour[];
	/** Where heights are written, one at most for each height. */
	labels: { heightM: number; at: PlanPoint }[];
}

/** A round step that gives at most `most` contours over a span of heights. */
function roundStepM(spanM: number, most: number): number {
	return STEPS_M.find((step) => spanM / step <= most) ?? STEPS_M[STEPS_M.length - 1] * 10;
}

/** Lowest and highest of the corners of measured ground that lie in a box, and of the box's own corners. */
function measuredRange(ground: Ground, box: PlanBox, corners: readonly PlanPoint[]) {
	const { points } = groundSurface(ground).mesh();
	const inside: PlanPoint[] = [];
	for (let k = 0; k < points.length; k += 3) {
		const [east, north] = [points[k], points[k + 1]];
		if (east >= box.westM && east <= box.eastM && north >= box.southM && north <= box.northM)
			inside.push([east, north]);
	}
	return groundRange(ground, [...corners, ...inside]);
}

/** Contours of measured ground; a height is written at the piece nearest to a line through the middle of the box. */
function contoursOfMeasured(
	ground: Ground,
	box: PlanBox,
	corners: readonly PlanPoint[],
	most: number
): Contours {
	const range = measuredRange(ground, box, corners);
	if (!range || range.highestM - range.lowestM < 1e-6) return { stepM: 0, lines: [], labels: [] };
	const stepM = roundStepM(range.highestM - range.lowestM, most);
	const lines = measuredContours(ground, stepM, box);
	const middle: PlanPoint = [(box.westM + box.eastM) / 2, (box.southM + box.northM) / 2];
	const nearest = new Map<number, { away: number; at: PlanPoint }>();
	for (const { heightM, from, to } of lines) {
		const at: PlanPoint = [(from[0] + to[0]) / 2, (from[1] + to[1]) / 2];
		const away = Math.hypot(at[0] - middle[0], at[1] - middle[1]);
		const known = nearest.get(heightM);
		if (!known || away < known.away) nearest.set(heightM, { away, at });
	}
	return { stepM, lines, labels: [...nearest].map(([heightM, { at }]) => ({ heightM, at })) };
}

/** Lowest and highest ground at the given points; null for none. */
export function groundRange(
	ground: Ground,
	points: readonly PlanPoint[]
): { lowestM: number; highestM: number } | null {
	if (points.length === 0) return null;
	let lowestM = Infinity;
	let highestM = -Infinity;
	for (const [east, north] of points) {
		const heightM = groundHeightM(ground, east, north);
		lowestM = Math.min(lowestM, heightM);
		highestM = Math.max(highestM, heightM);
	}
	return { lowestM, highestM };
}

/** Contour lines across a box, at a round step that gives at most `most` heights; none on level ground. */
export function contoursOf(ground: Ground, box: PlanBox, most = 12): Contours {
	const none: Contours = { stepM: 0, lines: [], labels: [] };
	if (ground.kind === 'level') return none;
	const corners: PlanPoint[] = [
		[box.westM, box.southM],
		[box.eastM, box.southM],
		[box.eastM, box.northM],
		[box.westM, box.northM]
	];
	if (ground.kind !== 'plane') return contoursOfMeasured(ground, box, corners, most);
	const range = groundRange(ground, corners);
	if (!range || ground.risePercent <= 0) return none;
	const stepM = roundStepM(range.highestM - range.lowestM, most);
	const towards = (ground.riseTowardsDeg * Math.PI) / 180;
	const up: PlanPoint = [Math.sin(towards), Math.cos(towards)];
	const middle: PlanPoint = [(box.westM + box.eastM) / 2, (box.southM + box.northM) / 2];
	const middleM = groundHeightM(ground, middle[0], middle[1]);
	const half = Math.hypot(box.eastM - box.westM, box.northM - box.southM) / 2;
	const lines: Contour[] = [];
	for (let i = Math.ceil(range.lowestM / stepM); i * stepM <= range.highestM; i += 1) {
		const along = (i * stepM - middleM) / (ground.risePercent / 100);
		const foot: PlanPoint = [middle[0] + along * up[0], middle[1] + along * up[1]];
		lines.push({
			heightM: i * stepM,
			from: [foot[0] - half * up[1], foot[1] + half * up[0]],
			to: [foot[0] + half * up[1], foot[1] - half * up[0]]
		});
	}
	const labels = lines.map(({ heightM, from, to }): { heightM: number; at: PlanPoint } => ({
		heightM,
		at: [(from[0] + to[0]) / 2, (from[1] + to[1]) / 2]
	}));
	return { stepM, lines, labels };
}
