import type { Solid, Vec3 } from '$lib/core';

/** Corners this near to a face's plane belong to it, metres. */
const ON_FACE_M = 1e-6;

/** The flat faces of a convex body as polygons, corners all round: for drawing. */
export function solidFaces(solid: Solid): Vec3[][] {
	const { vertices, faces } = solid;
	const drawn: Vec3[][] = [];
	const planes: Vec3[] = [];
	for (let f = 0; f < faces.length; f += 4) {
		const normal: Vec3 = [faces[f], faces[f + 1], faces[f + 2]];
		// A wall under a ridge is stored in two parts of one plane.
		if (planes.some((n) => n[0] * normal[0] + n[1] * normal[1] + n[2] * normal[2] > 1 - 1e-12)) continue;
		planes.push(normal);
		const corners: Vec3[] = [];
		for (let v = 0; v < vertices.length; v += 3) {
			const corner: Vec3 = [vertices[v], vertices[v + 1], vertices[v + 2]];
			const off = normal[0] * corner[0] + normal[1] * corner[1] + normal[2] * corner[2] - faces[f + 3];
			if (Math.abs(off) < ON_FACE_M) corners.push(corner);
		}
		if (corners.length >= 3) drawn.push(aroundMiddle(corners, normal));
	}
	return drawn;
}

function aroundMiddle(corners: Vec3[], normal: Vec3): Vec3[] {
	const middle = [0, 1, 2].map((c) => corners.reduce((sum, corner) => sum + corner[c], 0) / corners.length);
	const upright = Math.abs(normal[2]) < 0.9;
	const helper: Vec3 = upright ? [0, 0, 1] : [1, 0, 0];
	const cross = (a: Vec3, b: Vec3): Vec3 => [
		a[1] * b[2] - a[2] * b[1],
		a[2] * b[0] - a[0] * b[2],
		a[0] * b[1] - a[1] * b[0]
	];
	const x = cross(helper, normal);
	const y = cross(normal, x);
	const angle = (corner: Vec3) => {
		const d = corner.map((value, c) => value - middle[c]);
		return Math.atan2(d[0] * y[0] + d[1] * y[1] + d[2] * y[2], d[0] * x[0] + d[1] * x[1] + d[2] * x[2]);
	};
	return corners
		.map((corner) => ({ corner, at: angle(corner) }))
		.sort((a, b) => a.at - b.at)
		.map(({ corner }) => corner);
}
