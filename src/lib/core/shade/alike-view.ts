import { CornerUnion } from './corner-union';
import { UP_SUN_M, type TableGroup } from './table-group';
import type { ListedTables } from './sector-lists';

/** Wanted number of tables in three cells side by side, most rows that a table looks through, and most cells for each
 * table: only speed depends on them. */
const TABLES_A_LOOK = 1.5;
const MOST_ROWS_A_LOOK = 32;
const MOST_CELLS_A_TABLE = 4;

/**
 * Shade of many tables of one kind in one pose under one light: all are laid out on the table's plane along the light,
 * where shadows are rectangles with parallel sides, and sorted into cells as wide as a shadow reaches. A table looks
 * through the rows of cells below it (and above it where the ground is not level) from the nearest on, and stops
 * once its whole width is covered: whatever falls farther off lies within what is covered already.
 */
export class AlikeView {
	/** Shadows on the table that `visit` is called for: the first `hits` middles. */
	readonly union = new CornerUnion();
	private x = new Float64Array(0);
	private y = new Float64Array(0);
	private cell = new Int32Array(0);
	private sortedX = new Float64Array(0);
	private sortedY = new Float64Array(0);
	private sortedAhead = new Float64Array(0);
	private order = new Int32Array(0);
	private starts = new Int32Array(2);
	private level: boolean | null = null;

	constructor(
		private readonly tables: ListedTables,
		private readonly group: TableGroup
	) {}

	/**
	 * Shaded shares of tables `from` to `to` (not itself) into `out` at their own places. `axes` from `offset` on: U, V
	 * (offsets to places on the plane, along the light) and the normal. The front must face the light. `visit` hears of each
	 * table with any shade; shadows that fall wholly within others may be missing then.
	 */
	shares(
		axes: Float64Array,
		offset: number,
		out: Float64Array,
		from: number,
		to: number,
		visit?: (i: number, hits: number) => void
	): void {
		const { tables, group, union } = this;
		const { count, east, north, up } = tables;
		const { halfWidth, halfHeight, steelHalfWidth, steelHalfHeight } = group;
		const wide = halfWidth + steelHalfWidth;
		const tall = halfHeight + steelHalfHeight;
		const area = 4 * halfWidth * halfHeight;
		this.size(count);
		this.level ??= up.every((height) => height === up[0]);
		const ux = axes[offset];
		const uy = axes[offset + 1];
		const uz = axes[offset + 2];
		const vx = axes[offset + 3];
		const vy = axes[offset + 4];
		const vz = axes[offset + 5];
		const nx = axes[offset + 6];
		const ny = axes[offset + 7];
		const nz = axes[offset + 8];
		// On level ground, with the level axis square to the light, whoever falls higher stands behind.
		const sides = this.level && Math.abs(nx * ux + ny * uy) < 1e-12 ? 1 : 2;
		const { x, y, cell, sortedX, sortedY, sortedAhead, order } = this;
		let west = Infinity;
		let farEast = -Infinity;
		let low = Infinity;
		let high = -Infinity;
		for (let i = 0; i < count; i++) {
			const px = ux * east[i] + uy * north[i] + uz * up[i];
			const py = vx * east[i] + vy * north[i] + vz * up[i];
			x[i] = px;
			y[i] = py;
			if (px < west) west = px;
			if (px > farEast) farEast = px;
			if (py < low) low = py;
			if (py > high) high = py;
		}
		const most = MOST_CELLS_A_TABLE * count + 4;
		const stripWidth = Math.max(wide, (2 * (farEast - west)) / most);
		const strips = Math.floor((farEast - west) / stripWidth) + 1;
		// Rows of which three cells hold about so many tables, never taller than a shadow reaches.
		const wanted = (TABLES_A_LOOK * (high - low) * strips) / (3 * count);
		const rowHeight = Math.max(
			Math.min(tall, Math.max(wanted, tall / MOST_ROWS_A_LOOK)),
			((high - low) * strips) / most
		);
		const rows = Math.floor((high - low) / rowHeight) + 1;
		const perX = 1 / stripWidth;
		const perY = 1 / rowHeight;
		// An empty strip on each side, so that three neighbours always exist.
		const columns = strips + 2;
		const cells = columns * rows;
		if (this.starts.length < cells + 1) this.starts = new Int32Array(2 * cells + 1);
		const { starts } = this;
		starts.fill(0, 0, cells + 1);
		for (let i = 0; i < count; i++) {
			let c = ((x[i] - west) * perX) | 0;
			if (c >= strips) c = strips - 1;
			let r = ((y[i] - low) * perY) | 0;
			if (r >= rows) r = rows - 1;
			const at = r * columns + c + 1;
			cell[i] = at;
			starts[at]++;
		}
		let sum = 0;
		for (let c = 0; c <= cells; c++) {
			sum += starts[c];
			starts[c] = sum;
		}
		for (let i = count - 1; i >= 0; i--) {
			const at = --starts[cell[i]];
			sortedX[at] = x[i];
			sortedY[at] = y[i];
			sortedAhead[at] = nx * east[i] + ny * north[i] + nz * up[i];
			order[at] = i;
		}
		const reach = Math.ceil(tall * perY);
		union.setSizes(halfWidth, halfHeight, steelHalfWidth, steelHalfHeight);
		for (let r = 0; r < rows; r++) {
			const rowStart = starts[r * columns];
			const rowEnd = starts[(r + 1) * columns];
			for (let p = rowStart; p < rowEnd; p++) {
				const i = order[p];
				if (i < from || i >= to) continue;
				const px = sortedX[p];
				const py = sortedY[p];
				const limit = sortedAhead[p] + UP_SUN_M;
				const c = cell[i] - r * columns;
				let hits = 0;
				for (let side = 0; side < sides; side++) {
					// First what falls at its own height and below, then what falls above.
					const step = side === 0 ? -1 : 1;
					const stop = Math.max(-1, Math.min(rows, r + step * (reach + 1)));
					const least = side === 0 ? -tall : 0;
					const greatest = side === 0 ? 0 : tall;
					let left = -Infinity;
					let right = Infinity;
					for (let row = r; row !== stop; row += step) {
						const end = starts[row * columns + c + 2];
						for (let k = starts[row * columns + c - 1]; k < end; k++) {
							const sy = sortedY[k] - py;
							if (sy <= least || sy > greatest) continue;
							const sx = sortedX[k] - px;
							if (sx >= wide || sx <= -wide) continue;
							if (sortedAhead[k] <= limit) continue;
							if (hits === union.x.length) union.grow();
							union.x[hits] = sx;
							union.y[hits++] = sy;
							if (sx <= 0) {
								if (sx > left) left = sx;
							} else if (sx < right) right = sx;
						}
						if (left + steelHalfWidth >= halfWidth || right - steelHalfWidth <= left + steelHalfWidth) break;
						if (right - steelHalfWidth <= -halfWidth) break;
					}
				}
				if (hits === 0) {
					out[i] = 0;
					continue;
				}
				union.measure(hits);
				const share = union.found[0] / area;
				out[i] = share < 1 ? share : 1;
				if (visit && share > 0) visit(i, hits);
			}
		}
	}

	private size(count: number): void {
		if (this.x.length >= count) return;
		for (const name of ['x', 'y', 'sortedX', 'sortedY', 'sortedAhead'] as const)
			this[name] = new Float64Array(count);
		this.cell = new Int32Array(count);
		this.order = new Int32Array(count);
	}
}
