import type { Vec3 } from '../conventions';

/** A convex body that casts a shadow. */
export interface Solid {
	/** x, y, z of each corner, metres. */
	vertices: Float64Array;
	/** Pairs of corners. */
	edges: Int32Array;
	/** Outward faces (nx, ny, nz, d): inside where n.p <= d. */
	faces: Float64Array;
	/** Share of the beam that passes, 0 opaque; of a tree, bare. */
	passes: number;
	/** The same in leaf, on the days of the year `leafDays` (first and last, 1..366; may run over the year's end). */
	leafPasses?: number;
	leafDays?: readonly [from: number, to: number];
	/** The obstacle it is part of, for naming who shades. */
	source: number;
}

/** Share of the beam that a solid lets through on a day of the year, 1..366. */
export function passesOn(solid: Solid, dayOfYear: number): number {
	const { passes, leafPasses, leafDays } = solid;
	if (leafPasses === undefined || leafDays === undefined) return passes;
	const [from, to] = leafDays;
	const inLeaf = from <= to ? dayOfYear >= from && dayOfYear <= to : dayOfYear >= from || dayOfYear <= to;
	return inLeaf ? leafPasses : passes;
}

function facesOf(vertices: Float64Array, loops: readonly (readonly number[])[]): Float64Array {
	const middle = [0, 0, 0];
	const count = vertices.length / 3;
	for (let k = 0; k < count; k++) for (let c = 0; c < 3; c++) middle[c] += vertices[3 * k + c] / count;
	const faces: number[] = [];
	for (const loop of loops) {
		const p = (k: number, c: number) => vertices[3 * loop[k] + c];
		// Newell's sum bears corners that coincide, as at the tip of a cone.
		let nx = 0;
		let ny = 0;
		let nz = 0;
		for (let k = 0; k < loop.length; k++) {
			const j = (k + 1) % loop.length;
			nx += (p(k, 1) - p(j, 1)) * (p(k, 2) + p(j, 2) - 2 * middle[2]);
			ny += (p(k, 2) - p(j, 2)) * (p(k, 0) + p(j, 0) - 2 * middle[0]);
			nz += (p(k, 0) - p(j, 0)) * (p(k, 1) + p(j, 1) - 2 * middle[1]);
		}
		const length = Math.hypot(nx, ny, nz);
		if (length < 1e-12) continue;
		nx /= length;
		ny /= length;
		nz /= length;
		let d = nx * p(0, 0) + ny * p(0, 1) + nz * p(0, 2);
		if (nx * middle[0] + ny * middle[1] + nz * middle[2] > d) {
			nx = -nx;
			ny = -ny;
			nz = -nz;
			d = -d;
		}
		faces.push(nx, ny, nz, d);
	}
	return Float64Array.from(faces);
}

/** A convex body from its corners and the loops of corners round each of its flat faces. */
export function solidFromLoops(
	corners: readonly Vec3[],
	loops: readonly (readonly number[])[],
	passes: number,
	source: number
): Solid {
	const vertices = new Float64Array(3 * corners.length);
	corners.forEach((corner, k) => vertices.set(corner, 3 * k));
	const edges: number[] = [];
	const seen = new Set<number>();
	for (const loop of loops) {
		loop.forEach((a, k) => {
			const b = loop[(k + 1) % loop.length];
			const key = Math.min(a, b) * corners.length + Math.max(a, b);
			if (seen.has(key)) return;
			seen.add(key);
			edges.push(a, b);
		});
	}
	return { vertices, edges: Int32Array.from(edges), faces: facesOf(vertices, loops), passes, source };
}

/** Loops of the sides between two rings of n corners that start at `low` and `high`. */
export function sideLoops(n: number, low: number, high: number): number[][] {
	return Array.from({ length: n }, (_, k) => {
		const j = (k + 1) % n;
		return [low + k, low + j, high + j, high + k];
	});
}

/** A body between two flat rings of equal corner count. */
export function ringSolid(
	bottom: readonly Vec3[],
	top: readonly Vec3[],
	passes: number,
	source: number
): Solid {
	const n = bottom.length;
	const loops = [bottom.map((_, k) => k), top.map((_, k) => n + k), ...sideLoops(n, 0, n)];
	return solidFromLoops([...bottom, ...top], loops, passes, source);
}
