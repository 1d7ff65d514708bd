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
	readonly extent: readonly [number, number, number, number];

	constructor(points: readonly GroundPoint[]) {
		const { x, y, z } = distinct(points);
		this.net = delaunay(x, y);
		this.x = x.map((value) => value / PER_METRE);
		this.y = y.map((value) => value / PER_METRE);
		this.z = z;
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
		const { corners, across, outline } = this.net;
		const { x, y, z } = this;
		// Signed distance of a point from the ray's line, positive to its left.
		const off = (p: number) => towardsE * (y[p] - northM) - towardsN * (x[p] - eastM);
		let highest = -Infinity;
		/** Looks at where the ray crosses a side; answers how far away, metres. */
		const look = (a: number, b: number): number => {
			const oa = off(a);
			const w = oa / (oa - off(b));
			const away =
				(x[a] + w * (x[b] - x[a]) - eastM) * towardsE + (y[a] + w * (y[b] - y[a]) - northM) * towardsN;
			if (away > NEAREST_GROUND_M) highest = Math.max(highest, (z[a] + w * (z[b] - z[a]) - upM) / away);
			return away;
		};
		// Ground is straight between two crossings, so (z - up) / distance is largest at one of them.
		let t = this.find(eastM + AHEAD_M * towardsE, northM + AHEAD_M * towardsN);
		if (t < 0) {
			let entry = Infinity;
			for (let k = 0; k < outline.length; k += 2) {
				const a = corners[3 * outline[k] + ((outline[k + 1] + 1) % 3)];
				const b = corners[3 * outline[k] + ((outline[k + 1] + 2) % 3)];
				// The ray enters where a side of the outline runs from its left to its right.
				if (!(off(a) > 0 && off(b) <= 0)) continue;
				const before = highest;
				const away = look(a, b);
				if (away > 0 && away < entry) {
					entry = away;
					t = outline[k];
				} else highest = before;
			}
			if (t < 0) return -Infinity;
		}
		for (let steps = corners.length; steps > 0 && t >= 0; steps--) {
			// A ray leaves through the side that runs from its right to its left.
			let leaves = -1;
			for (let k = 0; k < 3 && leaves < 0; k++) {
				if (off(corners[3 * t + ((k + 1) % 3)]) <= 0 && off(corners[3 * t + ((k + 2) % 3)]) > 0) leaves = k;
			}
			// A ray along a side or through a corner may graze the triangle it starts in: the next one is across.
			if (leaves < 0) leaves = [0, 1, 2].find((k) => this.straddles(across[3 * t + k], off)) ?? -1;
			else look(corners[3 * t + ((leaves + 1) % 3)], corners[3 * t + ((leaves + 2) % 3)]);
			if (leaves < 0) break;
			t = across[3 * t + leaves];
		}
		return highest;
	}

	private straddles(t: number, off: (p: number) => number): boolean {
		if (t < 0) return false;
		const { corners } = this.net;
		let left = 0;
		for (let k = 0; k < 3; k++) if (off(corners[3 * t + k]) > 0) left++;
		return left === 1 || left === 2;
	}

	mesh(): { points: Float64Array; corners: Int32Array } {
		const points = new Float64Array(3 * this.x.length);
		for (let i = 0; i < this.x.length; i++) points.set([this.x[i], this.y[i], this.z[i]], 3 * i);
		return { points, corners: this.net.corners };
	}
}
