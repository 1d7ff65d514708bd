/**
 * The frame and the angles of the whole core, stated once.
 *
 * Local east-north-up frame in metres at the project's origin, aligned to true north. Azimuth clockwise from true
 * north, 0..360. Elevation above the horizontal. Tilt 0 lies flat with its glass up, 90 stands upright.
 */

/** A vector of the local frame: east, north, up. */
export type Vec3 = [east: number, north: number, up: number];

/** A direction of the sun as seen from the plot; elevation is the apparent one wherever shade is computed. */
export interface SunDirection {
	azimuthDeg: number;
	elevationDeg: number;
}

export const RADIANS_PER_DEGREE = Math.PI / 180;

/** Brings an angle in degrees into 0 (included) .. 360 (excluded). */
export function normaliseDeg(angleDeg: number): number {
	const turned = angleDeg % 360;
	const positive = turned < 0 ? turned + 360 : turned;
	return positive >= 360 ? 0 : positive + 0;
}

/** Unit vector towards the sun: s = (sin A cos e, cos A cos e, sin e). Degrees in, local frame out. */
export function sunVector(azimuthDeg: number, elevationDeg: number): Vec3 {
	const azimuth = azimuthDeg * RADIANS_PER_DEGREE;
	const elevation = elevationDeg * RADIANS_PER_DEGREE;
	const level = Math.cos(elevation);
	return [Math.sin(azimuth) * level, Math.cos(azimuth) * level, Math.sin(elevation)];
}

/**
 * Axes of a table: n leaves the glass, u is level and to the right of someone who faces the glass, v = n x u goes
 * up the slope. For a table that faces south, u is east and v points north and up.
 */
export function tableAxes(azimuthDeg: number, tiltDeg: number): { u: Vec3; v: Vec3; n: Vec3 } {
	const a = azimuthDeg * RADIANS_PER_DEGREE;
	const t = tiltDeg * RADIANS_PER_DEGREE;
	const sa = Math.sin(a);
	const ca = Math.cos(a);
	const st = Math.sin(t);
	const ct = Math.cos(t);
	return { u: [-ca, sa, 0], v: [-sa * ct, -ca * ct, st], n: [sa * st, ca * st, ct] };
}

/** Angle between two directions, degrees 0..180; well behaved near 0, where an arc cosine is not. */
export function arcDeg(a: SunDirection, b: SunDirection): number {
	const p = sunVector(a.azimuthDeg, a.elevationDeg);
	const q = sunVector(b.azimuthDeg, b.elevationDeg);
	const chord = Math.hypot(p[0] - q[0], p[1] - q[1], p[2] - q[2]);
	return (2 * Math.asin(Math.min(1, chord / 2))) / RADIANS_PER_DEGREE;
}

/** Smallest turn between two azimuths, degrees 0..180. */
export function turnBetweenDeg(a: number, b: number): number {
	const d = normaliseDeg(a - b);
	return d > 180 ? 360 - d : d;
}
