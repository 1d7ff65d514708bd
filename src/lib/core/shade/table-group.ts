import { tableAxes, type Vec3 } from '../conventions';
import type { Aim } from '../machine/aim';

/** A table counts as turned away from the light below this cosine. */
export const LEAST_COSINE = 1e-6;
/** Shaders must stand this far up-sun, metres along the target's normal. */
export const UP_SUN_M = 1e-7;

/** Tables that share sizes and, at any one moment, their pose. */
export interface TableGroup {
	/** Half of the glass, metres. */
	halfWidth: number;
	halfHeight: number;
	/** Half of the steel outline, which is what throws the shadow, metres. */
	steelHalfWidth: number;
	steelHalfHeight: number;
	/** Half of the clear slot in the middle; 0 is none. */
	halfGap: number;
	/** The middle of the glass is never farther than this from the fixed point, metres. */
	offsetReach: number;
	/** Where it points at a sun. */
	aimAt(azimuthDeg: number, elevationDeg: number): Aim;
	/** Pose at a sun: bearing, tilt and the way from the fixed point of a table to its middle. */
	poseAt(azimuthDeg: number, elevationDeg: number): AimedPose;
}

export interface AimedPose {
	azimuthDeg: number;
	tiltDeg: number;
	offset: readonly [number, number, number];
}

/** Ground near the tables, rising between them and the light. */
export interface TableHorizons {
	/** Whether it hides light from this direction from the middle of table i. Degrees. */
	hides(i: number, azimuthDeg: number, elevationDeg: number): boolean;
}

/** Where one group's tables point at the present sun. */
export class GroupPose {
	aim: AimedPose | null = null;
	azimuthDeg = 0;
	tiltDeg = 0;
	offset: readonly [number, number, number] = [0, 0, 0];
	u: readonly number[] = [1, 0, 0];
	v: readonly number[] = [0, 1, 0];
	n: readonly number[] = [0, 0, 1];
	/** n.s */
	cosine = 1;
	// Projections along the sun on the table's plane: U, V give table coordinates, D the distance up-sun.
	ux = 0;
	uy = 0;
	uz = 0;
	vx = 0;
	vy = 0;
	vz = 0;
	/** Offset and half extents in the sun's view. */
	viewX = 0;
	viewY = 0;
	extentX = 0;
	extentY = 0;
	private readonly packed = new Float64Array(9);

	/** Turns to an aim under light from s; x and y are the axes of the light's view. */
	turn(aim: AimedPose, group: TableGroup, s: Vec3, x: Vec3, y: Vec3): void {
		// A table that stands still answers with the same pose again and again.
		if (aim !== this.aim) {
			this.aim = aim;
			this.azimuthDeg = aim.azimuthDeg;
			this.tiltDeg = aim.tiltDeg;
			this.offset = aim.offset;
			const axes = tableAxes(aim.azimuthDeg, aim.tiltDeg);
			this.u = axes.u;
			this.v = axes.v;
			this.n = axes.n;
		}
		const { u, v, n } = this;
		const cosine = dot(n, s);
		this.cosine = cosine;
		if (Math.abs(cosine) > LEAST_COSINE) {
			// U = u - (u.s)/(n.s) n, V = v - (v.s)/(n.s) n
			const us = dot(u, s) / cosine;
			const vs = dot(v, s) / cosine;
			this.ux = u[0] - us * n[0];
			this.uy = u[1] - us * n[1];
			this.uz = u[2] - us * n[2];
			this.vx = v[0] - vs * n[0];
			this.vy = v[1] - vs * n[1];
			this.vz = v[2] - vs * n[2];
		}
		this.viewX = dot(aim.offset, x);
		this.viewY = dot(aim.offset, y);
		const { steelHalfWidth, steelHalfHeight } = group;
		this.extentX = steelHalfWidth * Math.abs(dot(u, x)) + steelHalfHeight * Math.abs(dot(v, x));
		this.extentY = steelHalfWidth * Math.abs(dot(u, y)) + steelHalfHeight * Math.abs(dot(v, y));
	}

	/** U, V and n side by side. */
	axes(): Float64Array {
		const { packed, n } = this;
		packed[0] = this.ux;
		packed[1] = this.uy;
		packed[2] = this.uz;
		packed[3] = this.vx;
		packed[4] = this.vy;
		packed[5] = this.vz;
		packed[6] = n[0];
		packed[7] = n[1];
		packed[8] = n[2];
		return packed;
	}
}

export function dot(a: readonly number[], b: readonly number[]): number {
	return a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
}
