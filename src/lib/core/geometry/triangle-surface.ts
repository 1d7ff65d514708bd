import type { GroundPoint } from '../document';
import { delaunay, type Triangulation } from './delaunay';
import { NEAREST_GROUND_M, type GroundSurface } from './ground-surface';

/** Points are set to whole millimetres: what no survey reaches, and what keeps the triangulation exact. */
const PER_METRE = 1000;
/** A step ahead on a ray, so that one that starts on a corner looks into the triangle it will cross, metres. */
const AHEAD_M = 1e-3;

/** Points to the millimetre, each place once; heights of points at the same place are averaged. */
function distinct(points: readonly GroundPoint[]): { x: Float64Array; y: Float64Array; z: Float64Array } {
	const index = new Map<string, number>();
	const x: number[] = [];
	const y: number[] = [];
	const sum: number[] = [];
	const times: number[] = [];
	for (const [east, north, height] of points) {
		const a = Math.round(east * PER_METRE) + 0;
		const b = Math.round(north * PER_METRE) + 0;
		const key = `${a} ${b}`;
		const known = index.get(key);
		if (known !== undefined) {
			sum[known] += height;
			times[known]++;
			continue;
		}
		index.set(key, x.length);
		x.push(a);
		y.push(b);
		sum.push(height);
		times.push(1);
	}
	return {
		x: Float64Array.from(x),
		y: Float64Array.from(y),
		z: Float64Array.from(sum, (total, i) => total / times[i])
	};
}

/**
 * Ground as Delaunay triangles between measured points, flat in each. Beyond the outline the height of the nearest edge
 * is held. Points on one line give the heights along that line, held to either side.
 */
export class TriangleSurface implements GroundSurface {
	private readonly x: Float64Array;
	private readonly y: Float64Array;
	private readonly z: Float64Array;
	private readonly net: Triangulation;
	/** Rise of each triangle towards east and north. */
	private readonly riseEast: Float64Array;
	private readonly riseNorth: Float64Array;
	/** Edges of the outline (or of the line) as pairs of points. */
	private readonly edges: Int32Array;
	/** A triangle near the middle of each cell, to start walks from. */
	private readonly starts: Int32Array;
	private readonly cells: number;
	private readonly highestM: number;
	readonly extent: readonly [number, number, number, number];

	constructor(points: readonly GroundPoint[]) {
		const { x, y, z } = distinct(points);
		this.net = delaunay(x, y);
		this.x = x.map((value) => value / PER_METRE);
		this.y = y.map((value) => value / PER_METRE);
		this.z = z;
		this.highestM = z.reduce((most, height) => Math.max(most, height), -Infinity);
		const box: [number, number, number, number] = [Infinity, Infinity, -Infinity, -Infinity];
		for (let i = 0; i < x.length; i++) {
			box[0] = Math.min(box[0], this.x[i]);
			box[1] = Math.min(box[1], this.y[i]);
			box[2] = Math.max(box[2], this.x[i]);
			box[3] = Math.max(box[3], this.y[i]);
		}
		this.extent = box;
		const { corners, outline } = this.net;
		const count = corners.length / 3;
		this.riseEast = new Float64Array(count);
		this.riseNorth = new Float64Array(count);
		for (let t = 0; t < count; t++) this.layPlane(t);
		if (count > 0) {
			const edges: number[] = [];
			for (let k = 0; k < outline.length; k += 2) {
				const [t, far] = [outline[k], outline[k + 1]];
				edges.push(corners[3 * t + ((far + 1) % 3)], corners[3 * t + ((far + 2) % 3)]);
			}
			this.edges = Int32Array.from(edges);
		} else this.edges = this.chain();
		this.cells = Math.max(1, Math.ceil(Math.sqrt(count / 4)));
		this.starts = this.layStarts();
	}

	/** Plane of a triangle: z = z_a + (e - e_a) riseEast + (n - n_a) riseNorth. */
	private layPlane(t: number): void {
		const { x, y, z } = this;
		const [a, b, c] = this.net.corners.subarray(3 * t, 3 * t + 3);
		const abx = x[b] - x[a];
		const aby = y[b] - y[a];
		const acx = x[c] - x[a];
		const acy = y[c] - y[a];
		const twice = abx * acy - aby * acx;
		this.riseEast[t] = ((z[b] - z[a]) * acy - (z[c] - z[a]) * aby) / twice;
		this.riseNorth[t] = ((z[c] - z[a]) * abx - (z[b] - z[a]) * acx) / twice;
	}

	/** Points of one line in their order along it, as edges; a single point as an edge to itself. */
	private chain(): Int32Array {
		const { x, y } = this;
		const order = Array.from(x, (_, i) => i).sort((a, b) => x[a] - x[b] || y[a] - y[b]);
		if (order.length === 0) return new Int32Array(0);
		if (order.length === 1) return Int32Array.from([order[0], order[0]]);
		return Int32Array.from(order.slice(1).flatMap((to, k) => [order[k], to]));
	}

	private layStarts(): Int32Array {
		const { cells } = this;
		const starts = new Int32Array(cells * cells).fill(-1);
		if (this.net.corners.length === 0) return starts;
		const [west, south, east, north] = this.extent;
		let last = 0;
		for (let row = 0; row < cells; row++) {
			for (let k = 0; k < cells; k++) {
				// To and fro, so that each walk starts next to where the last one ended.
				const column = row % 2 === 0 ? k : cells - 1 - k;
				const e = west + ((column + 0.5) / cells) * (east - west);
				const n = south + ((row + 0.5) / cells) * (north - south);
				const found = this.walk(e, n, last);
				if (found >= 0) last = found;
				starts[row * cells + column] = last;
			}
		}
		return starts;
	}

	/** Twice the area of a, b and a plan point: positive when it lies to the left of a to b. */
	private side(a: number, b: number, e: number, n: number): number {
		const { x, y } = this;
		return (x[b] - x[a]) * (n - y[a]) - (y[b] - y[a]) * (e - x[a]);
	}

	/** The triangle that holds a point, walking from another; -1 when it lies beyond the outline. */
	private walk(e: number, n: number, from: number): number {
		const { corners, across } = this.net;
		let t = from;
		// Rounding could let the walk circle around a corner: the triangle reached by then is the right one to rounding.
		for (let steps = corners.length; steps > 0; steps--) {
			let next = t;
			for (let k = 0; k < 3; k++) {
				const a = corners[3 * t + ((k + 1) % 3)];
				const b = corners[3 * t + ((k + 2) % 3)];
				if (this.side(a, b, e, n) < 0) {
					next = across[3 * t + k];
					break;
				}
			}
			if (next === t) return t;
			if (next < 0) return -1;
			t = next;
		}
		return t;
	}

	private find(e: number, n: number): number {
		if (this.net.corners.length === 0) return -1;
		const { cells } = this;
		const [west, south, east, north] = this.extent;
		const cell = (value: number, low: number, high: number) =>
			Math.min(cells - 1, Math.max(0, Math.floor(((value - low) / (high - low)) * cells)));
		return this.walk(e, n, this.starts[cell(n, south, north) * cells + cell(e, west, east)]);
	}

	/** Height of the nearest point of the outline. */
	private heldM(e: number, n: number): number {
		const { x, y, z, edges } = this;
		let least = Infinity;
		let height = 0;
		for (let k = 0; k < edges.length; k += 2) {
			const a = edges[k];
			const b = edges[k + 1];
			const dx = x[b] - x[a];
			const dy = y[b] - y[a];
			const length2 = dx * dx + dy * dy;
			const along = length2 === 0 ? 0 : ((e - x[a]) * dx + (n - y[a]) * dy) / length2;
			const t = Math.min(1, Math.max(0, along));
			const away = (e - x[a] - t * dx) ** 2 + (n - y[a] - t * dy) ** 2;
			if (away < least) {
				least = away;
				height = z[a] + t * (z[b] - z[a]);
			}
		}
		return height;
	}

	private onPlane(t: number, e: number, n: number): number {
		const a = this.net.corners[3 * t];
		return this.z[a] + (e - this.x[a]) * this.riseEast[t] + (n - this.y[a]) * this.riseNorth[t];
	}

	heightM(eastM: number, northM: number): number {
		const t = this.find(eastM, northM);
		return t < 0 ? this.heldM(eastM, northM) : this.onPlane(t, eastM, northM);
	}

	gradient(eastM: number, northM: number): [number, number] {
		const t = this.find(eastM, northM);
		if (t >= 0) return [this.riseEast[t], this.riseNorth[t]];
		// Beyond the outline: by differences over a decimetre.
		const h = 0.05;
		return [
			(this.heldM(eastM + h, northM) - this.heldM(eastM - h, northM)) / (2 * h),
			(this.heldM(eastM, northM + h) - this.heldM(eastM, northM - h)) / (2 * h)
		];
	}

	skylineTangent(eastM: number, northM: number, upM: number, towardsE: number, towardsN: number): number {
		// Ground is straight between two crossings, so (z - up) / distance is largest at one of them.
		const aboveM = this.highestM - upM;
		if (!(aboveM > 0)) return -Infinity;
		const { corners, across } = this.net;
		const { x, y, z } = this;
		const start = this.rayStart(eastM, northM, towardsE, towardsN);
		if (start === null) return -Infinity;
		// The ray leaves a triangle through the side from a, on its right (or on it), to b, on its left.
		let { triangle, far } = start;
		let a = corners[3 * triangle + ((far + 1) % 3)];
		let b = corners[3 * triangle + ((far + 2) % 3)];
		let offA = towardsE * (y[a] - northM) - towardsN * (x[a] - eastM);
		let offB = towardsE * (y[b] - northM) - towardsN * (x[b] - eastM);
		if (start.entering) {
			[a, b] = [b, a];
			[offA, offB] = [offB, offA];
		}
		let highest = -Infinity;
		for (let steps = corners.length; steps > 0; steps--) {
			const w = offA / (offA - offB);
			const away =
				(x[a] + w * (x[b] - x[a]) - eastM) * towardsE + (y[a] + w * (y[b] - y[a]) - northM) * towardsN;
			if (away > NEAREST_GROUND_M) {
				highest = Math.max(highest, (z[a] + w * (z[b] - z[a]) - upM) / away);
				// Nothing further off can stand higher in the sky.
				if (highest * away >= aboveM) break;
			}
			const next = start.entering && steps === corners.length ? triangle : across[3 * triangle + far];
			if (next < 0) break;
			triangle = next;
			// The new triangle's third corner decides through which of its other sides the ray leaves.
			const base = 3 * triangle;
			const k =
				corners[base] !== a && corners[base] !== b
					? 0
					: corners[base + 1] !== a && corners[base + 1] !== b
						? 1
						: 2;
			const c = corners[base + k];
			const offC = towardsE * (y[c] - northM) - towardsN * (x[c] - eastM);
			if (offC > 0) {
				// Out between a and c: the corner opposite is b.
				far = corners[base + ((k + 1) % 3)] === b ? (k + 1) % 3 : (k + 2) % 3;
				b = c;
				offB = offC;
			} else {
				far = corners[base + ((k + 1) % 3)] === a ? (k + 1) % 3 : (k + 2) % 3;
				a = c;
				offA = offC;
			}
		}
		return highest;
	}

	/**
	 * The triangle that a ray begins in with the corner opposite to the side it leaves through; from beyond the outline the
	 * triangle that it enters, with the corner opposite to the side it enters through. Null where it meets none.
	 */
	private rayStart(
		eastM: number,
		northM: number,
		towardsE: number,
		towardsN: number
	): { triangle: number; far: number; entering: boolean } | null {
		const { corners, across, outline } = this.net;
		const { x, y } = this;
		const off = (p: number) => towardsE * (y[p] - northM) - towardsN * (x[p] - eastM);
		const leaving = (t: number): number =>
			t < 0
				? -1
				: [0, 1, 2].findIndex(
						(k) => off(corners[3 * t + ((k + 1) % 3)]) <= 0 && off(corners[3 * t + ((k + 2) % 3)]) > 0
					);
		const inside = this.find(eastM + AHEAD_M * towardsE, northM + AHEAD_M * towardsN);
		if (inside >= 0) {
			// A ray along a side or through a corner may only graze the triangle it starts in: the next one is across.
			for (const triangle of [inside, ...across.subarray(3 * inside, 3 * inside + 3)]) {
				const far = leaving(triangle);
				if (far >= 0) return { triangle, far, entering: false };
			}
			return null;
		}
		let nearest = Infinity;
		let found: { triangle: number; far: number; entering: boolean } | null = null;
		for (let k = 0; k < outline.length; k += 2) {
			const [triangle, far] = [outline[k], outline[k + 1]];
			const a = corners[3 * triangle + ((far + 1) % 3)];
			const b = corners[3 * triangle + ((far + 2) % 3)];
			const [offA, offB] = [off(a), off(b)];
			// The ray enters where a side of the outline runs from its left to its right.
			if (!(offA > 0 && offB <= 0)) continue;
			const w = offA / (offA - offB);
			const away =
				(x[a] + w * (x[b] - x[a]) - eastM) * towardsE + (y[a] + w * (y[b] - y[a]) - northM) * towardsN;
			if (away > 0 && away < nearest) {
				nearest = away;
				found = { triangle, far, entering: true };
			}
		}
		return found;
	}

	mesh(): { points: Float64Array; corners: Int32Array } {
		const points = new Float64Array(3 * this.x.length);
		for (let i = 0; i < this.x.length; i++) points.set([this.x[i], this.y[i], this.z[i]], 3 * i);
		return { points, corners: this.net.corners };
	}
}
