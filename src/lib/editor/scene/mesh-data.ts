import type { Vec3 } from '$lib/core';
import type { TableQuad } from '../kernels/ray-pick';

/**
 * Triangles and lines as plain number lists for the scene. The scene's own axes are x east, y up, z south; everything before this
 * file speaks east, north, up.
 */
export class TriangleList {
	readonly numbers: number[] = [];

	/** A convex polygon as a fan. */
	polygon(points: readonly Vec3[]): void {
		for (let i = 1; i + 1 < points.length; i += 1) {
			this.#push(points[0]);
			this.#push(points[i]);
			this.#push(points[i + 1]);
		}
	}

	#push([east, north, up]: Vec3): void {
		this.numbers.push(east, up, -north);
	}

	array(): Float32Array {
		return new Float32Array(this.numbers);
	}
}

export class LineList {
	readonly numbers: number[] = [];

	segment(a: Vec3, b: Vec3): void {
		this.numbers.push(a[0], a[2], -a[1], b[0], b[2], -b[1]);
	}

	closed(points: readonly Vec3[]): void {
		points.forEach((point, i) => this.segment(point, points[(i + 1) % points.length]));
	}

	array(): Float32Array {
		return new Float32Array(this.numbers);
	}
}

/** Points moved along a table's normal, metres, so that what is drawn on the glass is not lost in it. */
export function lifted(table: TableQuad, points: readonly Vec3[], byM: number): Vec3[] {
	return points.map((p): Vec3 => [p[0] + table.n[0] * byM, p[1] + table.n[1] * byM, p[2] + table.n[2] * byM]);
}

/** An upright six-sided pole. */
export function pole(list: TriangleList, foot: Vec3, radiusM: number, heightM: number, sides = 6): void {
	const ring = (upM: number): Vec3[] =>
		Array.from({ length: sides }, (_, i): Vec3 => {
			const angle = (2 * Math.PI * i) / sides;
			return [foot[0] + radiusM * Math.cos(angle), foot[1] + radiusM * Math.sin(angle), upM];
		});
	prism(list, ring(foot[2]), ring(foot[2] + heightM));
}

/** Walls between two rings of the same corners, and the lid on the upper. */
export function prism(list: TriangleList, lower: readonly Vec3[], upper: readonly Vec3[]): void {
	lower.forEach((corner, i) => {
		const next = (i + 1) % lower.length;
		list.polygon([corner, lower[next], upper[next], upper[i]]);
	});
	list.polygon(upper);
}

/** Lines between the modules of a table, on its face. */
export function moduleLines(
	list: LineList,
	table: TableQuad,
	columns: number,
	rows: number,
	at: (x: number, y: number) => Vec3
): void {
	const { widthM, heightM } = table;
	for (let c = 1; c < columns; c += 1) {
		const x = (c / columns - 0.5) * widthM;
		list.segment(at(x, -heightM / 2), at(x, heightM / 2));
	}
	for (let r = 1; r < rows; r += 1) {
		const y = (r / rows - 0.5) * heightM;
		list.segment(at(-widthM / 2, y), at(widthM / 2, y));
	}
}

/** Points round a circle laid on the ground; `upM` gives the ground's height. */
export function groundCircle(
	eastM: number,
	northM: number,
	radiusM: number,
	upM: (east: number, north: number) => number,
	corners = 48
): Vec3[] {
	return Array.from({ length: corners }, (_, i): Vec3 => {
		const angle = (2 * Math.PI * i) / corners;
		const east = eastM + radiusM * Math.cos(angle);
		const north = northM + radiusM * Math.sin(angle);
		return [east, north, upM(east, north)];
	});
}

/** Every other piece of a closed outline. */
export function dashed(list: LineList, points: readonly Vec3[]): void {
	for (let i = 0; i < points.length; i += 2) list.segment(points[i], points[(i + 1) % points.length]);
}

/** A flat ring on the ground, as a band of triangles between two circles. */
export function groundBand(list: TriangleList, inner: readonly Vec3[], outer: readonly Vec3[]): void {
	inner.forEach((corner, i) => {
		const next = (i + 1) % inner.length;
		list.polygon([corner, outer[i], outer[next], inner[next]]);
	});
}
