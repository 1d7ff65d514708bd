import { normaliseDeg, turnBetweenDeg } from '../conventions';
import type { TrackerModel } from '../document';
import type { Aim } from './aim';

type Drive = Pick<TrackerModel, 'stops' | 'slewDegPerS' | 'tiltSlewDegPerS'>;

/** Place of a bearing on the sweep, degrees from its beginning; one in the barred sector counts at the stop next to it. */
function alongSweep(fromDeg: number, spanDeg: number, azimuthDeg: number): number {
	const along = normaliseDeg(azimuthDeg - fromDeg);
	if (along <= spanDeg) return along;
	return along - spanDeg <= 360 - along ? spanDeg : 0;
}

/**
 * Turn about the upright axis between two bearings, degrees, positive clockwise. Without stops the shorter way; with stops
 * the only way there is, along the sweep and never through the barred sector, which may take it through north.
 */
export function azimuthTravelDeg(model: Pick<TrackerModel, 'stops'>, fromDeg: number, toDeg: number): number {
	const { stops } = model;
	const span = stops === null ? 0 : normaliseDeg(stops.toDeg - stops.fromDeg);
	if (stops !== null && span !== 0) {
		return alongSweep(stops.fromDeg, span, toDeg) - alongSweep(stops.fromDeg, span, fromDeg);
	}
	const turn = turnBetweenDeg(toDeg, fromDeg);
	return normaliseDeg(toDeg - fromDeg) <= 180 ? turn : -turn;
}

/**
 * Time to move from one aim to another, seconds: both axes run at once at their speeds, so the slower one decides. Starting
 * and braking are neglected (common drives reach their speed within a second: common practice, no source).
 */
export function slewSeconds(model: Drive, from: Aim, to: Aim): number {
	const turn = Math.abs(azimuthTravelDeg(model, from.azimuthDeg, to.azimuthDeg)) / model.slewDegPerS;
	const tilt = Math.abs(to.tiltDeg - from.tiltDeg) / (model.tiltSlewDegPerS ?? model.slewDegPerS);
	return Math.max(turn, tilt);
}
