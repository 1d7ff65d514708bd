/**
 * Area of the union of axis-aligned rectangles, exact. Made for few rectangles and many calls: the list keeps its
 * memory, rectangles that lie inside another are dropped, and one or two need no sorting.
 */
export class RectUnion {
	private rects = new Float64Array(64);
	private cuts = new Float64Array(32);
	private count = 0;

	private readonly one = new Float64Array(4);

	/** Rectangles kept: none lies inside another. */
	get size(): number {
		return this.count;
	}

	clear(): void {
		this.count = 0;
	}

	/** Rectangle k as x0, x1, y0, y1; good until the next call. */
	at(k: number): Float64Array {
		for (let c = 0; c < 4; c++) this.one[c] = this.rects[4 * k + c];
		return this.one;
	}

	/** Adds [x0, x1] x [y0, y1]; an empty one is passed over. */
	add(x0: number, x1: number, y0: number, y1: number): void {
		if (x1 <= x0 || y1 <= y0) return;
		const r = this.rects;
		for (let k = 0; k < this.count;) {
			const o = k * 4;
			if (r[o] <= x0 && r[o + 1] >= x1 && r[o + 2] <= y0 && r[o + 3] >= y1) return;
			if (x0 <= r[o] && x1 >= r[o + 1] && y0 <= r[o + 2] && y1 >= r[o + 3]) {
				this.count--;
				r.copyWithin(o, this.count * 4, this.count * 4 + 4);
			} else k++;
		}
		const o = this.count * 4;
		if (o + 4 > r.length) {
			const larger = new Float64Array(r.length * 2);
			larger.set(r);
			this.rects = larger;
		}
		this.rects[o] = x0;
		this.rects[o + 1] = x1;
		this.rects[o + 2] = y0;
		this.rects[o + 3] = y1;
		this.count++;
	}

	area(): number {
		const r = this.rects;
		const n = this.count;
		if (n === 0) return 0;
		const first = (r[1] - r[0]) * (r[3] - r[2]);
		if (n === 1) return first;
		if (n === 2) {
			const w = Math.min(r[1], r[5]) - Math.max(r[0], r[4]);
			const h = Math.min(r[3], r[7]) - Math.max(r[2], r[6]);
			return first + (r[5] - r[4]) * (r[7] - r[6]) - (w > 0 && h > 0 ? w * h : 0);
		}
		return this.sweep();
	}

	/** Strips between all left and right sides; in each the union of intervals up and down. */
	private sweep(): number {
		const r = this.rects;
		const n = this.count;
		// By lower side, so that a strip's intervals come in order.
		for (let i = 1; i < n; i++) {
			for (let k = i; k > 0 && r[k * 4 + 2] < r[k * 4 - 2]; k--) {
				for (let c = 0; c < 4; c++) {
					const keep = r[k * 4 + c];
					r[k * 4 + c] = r[k * 4 - 4 + c];
					r[k * 4 - 4 + c] = keep;
				}
			}
		}
		if (this.cuts.length < 2 * n) this.cuts = new Float64Array(4 * n);
		const cuts = this.cuts;
		for (let k = 0; k < 2 * n; k++) {
			// Left and right sides, kept in order: few enough for insertion, and nothing is allocated.
			const x = r[(k >> 1) * 4 + (k & 1)];
			let at = k;
			for (; at > 0 && cuts[at - 1] > x; at--) cuts[at] = cuts[at - 1];
			cuts[at] = x;
		}
		let area = 0;
		for (let c = 0; c + 1 < 2 * n; c++) {
			const left = cuts[c];
			const right = cuts[c + 1];
			if (right <= left) continue;
			let covered = 0;
			let top = -Infinity;
			for (let k = 0; k < n; k++) {
				const o = k * 4;
				if (r[o] > left || r[o + 1] < right) continue;
				if (r[o + 3] <= top) continue;
				covered += r[o + 3] - Math.max(r[o + 2], top);
				top = r[o + 3];
			}
			area += covered * (right - left);
		}
		return area;
	}
}
