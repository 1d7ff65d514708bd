import type { Solid } from '../shade/solid';

/** A hit nearer than this is the surface that the ray starts on, metres. */
const LEAST_WAY_M = 1e-7;

/** A table as a ray meets it, from either side. */
export interface RayTable {
	centre: readonly number[];
	u: readonly number[];
	v: readonly number[];
	n: readonly number[];
	halfWidth: number;
	halfHeight: number;
	/** Half of the clear slot in the middle; 0 is none. */
	halfGap: number;
}

/** Whether the ray from p along the unit vector s meets a table. */
export function rayMeetsTable(p: readonly number[], s: readonly number[], table: RayTable): boolean {
	const { centre: c, u, v, n } = table;
	const across = n[0] * s[0] + n[1] * s[1] + n[2] * s[2];
	if (Math.abs(across) < 1e-12) return false;
	const dx = c[0] - p[0];
	const dy = c[1] - p[1];
	const dz = c[2] - p[2];
	const way = (n[0] * dx + n[1] * dy + n[2] * dz) / across;
	if (way <= LEAST_WAY_M) return false;
	const hx = way * s[0] - dx;
	const hy = way * s[1] - dy;
	const hz = way * s[2] - dz;
	const x = Math.abs(hx * u[0] + hy * u[1] + hz * u[2]);
	const y = Math.abs(hx * v[0] + hy * v[1] + hz * v[2]);
	return x <= table.halfWidth && y <= table.halfHeight && x >= table.halfGap;
}

/** Whether the ray from p along s meets a convex body; a start inside it counts. */
export function rayMeetsSolid(p: readonly number[], s: readonly number[], solid: Solid): boolean {
	const { faces } = solid;
	let enter = LEAST_WAY_M;
	let leave = Infinity;
	for (let o = 0; o < faces.length; o += 4) {
		const along = faces[o] * s[0] + faces[o + 1] * s[1] + faces[o + 2] * s[2];
		const room = faces[o + 3] - faces[o] * p[0] - faces[o + 1] * p[1] - faces[o + 2] * p[2];
		if (Math.abs(along) < 1e-12) {
			if (room < 0) return false;
		} else if (along < 0) {
			enter = Math.max(enter, room / along);
		} else {
			leave = Math.min(leave, room / along);
		}
		if (enter >= leave) return false;
	}
	return faces.length > 0;
}
