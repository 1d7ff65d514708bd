import { normaliseDeg, RADIANS_PER_DEGREE, turnBetweenDeg, type SunDirection } from '../conventions';
import type { Posture, StopArc, TrackerModel } from '../document';

export interface Aim {
	azimuthDeg: number;
	tiltDeg: number;
}

/** True when a bearing lies on the arc that runs clockwise from `fromDeg` to `toDeg`, through north if it must. */
export function arcContains(arc: StopArc, azimuthDeg: number): boolean {
	const span = normaliseDeg(arc.toDeg - arc.fromDeg);
	// Stops that meet leave the whole turn.
	return span === 0 || normaliseDeg(azimuthDeg - arc.fromDeg) <= span;
}

const clamp = (value: number, low: number, high: number): number => Math.min(high, Math.max(low, value));

/**
 * The reachable aim that is nearest in angle to the sun: the sun's own bearing where the stops allow it, else the
 * better of the two stops with the tilt that suits it; tilt held inside the model's range.
 */
export function followAim(
	model: Pick<TrackerModel, 'minTiltDeg' | 'maxTiltDeg' | 'stops'>,
	sun: SunDirection
): Aim {
	const { minTiltDeg, maxTiltDeg, stops } = model;
	if (stops === null || arcContains(stops, sun.azimuthDeg)) {
		return { azimuthDeg: sun.azimuthDeg, tiltDeg: clamp(90 - sun.elevationDeg, minTiltDeg, maxTiltDeg) };
	}
	const elevation = sun.elevationDeg * RADIANS_PER_DEGREE;
	const atStop = (azimuthDeg: number): Aim & { cosine: number } => {
		const away = Math.cos((azimuthDeg - sun.azimuthDeg) * RADIANS_PER_DEGREE);
		// n.s = sin t cos e cos(a - A) + cos t sin e is largest at this tilt.
		const best = Math.atan2(Math.cos(elevation) * away, Math.sin(elevation)) / RADIANS_PER_DEGREE;
		const tiltDeg = clamp(best, minTiltDeg, maxTiltDeg);
		const tilt = tiltDeg * RADIANS_PER_DEGREE;
		const cosine = Math.sin(tilt) * Math.cos(elevation) * away + Math.cos(tilt) * Math.sin(elevation);
		return { azimuthDeg, tiltDeg, cosine };
	};
	const from = atStop(stops.fromDeg);
	const to = atStop(stops.toDeg);
	const pick = to.cosine > from.cosine ? to : from;
	return { azimuthDeg: normaliseDeg(pick.azimuthDeg), tiltDeg: pick.tiltDeg };
}

function reachableBearing(model: Pick<TrackerModel, 'stops'>, azimuthDeg: number): number {
	const { stops } = model;
	if (stops === null || arcContains(stops, azimuthDeg)) return normaliseDeg(azimuthDeg);
	const nearerFrom = turnBetweenDeg(stops.fromDeg, azimuthDeg) <= turnBetweenDeg(stops.toDeg, azimuthDeg);
	return normaliseDeg(nearerFrom ? stops.fromDeg : stops.toDeg);
}

/**
 * Where a table points in a posture. Flat and wind keep the bearing of the sun as far as the stops allow and only
 * change the tilt; flat is the least tilt of the model. A night posture without a bearing of its own rests where the
 * evening left it: due west, or the stop nearest to it. With the sun below the horizon a following table rests at
 * night. Standing still is taken as given.
 */
export function aimOf(model: TrackerModel, posture: Posture, sun: SunDirection): Aim {
	switch (posture.kind) {
		case 'following':
			return sun.elevationDeg > 0 ? followAim(model, sun) : aimOf(model, { kind: 'night' }, sun);
		case 'flat':
			return { azimuthDeg: reachableBearing(model, sun.azimuthDeg), tiltDeg: Math.max(0, model.minTiltDeg) };
		case 'wind':
			return { azimuthDeg: reachableBearing(model, sun.azimuthDeg), tiltDeg: model.windTiltDeg };
		case 'night':
			return {
				azimuthDeg: reachableBearing(model, model.night.azimuthDeg ?? 270),
				tiltDeg: model.night.tiltDeg
			};
		case 'standing':
			return { azimuthDeg: normaliseDeg(posture.azimuthDeg), tiltDeg: posture.tiltDeg };
	}
}
