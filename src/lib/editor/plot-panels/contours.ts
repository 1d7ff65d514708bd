import { groundHeightM, type Ground, type PlanPoint } from '$lib/core';
import type { PlanBox } from '../kernels/pick';

export interface Contour {
	heightM: number;
	from: PlanPoint;
	to: PlanPoint;
}

const STEPS_M = [0.1, 0.2, 0.5, 1, 2, 5, 10, 20, 50, 100];

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

/** Contour lines of a plane across a box, at a round step that gives at most `most` of them; none on level ground. */
export function contoursOf(ground: Ground, box: PlanBox, most = 12): { stepM: number; lines: Contour[] } {
	if (ground.kind === 'level' || ground.risePercent <= 0) return { stepM: 0, lines: [] };
	const corners: PlanPoint[] = [
		[box.westM, box.southM],
		[box.eastM, box.southM],
		[box.eastM, box.northM],
		[box.westM, box.northM]
	];
	const range = groundRange(ground, corners);
	if (!range) return { stepM: 0, lines: [] };
	const span = range.highestM - range.lowestM;
	const stepM = STEPS_M.find((step) => span / step <= most) ?? STEPS_M[STEPS_M.length - 1] * 10;
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
	return { stepM, lines };
}
