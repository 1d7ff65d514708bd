import { RADIANS_PER_DEGREE } from '../conventions';
import type { Posture, TrackerModel } from '../document';

/** How far a sensor head stands outside the glass unless its mount says otherwise, metres; common practice, no source. */
export const HEAD_OUT_M = 0.08;

/** Every tilt that the machine takes of itself, and the one it stands still at, as a range in radians. */
function tiltRange(model: TrackerModel, posture?: Posture): [low: number, high: number] {
	const rests = [model.night.tiltDeg, model.windTiltDeg];
	if (posture?.kind === 'standing') rests.push(posture.tiltDeg);
	const low = Math.min(model.minTiltDeg, ...rests);
	const high = Math.max(model.maxTiltDeg, ...rests);
	return [low * RADIANS_PER_DEGREE, high * RADIANS_PER_DEGREE];
}

/** Tilts at which p sin t + q cos t may have its extremes inside a range: the ends and the stationary points. */
function extremeTilts(p: number, q: number, [low, high]: [number, number]): number[] {
	const tilts = [low, high];
	const stationary = Math.atan2(p, q);
	for (const t of [stationary - Math.PI, stationary, stationary + Math.PI]) {
		if (t > low && t < high) tilts.push(t);
	}
	return tilts;
}

/** Distance ahead of the azimuth axis of a point y up the slope, at a tilt: ahead + p sin t + q cos t. */
const forwardOf = (model: TrackerModel, y: number): { p: number; q: number } => ({
	p: model.tableOffsetM,
	q: -(model.centreShiftM + y)
});

/**
 * Radius of the circle on plan that any part of the machine can enter in any posture, metres: the extreme corner of
 * the steel outline over the whole range of tilt, night and wind posture, and a sensor head on any edge. A tracker that
 * stands still at a tilt of its own (`posture`) reaches that tilt as well.
 */
export function reachRadiusM(model: TrackerModel, posture?: Posture): number {
	const halfWidth = model.widthM / 2;
	const halfHeight = model.heightM / 2;
	const margin = model.frameMarginM;
	// A head never stands nearer to the glass than the frame's outer edge.
	const head = model.sensorHeadRadiusM > 0 ? Math.max(HEAD_OUT_M, margin) + model.sensorHeadRadiusM : margin;
	// Corners of the steel; heads beyond top and bottom; heads beyond the sides.
	const outlines = [
		[halfWidth + margin, halfHeight + margin],
		[halfWidth, halfHeight + head],
		[halfWidth + head, halfHeight]
	];
	let reach = 0;
	for (const [x, y] of outlines) {
		for (const side of [-1, 1]) {
			const { p, q } = forwardOf(model, side * y);
			for (const t of extremeTilts(p, q, tiltRange(model, posture))) {
				const forward = model.tiltAxisOffsetM + p * Math.sin(t) + q * Math.cos(t);
				reach = Math.max(reach, Math.hypot(forward, x));
			}
		}
	}
	return reach;
}

/**
 * Least height of a corner of the steel above the ground in any posture, metres; on ground that rises by `gradient`
 * metres per metre the corner is taken on the uphill side. `axisHeightM` overrides the model's when it is given, and
 * `posture` adds the tilt of a tracker that stands still.
 */
export function lowestCornerM(
	model: TrackerModel,
	axisHeightM?: number | null,
	gradient = 0,
	posture?: Posture
): number {
	const axis = axisHeightM ?? model.axisHeightM;
	const halfWidth = model.widthM / 2 + model.frameMarginM;
	let lowest = Infinity;
	const [low, high] = tiltRange(model, posture);
	for (const side of [-1, 1]) {
		const y = side * (model.heightM / 2 + model.frameMarginM);
		const slope = model.centreShiftM + y;
		const forward = forwardOf(model, y);
		const tilts = extremeTilts(slope, model.tableOffsetM, [low, high]);
		// With a gradient the lowest tilt moves; a fine walk over the range settles it within a millimetre.
		if (gradient > 0) for (let k = 1; k < 180; k++) tilts.push(low + ((high - low) * k) / 180);
		for (const t of tilts) {
			const height = axis + slope * Math.sin(t) + model.tableOffsetM * Math.cos(t);
			const away = model.tiltAxisOffsetM + forward.p * Math.sin(t) + forward.q * Math.cos(t);
			lowest = Math.min(lowest, height - gradient * Math.hypot(away, halfWidth));
		}
	}
	return lowest;
}

/**
 * Greatest height of an edge of the steel above the foot of the pole in any posture, metres. `axisHeightM` overrides the
 * model's when it is given, and `posture` adds the tilt of a tracker that stands still.
 */
export function highestCornerM(model: TrackerModel, axisHeightM?: number | null, posture?: Posture): number {
	const axis = axisHeightM ?? model.axisHeightM;
	const range = tiltRange(model, posture);
	let highest = -Infinity;
	for (const side of [-1, 1]) {
		const slope = model.centreShiftM + side * (model.heightM / 2 + model.frameMarginM);
		for (const t of extremeTilts(slope, model.tableOffsetM, range)) {
			highest = Math.max(highest, axis + slope * Math.sin(t) + model.tableOffsetM * Math.cos(t));
		}
	}
	return highest;
}

/** Least distance between two equal machines, metres: two reach circles and the clearance between them. */
export function leastPitchM(model: TrackerModel, clearanceM = 0.5): number {
	return 2 * reachRadiusM(model) + clearanceM;
}
