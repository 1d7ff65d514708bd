import type { Vec3 } from '../conventions';
import { hullOrder } from './hull';
import { flatArea } from './pieces';
import { LEAST_SHADOW_M2, MOST_SHADOW_CORNERS, type ShadowBuffer } from './shadow-buffer';
import { passesOn, type Solid } from './solid';
import { UP_SUN_M, type GroupPose } from './table-group';

/** Solids as the light sees them, and the shadows that they throw on a table's plane. */
export class SolidView {
	readonly solids: readonly Solid[];
	/** Share of the light that each lets through on the present day. */
	readonly passes: Float64Array;
	/** Solids that the last `collect` found. */
	readonly near: Int32Array;
	nearCount = 0;
	private readonly seasonal: boolean;
	/** West, east, low, high of each in the light's view. */
	private readonly boxes: Float64Array;
	private readonly outlines: (Int32Array | null)[];
	/** Views of all together. */
	private west = Infinity;
	private east = -Infinity;
	private low = Infinity;
	private high = -Infinity;
	private axisX: Vec3 = [1, 0, 0];
	private axisY: Vec3 = [0, 1, 0];
	private readonly hullX = new Float64Array(MOST_SHADOW_CORNERS);
	private readonly hullY = new Float64Array(MOST_SHADOW_CORNERS);
	private readonly hullIndex = new Int32Array(2 * MOST_SHADOW_CORNERS);

	constructor(
		solids: readonly Solid[],
		private readonly buffer: ShadowBuffer
	) {
		for (const { vertices } of solids) {
			if (vertices.length > 3 * MOST_SHADOW_CORNERS)
				throw new Error(
					`A body has ${vertices.length / 3} corners; at most ${MOST_SHADOW_CORNERS} are possible`
				);
		}
		// Opaque ones first: what they take need not be cut again by a crown.
		this.solids = [...solids].sort((a, b) => a.passes - b.passes);
		this.boxes = new Float64Array(4 * solids.length);
		this.outlines = solids.map(() => null);
		this.near = new Int32Array(solids.length);
		this.passes = Float64Array.from(this.solids, (solid) => solid.passes);
		this.seasonal = this.solids.some((solid) => solid.leafPasses !== undefined);
	}

	/** Turns to a day of the year, 1..366. */
	setDay(dayOfYear: number): void {
		if (!this.seasonal) return;
		this.solids.forEach((solid, k) => (this.passes[k] = passesOn(solid, dayOfYear)));
	}

	/** Turns to light whose view has these axes. */
	turn(axisX: Vec3, axisY: Vec3): void {
		this.axisX = axisX;
		this.axisY = axisY;
		this.west = this.low = Infinity;
		this.east = this.high = -Infinity;
		const { boxes } = this;
		for (let k = 0; k < this.solids.length; k++) {
			const { vertices } = this.solids[k];
			let west = Infinity;
			let east = -Infinity;
			let low = Infinity;
			let high = -Infinity;
			for (let o = 0; o < vertices.length; o += 3) {
				const x = vertices[o] * axisX[0] + vertices[o + 1] * axisX[1];
				const y = vertices[o] * axisY[0] + vertices[o + 1] * axisY[1] + vertices[o + 2] * axisY[2];
				if (x < west) west = x;
				if (x > east) east = x;
				if (y < low) low = y;
				if (y > high) high = y;
			}
			boxes[4 * k] = west;
			boxes[4 * k + 1] = east;
			boxes[4 * k + 2] = low;
			boxes[4 * k + 3] = high;
			this.outlines[k] = null;
			this.west = Math.min(this.west, west);
			this.east = Math.max(this.east, east);
			this.low = Math.min(this.low, low);
			this.high = Math.max(this.high, high);
		}
	}

	/** Finds what overlaps the box of half sizes ex, ey about (x, y) in the view; returns how many. */
	collect(x: number, y: number, ex: number, ey: number): number {
		const { boxes, near } = this;
		this.nearCount = 0;
		if (x - ex >= this.east || x + ex <= this.west || y - ey >= this.high || y + ey <= this.low) return 0;
		for (let k = 0; k < this.solids.length; k++) {
			if (x + ex <= boxes[4 * k] || x - ex >= boxes[4 * k + 1]) continue;
			if (y + ey <= boxes[4 * k + 2] || y - ey >= boxes[4 * k + 3]) continue;
			near[this.nearCount++] = k;
		}
		return this.nearCount;
	}

	/** Whether everything collected is opaque on the present day. */
	get nearAreOpaque(): boolean {
		for (let k = 0; k < this.nearCount; k++) if (this.passes[this.near[k]] > 0) return false;
		return true;
	}

	/** Shadow of solid k on the plane of a pose through a point, into the buffer; its corners or 0. */
	shadow(k: number, pose: GroupPose, east: number, north: number, up: number): number {
		const { buffer } = this;
		const { corners, shadow } = buffer;
		const { vertices, edges } = this.solids[k];
		const { n, cosine } = pose;
		const count = vertices.length / 3;
		let ahead = 0;
		for (let o = 0; o < vertices.length; o += 3) {
			const dx = vertices[o] - east;
			const dy = vertices[o + 1] - north;
			const dz = vertices[o + 2] - up;
			corners[o] = pose.ux * dx + pose.uy * dy + pose.uz * dz;
			corners[o + 1] = pose.vx * dx + pose.vy * dy + pose.vz * dz;
			const d = (n[0] * dx + n[1] * dy + n[2] * dz) / cosine;
			corners[o + 2] = d;
			if (d > UP_SUN_M) ahead++;
		}
		if (ahead === 0) return 0;
		if (ahead === count) {
			// Its outline in the sun's view is the same whichever table it falls on.
			const outline = this.outlineOf(k);
			for (let c = 0; c < outline.length; c++) {
				shadow[2 * c] = corners[3 * outline[c]];
				shadow[2 * c + 1] = corners[3 * outline[c] + 1];
			}
			const area = flatArea(shadow, 0, outline.length);
			if (Math.abs(area) < LEAST_SHADOW_M2) return 0;
			if (area < 0) buffer.reverse(outline.length);
			return outline.length;
		}
		const { hullX, hullY, hullIndex } = this;
		let size = 0;
		for (let o = 0; o < 3 * count; o += 3) {
			if (corners[o + 2] <= UP_SUN_M) continue;
			hullX[size] = corners[o];
			hullY[size++] = corners[o + 1];
		}
		for (let e = 0; e < edges.length; e += 2) {
			const p = 3 * edges[e];
			const q = 3 * edges[e + 1];
			const d = corners[p + 2] - UP_SUN_M;
			const f = corners[q + 2] - UP_SUN_M;
			if (d > 0 === f > 0) continue;
			const t = d / (d - f);
			hullX[size] = corners[p] + (corners[q] - corners[p]) * t;
			hullY[size++] = corners[p + 1] + (corners[q + 1] - corners[p + 1]) * t;
		}
		const m = hullOrder(hullX, hullY, size, hullIndex);
		for (let c = 0; c < m; c++) {
			shadow[2 * c] = hullX[hullIndex[c]];
			shadow[2 * c + 1] = hullY[hullIndex[c]];
		}
		return m < 3 || flatArea(shadow, 0, m) < LEAST_SHADOW_M2 ? 0 : m;
	}

	/** Corners of solid k that make its outline in the view. */
	private outlineOf(k: number): Int32Array {
		const known = this.outlines[k];
		if (known) return known;
		const { axisX: ax, axisY: ay, hullX, hullY, hullIndex } = this;
		const { vertices } = this.solids[k];
		for (let o = 0, c = 0; o < vertices.length; o += 3, c++) {
			hullX[c] = vertices[o] * ax[0] + vertices[o + 1] * ax[1];
			hullY[c] = vertices[o] * ay[0] + vertices[o + 1] * ay[1] + vertices[o + 2] * ay[2];
		}
		const outline = hullIndex.slice(0, hullOrder(hullX, hullY, vertices.length / 3, hullIndex));
		this.outlines[k] = outline;
		return outline;
	}
}
