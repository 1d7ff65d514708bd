import { clipSide, doubleArea, reverse } from './clip';
import { RectUnion } from './rect-union';

/** Shadows and pieces below this area are rounding, m². */
const LEAST_AREA_M2 = 1e-13;
/** Corners nearer than this to a cutting line lie on it, metres. */
const ON_LINE_M = 1e-12;
/** Corners of the largest shadow that comes in, and of one that edges have cut. */
const MOST_CORNERS = 512;

/**
 * Area that convex shadows cover of a rectangle of glass. Each shadow is clipped to the glass once; then, from the
 * largest down, each adds what the larger ones before it left of it: |S1 u .. u Sn| = sum |Sk \ (S1 u .. u Sk-1)|. Most
 * shadows touch no other, or lie within a larger one, and are never cut. Exact but for rounding.
 *
 * Shadows with sides along the glass come first by `addRect` and are united among themselves; the others by `add`.
 */
export class ShadowUnion {
	/** Corners x, y of the shadow that comes next, or left, right, bottom, top of the rectangle that does. */
	readonly next = new Float64Array(2 * MOST_CORNERS);
	private w = 0;
	private h = 0;
	private count = 0;
	private rectCount = 0;
	private rectArea = 0;
	private readonly rects = new RectUnion();
	/** Clipped polygons behind one another, counter-clockwise. */
	private corners = new Float64Array(1024);
	private starts = new Int32Array(65);
	/** west, east, low, high of each */
	private boxes = new Float64Array(4 * 64);
	private areas = new Float64Array(64);
	private order = new Int32Array(64);
	private readonly a = new Float64Array(2 * MOST_CORNERS);
	private readonly b = new Float64Array(2 * MOST_CORNERS);
	private readonly side = new Float64Array(MOST_CORNERS);
	private pieces = new Float64Array(4096);
	private pieceSizes = new Int32Array(512);
	private nextPieces = new Float64Array(4096);
	private nextSizes = new Int32Array(512);

	/** Begins with glass of half sizes w, h and no shadow. */
	begin(w: number, h: number): void {
		this.w = w;
		this.h = h;
		this.count = 0;
		this.rectCount = 0;
		this.rectArea = 0;
		this.rects.clear();
	}

	/** Adds the rectangle in `next`; all of them before any other shadow. */
	addRect(): void {
		const { next, w, h, rects } = this;
		rects.add(
			next[0] > -w ? next[0] : -w,
			next[1] < w ? next[1] : w,
			next[2] > -h ? next[2] : -h,
			next[3] < h ? next[3] : h
		);
	}

	/** Closes the rectangles. */
	endRects(): void {
		const { rects, next } = this;
		if (rects.size === 0) return;
		this.rectArea = rects.area();
		for (let k = 0; k < rects.size; k++) {
			const box = rects.at(k);
			next[0] = next[6] = box[0];
			next[2] = next[4] = box[1];
			next[1] = next[3] = box[2];
			next[5] = next[7] = box[3];
			this.keep(next, 4, box[0], box[1], box[2], box[3], (box[1] - box[0]) * (box[3] - box[2]));
			this.order[k] = k;
		}
		this.rectCount = rects.size;
	}

	/** Adds the convex shadow in `next`, m corners either way round. */
	add(m: number): void {
		const { w, h, next } = this;
		let west = Infinity;
		let east = -Infinity;
		let low = Infinity;
		let high = -Infinity;
		for (let k = 0; k < 2 * m; k += 2) {
			const x = next[k];
			const y = next[k + 1];
			if (x < west) west = x;
			if (x > east) east = x;
			if (y < low) low = y;
			if (y > high) high = y;
		}
		if (west >= w || east <= -w || low >= h || high <= -h) return;
		let n = m;
		let from = next;
		if (east > w) {
			n = clipSide(from, n, 0, 1, w, this.a);
			from = this.a;
			east = w;
		}
		if (west < -w) {
			const to = from === this.a ? this.b : this.a;
			n = clipSide(from, n, 0, -1, w, to);
			from = to;
			west = -w;
		}
		if (high > h) {
			const to = from === this.a ? this.b : this.a;
			n = clipSide(from, n, 1, 1, h, to);
			from = to;
			high = h;
		}
		if (low < -h) {
			const to = from === this.a ? this.b : this.a;
			n = clipSide(from, n, 1, -1, h, to);
			from = to;
			low = -h;
		}
		if (n < 3) return;
		const area = doubleArea(from, 0, n) / 2;
		if (Math.abs(area) < LEAST_AREA_M2) return;
		if (area < 0) reverse(from, n);
		const c = this.keep(from, n, west, east, low, high, Math.abs(area));
		// Largest first, behind the rectangles.
		const { order, areas, rectCount } = this;
		let k = c;
		for (; k > rectCount && areas[order[k - 1]] < areas[c]; k--) order[k] = order[k - 1];
		order[k] = c;
	}

	/** Area of the union, m². */
	area(): number {
		const { count, order, areas, boxes, rectCount, w, h } = this;
		let used = rectCount;
		let sum = this.rectArea;
		const whole = 4 * w * h;
		for (let k = rectCount; k < count && whole - sum > LEAST_AREA_M2; k++) {
			const c = order[k];
			const west = boxes[4 * c];
			const east = boxes[4 * c + 1];
			const low = boxes[4 * c + 2];
			const high = boxes[4 * c + 3];
			let pieces = -1;
			for (let q = 0; q < used && pieces !== 0; q++) {
				const o = 4 * order[q];
				if (boxes[o] >= east || boxes[o + 1] <= west || boxes[o + 2] >= high || boxes[o + 3] <= low) continue;
				if (pieces < 0) pieces = this.load(c);
				pieces = this.cut(order[q], pieces);
			}
			if (pieces === 0) continue;
			sum += pieces < 0 ? areas[c] : this.pieceArea(pieces);
			order[used++] = c;
		}
		return sum;
	}

	private keep(
		from: Float64Array,
		n: number,
		west: number,
		east: number,
		low: number,
		high: number,
		area: number
	): number {
		const c = this.count++;
		if (c + 1 >= this.starts.length) this.growShadows();
		const start = c === 0 ? 0 : this.starts[c];
		if (start + 2 * n > this.corners.length) {
			const larger = new Float64Array(2 * this.corners.length + 2 * n);
			larger.set(this.corners);
			this.corners = larger;
		}
		const { corners, boxes } = this;
		for (let k = 0; k < 2 * n; k++) corners[start + k] = from[k];
		this.starts[c] = start;
		this.starts[c + 1] = start + 2 * n;
		boxes[4 * c] = west;
		boxes[4 * c + 1] = east;
		boxes[4 * c + 2] = low;
		boxes[4 * c + 3] = high;
		this.areas[c] = area;
		return c;
	}

	private growShadows(): void {
		const most = 2 * this.areas.length;
		const starts = new Int32Array(most + 1);
		starts.set(this.starts);
		this.starts = starts;
		const order = new Int32Array(most);
		order.set(this.order);
		this.order = order;
		const boxes = new Float64Array(4 * most);
		boxes.set(this.boxes);
		this.boxes = boxes;
		const areas = new Float64Array(most);
		areas.set(this.areas);
		this.areas = areas;
	}

	/** Shadow c as the one piece to be cut. */
	private load(c: number): number {
		const { starts, corners, pieces } = this;
		const from = starts[c];
		const size = starts[c + 1] - from;
		for (let k = 0; k < size; k++) pieces[k] = corners[from + k];
		this.pieceSizes[0] = size / 2;
		return 1;
	}

	private pieceArea(count: number): number {
		let twice = 0;
		let at = 0;
		for (let p = 0; p < count; p++) {
			twice += doubleArea(this.pieces, at, this.pieceSizes[p]);
			at += 2 * this.pieceSizes[p];
		}
		return twice / 2;
	}

	/** Takes shadow o out of the pieces; how many are left. A piece that an edge shows to be apart stays whole. */
	private cut(o: number, count: number): number {
		const { corners, starts, side, pieces, pieceSizes } = this;
		const first = starts[o];
		const end = starts[o + 1];
		let at = 0;
		let out = 0;
		let made = 0;
		for (let p = 0; p < count; p++) {
			const size = pieceSizes[p];
			if (out + 2 * (size + end - first) * (size + 1) > this.nextPieces.length)
				this.growPieces(out, size + end - first);
			if (made + end - first > this.nextSizes.length) this.growSizes();
			const { nextPieces, nextSizes } = this;
			const outBefore = out;
			const madeBefore = made;
			let n = size;
			let inside = pieces;
			let from = at;
			let rest = this.a;
			for (let e = first; e < end; e += 2) {
				const ax = corners[e];
				const ay = corners[e + 1];
				const f = e + 2 === end ? first : e + 2;
				const dx = corners[f] - ax;
				const dy = corners[f + 1] - ay;
				const limit = ON_LINE_M * (Math.abs(dx) + Math.abs(dy));
				let anyOut = false;
				let anyIn = false;
				for (let k = 0; k < n; k++) {
					// Left of the edge is inside the shadow.
					let d = dx * (inside[from + 2 * k + 1] - ay) - dy * (inside[from + 2 * k] - ax);
					if (d > limit) anyIn = true;
					else if (d < -limit) anyOut = true;
					else d = 0;
					side[k] = d;
				}
				if (!anyOut) continue;
				if (!anyIn) {
					made = madeBefore;
					out = outBefore;
					for (let k = 0; k < 2 * size; k++) nextPieces[out + k] = pieces[at + k];
					out += 2 * size;
					nextSizes[made++] = size;
					break;
				}
				const start = out;
				let r = 0;
				for (let k = 0; k < n; k++) {
					const j = k + 1 === n ? 0 : k + 1;
					const x = inside[from + 2 * k];
					const y = inside[from + 2 * k + 1];
					const d = side[k];
					if (d >= 0) {
						rest[r++] = x;
						rest[r++] = y;
					}
					if (d <= 0) {
						nextPieces[out++] = x;
						nextPieces[out++] = y;
					}
					const g = side[j];
					if ((d > 0 && g < 0) || (d < 0 && g > 0)) {
						const t = d / (d - g);
						const cx = x + (inside[from + 2 * j] - x) * t;
						const cy = y + (inside[from + 2 * j + 1] - y) * t;
						rest[r++] = cx;
						rest[r++] = cy;
						nextPieces[out++] = cx;
						nextPieces[out++] = cy;
					}
				}
				if (out - start < 6) out = start;
				else nextSizes[made++] = (out - start) / 2;
				inside = rest;
				from = 0;
				rest = rest === this.a ? this.b : this.a;
				n = r / 2;
				if (n < 3) break;
			}
			at += 2 * size;
		}
		this.pieces = this.nextPieces;
		this.nextPieces = pieces;
		this.pieceSizes = this.nextSizes;
		this.nextSizes = pieceSizes;
		return made;
	}

	/** Room for `more` corners after `used` in both stores. */
	private growPieces(used: number, more: number): void {
		const size = 2 * this.nextPieces.length + 2 * more * more + used;
		const larger = new Float64Array(size);
		larger.set(this.nextPieces);
		this.nextPieces = larger;
	}

	private growSizes(): void {
		const larger = new Int32Array(4 * this.nextSizes.length);
		larger.set(this.nextSizes);
		this.nextSizes = larger;
	}
}
