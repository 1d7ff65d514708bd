import type { TrackerModel } from '../document';
import { moduleGrid } from '../machine/modules';

/**
 * A shadow that reaches less than this into a cell group does not count, metres. The edge of a real shadow is softer than
 * this by far: its half-light is 0.0093 of the distance wide, 11 cm at 12 m.
 */
export const LEAST_REACH_M = 0.001;

/**
 * Counts the cell groups of one table that shadows touch. A group is what one bypass diode spans: a strip along the long
 * side of a module, so the groups of a table are a grid of rectangles. A group that any shadow reaches counts as shaded,
 * under a crown too: exact for convex shadows, because the part of a convex polygon in one row of the grid spans every
 * column between its leftmost and its rightmost point.
 */
export class ProtectedGroups {
	/** Groups of the table (NTB). */
	readonly count: number;
	readonly strings: number;
	/** Shaded groups (NSB) since `clear`. */
	shaded = 0;
	private readonly columns: number;
	private readonly rows: number;
	/** Left and right side of each column of groups, lower and upper of each row; table coordinates, metres. */
	private readonly left: Float64Array;
	private readonly right: Float64Array;
	private readonly low: Float64Array;
	private readonly rowHeight: number;
	private readonly halfHeight: number;
	private readonly columnWidth: number;
	private readonly halfWidth: number;
	private readonly plain: boolean;
	private readonly marks: Int32Array;
	private readonly stringOf: Int32Array;
	private readonly stringMarks: Int32Array;
	private mark = 0;
	/** Ranges [c0, c1, r0, r1] of up to two rectangles, kept unmarked while no third one comes: two need no marks. */
	private readonly held = new Int32Array(8);
	private heldCount = 0;

	constructor(
		model: Pick<
			TrackerModel,
			| 'widthM'
			| 'heightM'
			| 'centreGapM'
			| 'moduleColumns'
			| 'moduleRows'
			| 'moduleOrientation'
			| 'groupsPerModule'
			| 'modulesPerString'
		>
	) {
		const grid = moduleGrid(model);
		const portrait = grid.orientation === 'portrait';
		const across = portrait ? grid.groupsPerModule : 1;
		const along = portrait ? 1 : grid.groupsPerModule;
		this.columns = grid.columns * across;
		this.rows = grid.rows * along;
		this.count = this.columns * this.rows;
		this.halfWidth = model.widthM / 2;
		this.halfHeight = model.heightM / 2;
		this.columnWidth = grid.moduleWidthM / across;
		this.rowHeight = grid.moduleHeightM / along;
		this.plain = !(model.centreGapM > 0);
		const glass = this.columns * this.columnWidth;
		// The clear slot lies in the middle; a middle column that it would cut reaches over it.
		const sideOf = (g: number, isRight: boolean): number => {
			const beyond = g > glass / 2 + 1e-9 || (!isRight && g > glass / 2 - 1e-9);
			return g - this.halfWidth + (beyond ? model.centreGapM : 0);
		};
		const width = this.columnWidth;
		this.left = Float64Array.from({ length: this.columns }, (_, c) => sideOf(c * width, false));
		this.right = Float64Array.from({ length: this.columns }, (_, c) => sideOf((c + 1) * width, true));
		this.low = Float64Array.from({ length: this.rows }, (_, r) => r * this.rowHeight - this.halfHeight);
		this.marks = new Int32Array(this.count);
		this.strings = Math.ceil((grid.columns * grid.rows) / grid.modulesPerString);
		this.stringMarks = new Int32Array(this.strings);
		this.stringOf = Int32Array.from({ length: this.count }, (_, k) => {
			const column = Math.floor((k % this.columns) / across);
			const row = Math.floor(Math.floor(k / this.columns) / along);
			return Math.floor((row * grid.columns + column) / grid.modulesPerString);
		});
	}

	clear(): void {
		this.mark++;
		this.shaded = 0;
		this.heldCount = 0;
	}

	/** A convex shadow in table coordinates with m corners, as `ShadeEngine.shadowsAhead` hands it over. */
	add(shadow: Float64Array, m: number): void {
		if (this.shaded === this.count) return;
		if (m === 4 && isUpright(shadow)) {
			const xa = shadow[0];
			const ya = shadow[1];
			const xc = shadow[4];
			const yc = shadow[5];
			// Opposite corners are the first and the third.
			this.addRect(Math.min(xa, xc), Math.max(xa, xc), Math.min(ya, yc), Math.max(ya, yc));
			return;
		}
		let west = Infinity;
		let east = -Infinity;
		let south = Infinity;
		let north = -Infinity;
		for (let k = 0; k < m; k++) {
			const x = shadow[2 * k];
			const y = shadow[2 * k + 1];
			if (x < west) west = x;
			if (x > east) east = x;
			if (y < south) south = y;
			if (y > north) north = y;
		}
		this.settle();
		const first = this.rowFrom(south);
		const last = this.rowTo(north);
		for (let r = first; r <= last; r++) {
			// Part of the polygon in this row's slab: its extreme points are corners inside or crossings of the two lines.
			const y0 = Math.max(south, this.low[r] + (r === first ? 0 : LEAST_REACH_M));
			const y1 = Math.min(north, this.low[r] + this.rowHeight - (r === last ? 0 : LEAST_REACH_M));
			let x0 = Infinity;
			let x1 = -Infinity;
			for (let k = 0; k < m; k++) {
				const j = k + 1 === m ? 0 : k + 1;
				const ax = shadow[2 * k];
				const ay = shadow[2 * k + 1];
				const bx = shadow[2 * j];
				const by = shadow[2 * j + 1];
				if (ay >= y0 && ay <= y1) {
					if (ax < x0) x0 = ax;
					if (ax > x1) x1 = ax;
				}
				for (let side = 0; side < 2; side++) {
					const y = side === 0 ? y0 : y1;
					if (ay < y === by < y) continue;
					const x = ax + ((bx - ax) * (y - ay)) / (by - ay);
					if (x < x0) x0 = x;
					if (x > x1) x1 = x;
				}
			}
			this.markRange(this.columnFrom(x0), this.columnTo(x1), r, r);
		}
	}

	/** Strings with at least one shaded group, since `clear`. */
	stringsTouched(): number {
		if (this.shaded === 0) return 0;
		if (this.strings === 1) return 1;
		this.settle();
		let touched = 0;
		for (let k = 0; k < this.count; k++) {
			if (this.marks[k] !== this.mark) continue;
			const s = this.stringOf[k];
			if (this.stringMarks[s] === this.mark) continue;
			this.stringMarks[s] = this.mark;
			touched++;
		}
		return touched;
	}

	/** A shadow with sides along the table's own axes, metres from the middle of the glass. */
	addRect(west: number, east: number, south: number, north: number): void {
		const c0 = this.columnFrom(west);
		const c1 = this.columnTo(east);
		const r0 = this.rowFrom(south);
		const r1 = this.rowTo(north);
		if (c0 > c1 || r0 > r1) return;
		const { held } = this;
		if (this.heldCount === 0 && this.shaded > 0) {
			this.markRange(c0, c1, r0, r1);
			return;
		}
		for (let o = 0; o < 4 * this.heldCount; o += 4) {
			if (c0 >= held[o] && c1 <= held[o + 1] && r0 >= held[o + 2] && r1 <= held[o + 3]) return;
		}
		if (this.heldCount === 2) {
			this.settle();
			this.markRange(c0, c1, r0, r1);
			return;
		}
		const o = 4 * this.heldCount++;
		held[o] = c0;
		held[o + 1] = c1;
		held[o + 2] = r0;
		held[o + 3] = r1;
		this.shaded += (c1 - c0 + 1) * (r1 - r0 + 1);
		if (this.heldCount === 1) return;
		const columns = Math.min(held[1], c1) - Math.max(held[0], c0) + 1;
		const rows = Math.min(held[3], r1) - Math.max(held[2], r0) + 1;
		if (columns > 0 && rows > 0) this.shaded -= columns * rows;
	}

	/** Marks what was held. */
	private settle(): void {
		const { held, heldCount } = this;
		if (heldCount === 0) return;
		this.heldCount = 0;
		this.shaded = 0;
		for (let o = 0; o < 4 * heldCount; o += 4) {
			this.markRange(held[o], held[o + 1], held[o + 2], held[o + 3]);
		}
	}

	private markRange(c0: number, c1: number, r0: number, r1: number): void {
		const { marks, mark, columns } = this;
		for (let r = r0; r <= r1; r++) {
			for (let k = r * columns + c0; k <= r * columns + c1; k++) {
				if (marks[k] === mark) continue;
				marks[k] = mark;
				this.shaded++;
			}
		}
	}

	/** First row whose inside lies above y by more than the least reach. */
	private rowFrom(y: number): number {
		return Math.max(0, Math.floor((y + LEAST_REACH_M + this.halfHeight) / this.rowHeight));
	}

	private rowTo(y: number): number {
		return Math.min(this.rows - 1, Math.ceil((y - LEAST_REACH_M + this.halfHeight) / this.rowHeight) - 1);
	}

	private columnFrom(x: number): number {
		if (this.plain) return Math.max(0, Math.floor((x + LEAST_REACH_M + this.halfWidth) / this.columnWidth));
		let c = 0;
		while (c < this.columns && this.right[c] <= x + LEAST_REACH_M) c++;
		return c;
	}

	private columnTo(x: number): number {
		if (this.plain) {
			return Math.min(
				this.columns - 1,
				Math.ceil((x - LEAST_REACH_M + this.halfWidth) / this.columnWidth) - 1
			);
		}
		let c = this.columns - 1;
		while (c >= 0 && this.left[c] >= x - LEAST_REACH_M) c--;
		return c;
	}
}

/** Four corners that make a rectangle along the axes of the table. */
function isUpright(s: Float64Array): boolean {
	const near = 1e-9;
	const level = Math.abs(s[1] - s[3]) < near && Math.abs(s[5] - s[7]) < near;
	if (level) return Math.abs(s[2] - s[4]) < near && Math.abs(s[6] - s[0]) < near;
	return (
		Math.abs(s[0] - s[2]) < near &&
		Math.abs(s[4] - s[6]) < near &&
		Math.abs(s[3] - s[5]) < near &&
		Math.abs(s[7] - s[1]) < near
	);
}
