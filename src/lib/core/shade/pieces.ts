/** Pieces below this area are dropped, m². */
const LEAST_AREA = 1e-13;
/** Corners nearer than this to a cutting line lie on it, metres. */
const ON_LINE = 1e-12;
/** A convex polygon can grow by one corner a cut; nothing here comes near this. */
const MOST_CORNERS = 512;

interface Store {
	coords: Float64Array;
	starts: Int32Array;
	light: Float64Array;
	count: number;
}

const newStore = (): Store => ({
	coords: new Float64Array(512),
	starts: new Int32Array(65),
	light: new Float64Array(64),
	count: 0
});

/** Signed area of a flat polygon [x0, y0, x1, y1, ..] with m corners; positive when it runs counter-clockwise. */
export function flatArea(points: Float64Array, from: number, corners: number): number {
	let twice = 0;
	const x0 = points[from];
	const y0 = points[from + 1];
	for (let k = 1; k + 1 < corners; k++) {
		const o = from + 2 * k;
		twice += (points[o] - x0) * (points[o + 3] - y0) - (points[o + 2] - x0) * (points[o + 1] - y0);
	}
	return twice / 2;
}

/** Whether a point lies strictly inside a flat convex counter-clockwise polygon with m corners. */
export function insideConvex(points: Float64Array, m: number, x: number, y: number): boolean {
	for (let k = 0, j = m - 1; k < m; j = k++) {
		const dx = points[2 * k] - points[2 * j];
		const dy = points[2 * k + 1] - points[2 * j + 1];
		if (dx * (y - points[2 * j + 1]) - dy * (x - points[2 * j]) <= 0) return false;
	}
	return true;
}

/**
 * The lit part of a table as convex pieces, each with the share of light that it still gets. Shadows are subtracted
 * one after another: a piece that a shadow does not touch stays whole, else it is cut along the shadow's edges, the
 * outsides stay and the inside is dropped or, under a tree's crown, kept with less light. Exact but for rounding.
 */
export class LitPieces {
	private now = newStore();
	private next = newStore();
	private inside = new Float64Array(2 * MOST_CORNERS);
	private rest = new Float64Array(2 * MOST_CORNERS);
	private side = new Float64Array(MOST_CORNERS);

	get count(): number {
		return this.now.count;
	}

	clear(): void {
		this.now.count = 0;
	}

	addRect(x0: number, x1: number, y0: number, y1: number): void {
		if (x1 <= x0 || y1 <= y0) return;
		const r = this.rest;
		r[0] = r[6] = x0;
		r[2] = r[4] = x1;
		r[1] = r[3] = y0;
		r[5] = r[7] = y1;
		this.push(this.now, r, 0, 4, 1);
	}

	/** Light-weighted area of all pieces, m². */
	litArea(): number {
		const { coords, starts, light, count } = this.now;
		let area = 0;
		for (let p = 0; p < count; p++) {
			area += light[p] * flatArea(coords, starts[p], (starts[p + 1] - starts[p]) / 2);
		}
		return area;
	}

	/** Flat polygons of the pieces that get at least this share of the light. */
	polygons(leastLight: number): number[][] {
		const { coords, starts, light, count } = this.now;
		const out: number[][] = [];
		for (let p = 0; p < count; p++) {
			if (light[p] >= leastLight) out.push(Array.from(coords.subarray(starts[p], starts[p + 1])));
		}
		return out;
	}

	/** Takes a convex counter-clockwise shadow with m corners away; `passes` is the share of light inside it. */
	subtract(shadow: Float64Array, m: number, passes: number): void {
		let west = Infinity;
		let east = -Infinity;
		let south = Infinity;
		let north = -Infinity;
		for (let k = 0; k < m; k++) {
			west = Math.min(west, shadow[2 * k]);
			east = Math.max(east, shadow[2 * k]);
			south = Math.min(south, shadow[2 * k + 1]);
			north = Math.max(north, shadow[2 * k + 1]);
		}
		const { now, next } = this;
		next.count = 0;
		for (let p = 0; p < now.count; p++) {
			const from = now.starts[p];
			const corners = (now.starts[p + 1] - from) / 2;
			let pw = Infinity;
			let pe = -Infinity;
			let ps = Infinity;
			let pn = -Infinity;
			for (let k = 0; k < corners; k++) {
				const x = now.coords[from + 2 * k];
				const y = now.coords[from + 2 * k + 1];
				if (x < pw) pw = x;
				if (x > pe) pe = x;
				if (y < ps) ps = y;
				if (y > pn) pn = y;
			}
			const apart = pw >= east || pe <= west || ps >= north || pn <= south;
			if (
				apart ||
				separated(shadow, 0, m, now.coords, from, corners) ||
				separated(now.coords, from, corners, shadow, 0, m)
			) {
				this.push(next, now.coords, from, corners, now.light[p]);
			} else {
				this.cut(shadow, m, passes, from, corners, now.light[p]);
			}
		}
		this.now = next;
		this.next = now;
	}

	private cut(
		shadow: Float64Array,
		m: number,
		passes: number,
		from: number,
		corners: number,
		light: number
	): void {
		const { now, next, side } = this;
		let inside = this.inside;
		let rest = this.rest;
		let n = corners;
		for (let k = 0; k < 2 * corners; k++) inside[k] = now.coords[from + k];
		for (let e = 0; e < m; e++) {
			const ax = shadow[2 * e];
			const ay = shadow[2 * e + 1];
			const f = e + 1 === m ? 0 : e + 1;
			let dx = shadow[2 * f] - ax;
			let dy = shadow[2 * f + 1] - ay;
			const length = Math.hypot(dx, dy);
			if (length < ON_LINE) continue;
			dx /= length;
			dy /= length;
			let anyOut = false;
			let anyIn = false;
			for (let k = 0; k < n; k++) {
				// Left of the edge is inside the shadow.
				let d = dx * (inside[2 * k + 1] - ay) - dy * (inside[2 * k] - ax);
				if (d > ON_LINE) anyIn = true;
				else if (d < -ON_LINE) anyOut = true;
				else d = 0;
				side[k] = d;
			}
			if (!anyOut) continue;
			if (!anyIn) {
				this.keep(next, inside, n, light);
				n = 0;
				break;
			}
			const outside = this.outside;
			let outCount = 0;
			let inCount = 0;
			for (let k = 0; k < n; k++) {
				const j = k + 1 === n ? 0 : k + 1;
				const x = inside[2 * k];
				const y = inside[2 * k + 1];
				const d = side[k];
				if (d >= 0) {
					rest[2 * inCount] = x;
					rest[2 * inCount++ + 1] = y;
				}
				if (d <= 0) {
					outside[2 * outCount] = x;
					outside[2 * outCount++ + 1] = y;
				}
				if ((d > 0 && side[j] < 0) || (d < 0 && side[j] > 0)) {
					const t = d / (d - side[j]);
					const cx = x + (inside[2 * j] - x) * t;
					const cy = y + (inside[2 * j + 1] - y) * t;
					rest[2 * inCount] = cx;
					rest[2 * inCount++ + 1] = cy;
					outside[2 * outCount] = cx;
					outside[2 * outCount++ + 1] = cy;
				}
			}
			this.keep(next, outside, outCount, light);
			const swap = inside;
			inside = rest;
			rest = swap;
			n = inCount;
			if (n < 3) break;
		}
		if (n >= 3 && passes > 0) this.keep(next, inside, n, light * passes);
		this.inside = inside;
		this.rest = rest;
	}

	private outside = new Float64Array(2 * MOST_CORNERS);

	private keep(store: Store, points: Float64Array, corners: number, light: number): void {
		if (corners < 3 || flatArea(points, 0, corners) < LEAST_AREA) return;
		this.push(store, points, 0, corners, light);
	}

	private push(store: Store, points: Float64Array, from: number, corners: number, light: number): void {
		const p = store.count;
		const at = p === 0 ? 0 : store.starts[p];
		if (at + 2 * corners > store.coords.length) {
			const larger = new Float64Array(2 * store.coords.length + 2 * corners);
			larger.set(store.coords);
			store.coords = larger;
		}
		if (p + 2 > store.starts.length) {
			const starts = new Int32Array(2 * store.starts.length);
			starts.set(store.starts);
			store.starts = starts;
			const lights = new Float64Array(2 * store.light.length);
			lights.set(store.light);
			store.light = lights;
		}
		for (let k = 0; k < 2 * corners; k++) store.coords[at + k] = points[from + k];
		store.starts[p] = at;
		store.starts[p + 1] = at + 2 * corners;
		store.light[p] = light;
		store.count++;
	}
}

/** True when an edge of the first convex polygon has the whole second one on its outer side. */
function separated(
	a: Float64Array,
	aFrom: number,
	aCorners: number,
	b: Float64Array,
	bFrom: number,
	bCorners: number
): boolean {
	for (let e = 0; e < aCorners; e++) {
		const o = aFrom + 2 * e;
		const q = e + 1 === aCorners ? aFrom : o + 2;
		const dx = a[q] - a[o];
		const dy = a[q + 1] - a[o + 1];
		const limit = ON_LINE * (Math.abs(dx) + Math.abs(dy));
		let clear = true;
		for (let k = 0; k < bCorners; k++) {
			if (dx * (b[bFrom + 2 * k + 1] - a[o + 1]) - dy * (b[bFrom + 2 * k] - a[o]) > limit) {
				clear = false;
				break;
			}
		}
		if (clear) return true;
	}
	return false;
}
