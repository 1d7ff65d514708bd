import { insideCircle, orientation } from './whole-number-tests';

/** Triangles between points: no point lies inside the circle through the corners of a triangle. */
export interface Triangulation {
	/** Three points of each triangle, counter-clockwise. */
	corners: Int32Array;
	/** The triangle across the side opposite to each corner; -1 outside. */
	across: Int32Array;
	/** Sides on the outline as [triangle, corner opposite] pairs. */
	outline: Int32Array;
}

/** Stands for the point at infinity, so that the outside is made of triangles as well. */
const OUTSIDE = -1;

/** Order along a Hilbert curve of 2^10 cells a side: neighbours in the order are neighbours on the ground. */
function hilbertOrder(x: Float64Array, y: Float64Array): Int32Array {
	const count = x.length;
	let west = Infinity;
	let south = Infinity;
	let span = 1;
	for (let i = 0; i < count; i++) {
		west = Math.min(west, x[i]);
		south = Math.min(south, y[i]);
	}
	for (let i = 0; i < count; i++) span = Math.max(span, x[i] - west, y[i] - south);
	const keys = new Float64Array(count);
	for (let i = 0; i < count; i++) {
		let u = Math.floor(((x[i] - west) / span) * 1023);
		let v = Math.floor(((y[i] - south) / span) * 1023);
		let key = 0;
		for (let side = 512; side >= 1; side /= 2) {
			const right = (u & side) > 0 ? 1 : 0;
			const top = (v & side) > 0 ? 1 : 0;
			key += side * side * ((3 * right) ^ top);
			if (top === 0) {
				if (right === 1) {
					u = 1023 - u;
					v = 1023 - v;
				}
				[u, v] = [v, u];
			}
		}
		keys[i] = key;
	}
	return Int32Array.from({ length: count }, (_, i) => i).sort((a, b) => keys[a] - keys[b] || a - b);
}

/** A growing set of triangles; the outside counts as triangles with the corner OUTSIDE. */
class Growing {
	corners: Int32Array;
	across: Int32Array;
	private mark: Int32Array;
	private stamp = 0;
	private free: number[] = [];
	private used = 0;
	private last = 0;
	private readonly cavity: number[] = [];
	/** Rim of the cavity: start, end, triangle beyond. */
	private rim: number[] = [];
	private readonly startsAt: Int32Array;

	constructor(
		private readonly x: Float64Array,
		private readonly y: Float64Array
	) {
		const most = 4 * x.length + 16;
		this.corners = new Int32Array(3 * most);
		this.across = new Int32Array(3 * most);
		this.mark = new Int32Array(most);
		this.startsAt = new Int32Array(x.length + 1);
	}

	private make(a: number, b: number, c: number): number {
		const t = this.free.pop() ?? this.used++;
		this.corners[3 * t] = a;
		this.corners[3 * t + 1] = b;
		this.corners[3 * t + 2] = c;
		this.mark[t] = 0;
		return t;
	}

	private turn(a: number, b: number, p: number): number {
		const { x, y } = this;
		return orientation(x[a], y[a], x[b], y[b], x[p], y[p]);
	}

	/** One triangle, counter-clockwise, and the outside. */
	begin(a: number, b: number, c: number): void {
		const inside = this.make(a, b, c);
		const ring = [a, b, c];
		const out = ring.map((from, k) => this.make(ring[(k + 1) % 3], from, OUTSIDE));
		for (let k = 0; k < 3; k++) {
			// Side k runs from ring[k] to ring[k + 1]; the corner opposite to it is ring[k + 2].
			this.across[3 * inside + ((k + 2) % 3)] = out[k];
			this.across[3 * out[k] + 2] = inside;
			this.across[3 * out[k]] = out[(k + 2) % 3];
			this.across[3 * out[k] + 1] = out[(k + 1) % 3];
		}
		this.last = inside;
	}

	private cornerOutside(t: number): number {
		const { corners } = this;
		return corners[3 * t] === OUTSIDE
			? 0
			: corners[3 * t + 1] === OUTSIDE
				? 1
				: corners[3 * t + 2] === OUTSIDE
					? 2
					: -1;
	}

	/** Whether a point spoils a triangle: it lies in its circle, or beyond (or on) its side of the outline. */
	private spoils(t: number, p: number): boolean {
		const { x, y, corners } = this;
		const far = this.cornerOutside(t);
		if (far < 0) {
			const a = corners[3 * t];
			const b = corners[3 * t + 1];
			const c = corners[3 * t + 2];
			return insideCircle(x[a], y[a], x[b], y[b], x[c], y[c], x[p], y[p]);
		}
		const a = corners[3 * t + ((far + 1) % 3)];
		const b = corners[3 * t + ((far + 2) % 3)];
		const turned = this.turn(a, b, p);
		if (turned !== 0) return turned > 0;
		return (x[p] - x[a]) * (x[p] - x[b]) + (y[p] - y[a]) * (y[p] - y[b]) < 0;
	}

	/** Walks to a triangle that holds the point, or to the outside next to it. */
	private find(p: number): number {
		let t = this.last;
		for (;;) {
			if (this.cornerOutside(t) >= 0) return t;
			let next = -1;
			for (let k = 0; k < 3 && next < 0; k++) {
				const a = this.corners[3 * t + ((k + 1) % 3)];
				const b = this.corners[3 * t + ((k + 2) % 3)];
				if (this.turn(a, b, p) < 0) next = this.across[3 * t + k];
			}
			if (next < 0) return t;
			t = next;
		}
	}

	/** Puts a point in: what it spoils is taken out and the hole joined to it (A. Bowyer, D. Watson 1981). */
	insert(p: number): void {
		const stamp = ++this.stamp;
		const { cavity, corners, across, mark } = this;
		cavity.length = 0;
		this.rim.length = 0;
		const first = this.find(p);
		cavity.push(first);
		mark[first] = stamp;
		for (let i = 0; i < cavity.length; i++) {
			const t = cavity[i];
			for (let k = 0; k < 3; k++) {
				const beyond = across[3 * t + k];
				if (mark[beyond] === stamp) continue;
				if (this.spoils(beyond, p)) {
					mark[beyond] = stamp;
					cavity.push(beyond);
				} else this.rim.push(corners[3 * t + ((k + 1) % 3)], corners[3 * t + ((k + 2) % 3)], beyond);
			}
		}
		const { rim } = this;
		const made: number[] = [];
		// The hole's own triangles are given free only after the rim is joined.
		for (let r = 0; r < rim.length; r += 3) {
			const t = this.make(rim[r], rim[r + 1], p);
			made.push(t);
			this.startsAt[rim[r] + 1] = t;
			const beyond = rim[r + 2];
			across[3 * t + 2] = beyond;
			for (let k = 0; k < 3; k++) {
				const from = corners[3 * beyond + ((k + 1) % 3)];
				if (from === rim[r + 1] && corners[3 * beyond + ((k + 2) % 3)] === rim[r]) across[3 * beyond + k] = t;
			}
		}
		for (const t of made) {
			const next = this.startsAt[corners[3 * t + 1] + 1];
			across[3 * t] = next;
			across[3 * next + 1] = t;
			if (this.cornerOutside(t) < 0) this.last = t;
		}
		for (const t of cavity) {
			corners[3 * t] = -2;
			this.free.push(t);
		}
	}

	result(): Triangulation {
		const index = new Int32Array(this.used).fill(-1);
		let count = 0;
		for (let t = 0; t < this.used; t++) {
			if (this.corners[3 * t] !== -2 && this.cornerOutside(t) < 0) index[t] = count++;
		}
		const corners = new Int32Array(3 * count);
		const across = new Int32Array(3 * count);
		const outline: number[] = [];
		for (let t = 0; t < this.used; t++) {
			if (index[t] < 0) continue;
			for (let k = 0; k < 3; k++) {
				corners[3 * index[t] + k] = this.corners[3 * t + k];
				const beyond = index[this.across[3 * t + k]];
				across[3 * index[t] + k] = beyond;
				if (beyond < 0) outline.push(index[t], k);
			}
		}
		return { corners, across, outline: Int32Array.from(outline) };
	}
}

/**
 * Delaunay triangulation of points with whole-number coordinates within +-2^25, no two of them the same. Points on one line, or fewer than three, have no triangles. Exact tests: cocircular and collinear points are
 * safe, and of several triangulations of cocircular points the same one always comes out. Insertion point by point along
 * a Hilbert curve after A. Bowyer and D. F. Watson (Computer Journal 24, 1981): about n log n on measured ground.
 */
export function delaunay(x: Float64Array, y: Float64Array): Triangulation {
	const order = hilbertOrder(x, y);
	const empty = (): Triangulation => ({
		corners: new Int32Array(0),
		across: new Int32Array(0),
		outline: new Int32Array(0)
	});
	if (order.length < 3) return empty();
	const [a, b] = order;
	let third = 2;
	const turn = (p: number) => orientation(x[a], y[a], x[b], y[b], x[p], y[p]);
	while (third < order.length && turn(order[third]) === 0) third++;
	if (third === order.length) return empty();
	const growing = new Growing(x, y);
	const c = order[third];
	if (turn(c) > 0) growing.begin(a, b, c);
	else growing.begin(b, a, c);
	for (let k = 2; k < order.length; k++) if (k !== third) growing.insert(order[k]);
	return growing.result();
}
