import { RectUnion } from './rect-union';

/** Shadows of one table that are kept at once; the store grows when grazing light brings more. */
const FIRST_ROOM = 64;

/**
 * Area that equal or larger rectangles shade on a rectangle standing about 0, when all have parallel sides: each
 * shadow is given by where its middle falls. Since none is smaller than the table, each takes in one of its corners,
 * so shadows at the bottom (and those at the top) make a staircase from the left and one from the right, which are
 * summed from the tallest step down; the sum ends when the whole width is covered. Exact.
 */
export class CornerUnion {
	/** Middles of the shadows, metres from the middle of the table; every one overlaps it. */
	x = new Float64Array(FIRST_ROOM);
	y = new Float64Array(FIRST_ROOM);
	/** Area found by the last `measure`, m². Handed over so: a number given back would be boxed millions of times. */
	readonly found = new Float64Array(1);
	private sortedX = new Float64Array(FIRST_ROOM);
	private sortedY = new Float64Array(FIRST_ROOM);
	private readonly rects = new RectUnion();
	private w = 0;
	private h = 0;
	private sw = 0;
	private sh = 0;

	/** Half sizes of the table and of what shades it: w <= sw, h <= sh. */
	setSizes(w: number, h: number, sw: number, sh: number): void {
		this.w = w;
		this.h = h;
		this.sw = sw;
		this.sh = sh;
	}

	/** Doubles the room in `x` and `y`. */
	grow(): void {
		for (const name of ['x', 'y', 'sortedX', 'sortedY'] as const) {
			const larger = new Float64Array(2 * this[name].length);
			larger.set(this[name]);
			this[name] = larger;
		}
	}

	/** Area of the union of the first `count` shadows, into `found`. */
	measure(count: number): void {
		const { x, y, w, h, sw, sh } = this;
		if (count === 1) {
			const wide = w + sw - Math.abs(x[0]);
			const tall = h + sh - Math.abs(y[0]);
			this.found[0] = (wide < 2 * w ? wide : 2 * w) * (tall < 2 * h ? tall : 2 * h);
			return;
		}
		let bottom = 0;
		for (let k = 0; k < count; k++) if (y[k] <= 0) bottom++;
		this.found[0] = 0;
		if (bottom > 0 && bottom < count) {
			let low = -h;
			let high = h;
			for (let k = 0; k < count; k++) {
				if (y[k] <= 0) {
					if (y[k] + sh > low) low = y[k] + sh;
				} else if (y[k] - sh < high) high = y[k] - sh;
			}
			if (low > high) {
				this.mixed(count);
				return;
			}
		}
		if (bottom > 0) this.staircases(count, true);
		if (bottom < count) this.staircases(count, false);
	}

	/** Adds the shadows that hold the bottom edge, or those that hold the top edge: from the tallest down. */
	private staircases(count: number, atBottom: boolean): void {
		const { x, y, sortedX, sortedY, w, h, sw, sh } = this;
		let size = 0;
		for (let k = 0; k < count; k++) {
			if (y[k] <= 0 !== atBottom) continue;
			const away = Math.abs(y[k]);
			let at = size++;
			for (; at > 0 && sortedY[at - 1] > away; at--) {
				sortedY[at] = sortedY[at - 1];
				sortedX[at] = sortedX[at - 1];
			}
			sortedY[at] = away;
			sortedX[at] = x[k];
		}
		let left = -w;
		let right = w;
		let area = 0;
		for (let k = 0; k < size && left < right; k++) {
			const middle = sortedX[k];
			const tall = h + sh - sortedY[k];
			const from = middle - sw > left ? middle - sw : left;
			const to = middle + sw < right ? middle + sw : right;
			if (to <= from) continue;
			area += (to - from) * (tall < 2 * h ? tall : 2 * h);
			if (middle <= 0) left = to;
			else right = from;
		}
		this.found[0] += area;
	}

	/** Shadows from below and from above that meet. */
	private mixed(count: number): void {
		const { x, y, w, h, sw, sh, rects } = this;
		rects.clear();
		for (let k = 0; k < count; k++) {
			rects.add(
				Math.max(-w, x[k] - sw),
				Math.min(w, x[k] + sw),
				Math.max(-h, y[k] - sh),
				Math.min(h, y[k] + sh)
			);
		}
		this.found[0] = rects.area();
	}
}
