import { tableAxes, type SunDirection, type Vec3 } from '../conventions';
import type { Posture, TrackerModel } from '../document';
import { aimOf, type Aim } from './aim';

/** A table as it stands at one moment. */
export interface TablePose {
	/** Middle of the glass, local frame, metres. */
	centre: Vec3;
	azimuthDeg: number;
	tiltDeg: number;
}

/** From the point where the azimuth axis meets the height of the tilt axis to the middle of the glass, metres. */
export function centreOffset(model: TrackerModel, aim: Aim): Vec3 {
	const { v, n } = tableAxes(aim.azimuthDeg, aim.tiltDeg);
	const facing = tableAxes(aim.azimuthDeg, 90).n;
	const { tiltAxisOffsetM: ahead, tableOffsetM: front, centreShiftM: shift } = model;
	return [
		ahead * facing[0] + front * n[0] + shift * v[0],
		ahead * facing[1] + front * n[1] + shift * v[1],
		front * n[2] + shift * v[2]
	];
}

/**
 * Pose of one tracker. `axisHeightM` overrides the model's height of the tilt axis above ground when it is not null;
 * the foot is where the pole meets the ground, metres in the local frame; `sun` is the apparent sun.
 */
export function poseOf(
	model: TrackerModel,
	axisHeightM: number | null,
	footEastM: number,
	footNorthM: number,
	footUpM: number,
	posture: Posture,
	sun: SunDirection
): TablePose {
	const aim = aimOf(model, posture, sun);
	const offset = centreOffset(model, aim);
	const axis = axisHeightM ?? model.axisHeightM;
	return {
		centre: [footEastM + offset[0], footNorthM + offset[1], footUpM + axis + offset[2]],
		azimuthDeg: aim.azimuthDeg,
		tiltDeg: aim.tiltDeg
	};
}
