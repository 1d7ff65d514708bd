import type { Mount, Posture, StopArc } from '../core/document';

/**
 * One tracker as it is set out: a line of the coordinate table, of the peg list and of the exports. Metres in the
 * project's local grid (true north at the origin), levels in metres above the project's height datum, WGS84 degrees.
 */
export interface PegRow {
	/** 1.. in the order of setting out. */
	number: number;
	trackerId: string;
	tag: string;
	eastM: number;
	northM: number;
	/** Level of the ground at the centre. */
	groundM: number;
	/** Tilt axis above the ground at the centre. */
	axisHeightM: number;
	/** Level of the tilt axis: ground plus axis height. */
	axisLevelM: number;
	latitudeDeg: number;
	longitudeDeg: number;
	modelId: string;
	modelName: string;
	/** Radius of the reach circle. */
	reachM: number;
	stops: StopArc | null;
	posture: Posture;
	/** Where the sensor goes on this tracker; null while nothing is chosen. */
	mount: Mount | null;
	/** True when this tracker has its own place and not the field's common one. */
	ownMount: boolean;
}
