/**
 * Points of the sun's view sorted into square-cornered cells, so that whatever may overlap a box is found without
 * asking every point. Cells are as large as the largest outline and never more than a few for each point, so memory
 * goes with the number of points; the cells of a row lie behind one another, so a box asks for three runs.
 */
export class ViewGrid {
	/** Points by cell. */
	order = new Int32Array(0);
	/** Where the points of `order` stand in the view. */
	xs = new Float64Array(0);
	ys = new Float64Array(0);
	/** Middle x, y and half sizes of the box that the next question is about. */
	readonly box = new Float64Array(4);
	/** Runs of `order` that the last question found. */
	readonly from = new Int32Array(64);
	readonly to = new Int32Array(64);
	private starts = new Int32Array(2);
	private cellOf = new Int32Array(0);
	private columns = 0;
	private rows = 0;
	private west = 0;
	private low = 0;
	private perX = 0;
	private perY = 0;
	private reachX = 0;
	private reachY = 0;
	private whole = 0;
	private total = 0;

	private size(count: number): void {
		if (this.order.length >= count && this.order.length > 0) return;
		this.order = new Int32Array(Math.max(1, count));
		this.cellOf = new Int32Array(Math.max(1, count));
		this.xs = new Float64Array(Math.max(1, count));
		this.ys = new Float64Array(Math.max(1, count));
		this.whole = 0;
	}

	/** No cells: every question answers with all points. */
	leave(xs: Float64Array, ys: Float64Array, count: number): void {
		this.size(count);
		this.xs.set(xs);
		this.ys.set(ys);
		this.columns = 0;
		if (this.whole !== count) for (let k = 0; k < count; k++) this.order[k] = k;
		this.whole = count;
	}

	/** Sorts points whose outlines are at most `width` x `height`. */
	build(xs: Float64Array, ys: Float64Array, count: number, width: number, height: number): void {
		if (count < 12) {
			this.leave(xs, ys, count);
			return;
		}
		this.size(count);
		this.total = count;
		this.whole = 0;
		let west = Infinity;
		let east = -Infinity;
		let low = Infinity;
		let high = -Infinity;
		for (let k = 0; k < count; k++) {
			const x = xs[k];
			const y = ys[k];
			if (x < west) west = x;
			if (x > east) east = x;
			if (y < low) low = y;
			if (y > high) high = y;
		}
		const most = Math.max(4, Math.ceil(Math.sqrt(4 * count)));
		const columns = Math.max(1, Math.min(most, Math.floor((east - west) / Math.max(width, 1e-9))));
		const rows = Math.max(1, Math.min(most, Math.floor((high - low) / Math.max(height, 1e-9))));
		this.columns = columns;
		this.rows = rows;
		this.west = west;
		this.low = low;
		this.perX = east > west ? columns / (east - west) : 0;
		this.perY = high > low ? rows / (high - low) : 0;
		this.reachX = width / 2;
		this.reachY = height / 2;
		const cells = columns * rows;
		if (this.starts.length < cells + 1) this.starts = new Int32Array(2 * cells + 1);
		const { starts, order, cellOf } = this;
		starts.fill(0, 0, cells + 1);
		for (let k = 0; k < count; k++) {
			const cell = this.row(ys[k]) * columns + this.column(xs[k]);
			cellOf[k] = cell;
			starts[cell + 1]++;
		}
		for (let c = 0; c < cells; c++) starts[c + 1] += starts[c];
		for (let k = count - 1; k >= 0; k--) {
			// Filled from behind: the counts come back to be the starts, and points keep their order in a cell.
			const at = --starts[cellOf[k] + 1];
			order[at] = k;
			this.xs[at] = xs[k];
			this.ys[at] = ys[k];
		}
		// Each entry c + 1 now holds the start of cell c.
	}

	private column(x: number): number {
		const c = Math.floor((x - this.west) * this.perX);
		return c < 0 ? 0 : c >= this.columns ? this.columns - 1 : c;
	}

	private row(y: number): number {
		const r = Math.floor((y - this.low) * this.perY);
		return r < 0 ? 0 : r >= this.rows ? this.rows - 1 : r;
	}

	/**
	 * Runs of points whose outlines may overlap the box asked for in `box`; returns their number. The box comes in an
	 * array because numbers handed over one by one would be boxed millions of times.
	 */
	ask(): number {
		if (this.columns === 0) {
			this.from[0] = 0;
			this.to[0] = this.whole;
			return 1;
		}
		const box = this.box;
		const left = this.column(box[0] - box[2] - this.reachX);
		const right = this.column(box[0] + box[2] + this.reachX);
		let bottom = this.row(box[1] - box[3] - this.reachY);
		const top = this.row(box[1] + box[3] + this.reachY);
		// A box far larger than the cells would need more runs than are kept: one long run is as safe.
		if (top - bottom >= 63) {
			this.from[0] = 0;
			this.to[0] = this.total;
			return 1;
		}
		const last = this.columns * this.rows - 1;
		let runs = 0;
		for (; bottom <= top; bottom++) {
			const begin = bottom * this.columns + left;
			const end = bottom * this.columns + right;
			const from = this.starts[begin + 1];
			const to = end === last ? this.total : this.starts[end + 2];
			if (to > from) {
				this.from[runs] = from;
				this.to[runs] = to;
				runs++;
			}
		}
		return runs;
	}
}
