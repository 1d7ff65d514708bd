import { RADIANS_PER_DEGREE, type Vec3 } from '../conventions';
import { GroupPose, type TableGroup } from './table-group';

/**
 * Tables as the light sees them: their poses, and where each stands on the plane square to the light. One thing can
 * shade another only where their outlines overlap there, whatever the poses.
 */
export class LightView {
	readonly count: number;
	readonly poses: GroupPose[];
	readonly viewX: Float64Array;
	readonly viewY: Float64Array;
	/** To the right and up in the light's view. */
	axisX: Vec3 = [1, 0, 0];
	axisY: Vec3 = [0, 1, 0];
	/** Greatest half extents of any table in the view. */
	widest = 0;
	highest = 0;
	protected lightAzimuthDeg = 0;
	protected lightElevationDeg = 90;

	constructor(
		/** Fixed points of the tables, metres. */
		readonly east: Float64Array,
		readonly north: Float64Array,
		readonly up: Float64Array,
		/** Group of each table. */
		readonly groupOf: Int32Array,
		readonly groups: readonly TableGroup[]
	) {
		this.count = east.length;
		this.poses = groups.map(() => new GroupPose());
		this.viewX = new Float64Array(this.count);
		this.viewY = new Float64Array(this.count);
	}

	/** Poses as for a sun, light from a direction of its own. Degrees. */
	protected turn(
		azimuthDeg: number,
		elevationDeg: number,
		lightAzimuthDeg: number,
		lightElevationDeg: number
	): void {
		this.lightAzimuthDeg = lightAzimuthDeg;
		this.lightElevationDeg = lightElevationDeg;
		const a = lightAzimuthDeg * RADIANS_PER_DEGREE;
		const e = lightElevationDeg * RADIANS_PER_DEGREE;
		const sa = Math.sin(a);
		const ca = Math.cos(a);
		const se = Math.sin(e);
		const ce = Math.cos(e);
		const s: Vec3 = [sa * ce, ca * ce, se];
		const ax = (this.axisX = [-ca, sa, 0]);
		const ay = (this.axisY = [-sa * se, -ca * se, ce]);
		this.widest = 0;
		this.highest = 0;
		for (let g = 0; g < this.groups.length; g++) {
			const pose = this.poses[g];
			pose.turn(this.groups[g].poseAt(azimuthDeg, elevationDeg), this.groups[g], s, ax, ay);
			if (pose.extentX > this.widest) this.widest = pose.extentX;
			if (pose.extentY > this.highest) this.highest = pose.extentY;
		}
		const { east, north, up, viewX, viewY, groupOf, poses } = this;
		for (let i = 0; i < this.count; i++) {
			const pose = poses[groupOf[i]];
			viewX[i] = east[i] * ax[0] + north[i] * ax[1] + pose.viewX;
			viewY[i] = east[i] * ay[0] + north[i] * ay[1] + up[i] * ay[2] + pose.viewY;
		}
	}

	/** Cosine of the sun's angle to a table's front. */
	cosine(i: number): number {
		return this.poses[this.groupOf[i]].cosine;
	}

	/**
	 * Puts the fixed point of table i elsewhere, metres. Until the next light only tables found without an index may be
	 * asked about: set the sun with `indexed` false. Near skylines stay those of the old place.
	 */
	place(i: number, eastM: number, northM: number, upM: number): void {
		const { axisX: ax, axisY: ay } = this;
		this.east[i] = eastM;
		this.north[i] = northM;
		this.up[i] = upM;
		const pose = this.poses[this.groupOf[i]];
		this.viewX[i] = eastM * ax[0] + northM * ax[1] + pose.viewX;
		this.viewY[i] = eastM * ay[0] + northM * ay[1] + upM * ay[2] + pose.viewY;
	}

	/** Adds to `found`, behind the first `count`, every table whose outline meets that of table i in the light's view. */
	meeting(i: number, found: Int32Array, count: number): number {
		const { viewX, viewY, poses, groupOf } = this;
		const own = poses[groupOf[i]];
		const reachX = own.extentX + this.widest;
		const reachY = own.extentY + this.highest;
		const x = viewX[i];
		const y = viewY[i];
		let n = count;
		for (let j = 0; j < this.count; j++) {
			const dx = viewX[j] - x;
			if (dx >= reachX || -dx >= reachX) continue;
			const dy = viewY[j] - y;
			if (dy >= reachY || -dy >= reachY || j === i) continue;
			let known = false;
			for (let k = 0; k < count && !known; k++) known = found[k] === j;
			if (!known) found[n++] = j;
		}
		return n;
	}

	/** Middle of a table's glass, local frame, metres. */
	centre(i: number): [number, number, number] {
		const { offset } = this.poses[this.groupOf[i]];
		return [this.east[i] + offset[0], this.north[i] + offset[1], this.up[i] + offset[2]];
	}
}
