import type { Ground } from '../document';
import { NEAREST_GROUND_M, type GroundSurface } from './ground-surface';

type Raster = Extract<Ground, { kind: 'raster' }>;

/**
 * Gaps take the mean of their known neighbours (up to eight), ring after ring from the rim of the gap inwards; a raster
 * without any height lies at 0.
 */
export function filledHeights(raster: Raster): Float64Array {
	const { columns, rows } = raster;
	const heights = Float64Array.from({ length: columns * rows }, (_, k) => raster.heightsM[k] ?? Number.NaN);
	let gaps = Array.from(heights, (_, k) => k).filter((k) => Number.isNaN(heights[k]));
	if (gaps.length === heights.length) return heights.fill(0);
	while (gaps.length > 0) {
		const filled: [number, number][] = [];
		const open: number[] = [];
		for (const k of gaps) {
			const column = k % columns;
			const row = (k - column) / columns;
			let sum = 0;
			let known = 0;
			for (let r = Math.max(0, row - 1); r <= Math.min(rows - 1, row + 1); r++) {
				for (let c = Math.max(0, column - 1); c <= Math.min(columns - 1, column + 1); c++) {
					const height = heights[r * columns + c];
					if (Number.isNaN(height)) continue;
					sum += height;
					known++;
				}
			}
			if (known > 0) filled.push([k, sum / known]);
			else open.push(k);
		}
		for (const [k, height] of filled) heights[k] = height;
		gaps = open;
	}
	return heights;
}

/** Ground on a regular grid, bilinear in each cell; beyond the grid the height of its edge is held. */
export class RasterSurface implements GroundSurface {
	readonly extent: readonly [number, number, number, number];
	private readonly heights: Float64Array;
	private readonly highestM: number;
	private readonly columns: number;
	private readonly rows: number;
	private readonly cellM: number;

	constructor(raster: Raster) {
		this.columns = raster.columns;
		this.rows = raster.rows;
		this.cellM = raster.cellM;
		this.heights = filledHeights(raster);
		this.highestM = this.heights.reduce((most, height) => Math.max(most, height), -Infinity);
		this.extent = [
			raster.westM,
			raster.southM,
			raster.westM + (raster.columns - 1) * raster.cellM,
			raster.southM + (raster.rows - 1) * raster.cellM
		];
	}

	/** Cell and place in it, 0..1, of a value along one axis; held at the ends. */
	private place(valueM: number, lowM: number, count: number): [cell: number, into: number] {
		const at = Math.min(count - 1, Math.max(0, (valueM - lowM) / this.cellM));
		const cell = Math.max(0, Math.min(count - 2, Math.floor(at)));
		return [cell, at - cell];
	}

	heightM(eastM: number, northM: number): number {
		const { heights, columns, extent } = this;
		const [column, s] = this.place(eastM, extent[0], columns);
		const [row, t] = this.place(northM, extent[1], this.rows);
		const k = row * columns + column;
		const south = heights[k] + s * (heights[k + 1] - heights[k]);
		const north = heights[k + columns] + s * (heights[k + columns + 1] - heights[k + columns]);
		return south + t * (north - south);
	}

	gradient(eastM: number, northM: number): [number, number] {
		const { heights, columns, extent, cellM } = this;
		const [column, s] = this.place(eastM, extent[0], columns);
		const [row, t] = this.place(northM, extent[1], this.rows);
		const k = row * columns + column;
		const [sw, se, nw, ne] = [heights[k], heights[k + 1], heights[k + columns], heights[k + columns + 1]];
		const withinE = eastM >= extent[0] && eastM <= extent[2];
		const withinN = northM >= extent[1] && northM <= extent[3];
		return [
			withinE ? ((se - sw) * (1 - t) + (ne - nw) * t) / cellM : 0,
			withinN ? ((nw - sw) * (1 - s) + (ne - se) * s) / cellM : 0
		];
	}

	skylineTangent(eastM: number, northM: number, upM: number, towardsE: number, towardsN: number): number {
		const aboveM = this.highestM - upM;
		if (!(aboveM > 0)) return -Infinity;
		const [west, south, east, north] = this.extent;
		const { cellM } = this;
		let from = 0;
		let to = Infinity;
		for (const [at, step, low, high] of [
			[eastM, towardsE, west, east],
			[northM, towardsN, south, north]
		]) {
			if (Math.abs(step) < 1e-12) {
				if (at < low || at > high) return -Infinity;
				continue;
			}
			const a = (low - at) / step;
			const b = (high - at) / step;
			from = Math.max(from, Math.min(a, b));
			to = Math.min(to, Math.max(a, b));
		}
		if (!(to > from)) return -Infinity;
		let highest = -Infinity;
		const above = (d: number) => this.heightM(eastM + d * towardsE, northM + d * towardsN) - upM;
		/** Distance to the next line of the grid beyond d along one axis. */
		const nextLine = (d: number, at: number, step: number, low: number): number => {
			if (Math.abs(step) < 1e-12) return Infinity;
			const cells = (at + d * step - low) / cellM;
			const line = step > 0 ? Math.floor(cells + 1e-9) + 1 : Math.ceil(cells - 1e-9) - 1;
			return (low + line * cellM - at) / step;
		};
		let d = from;
		let start = above(d);
		if (d > NEAREST_GROUND_M) highest = start / d;
		while (d < to) {
			const next = Math.min(to, nextLine(d, eastM, towardsE, west), nextLine(d, northM, towardsN, south));
			if (!(next > d)) break;
			const end = above(next);
			if (next > NEAREST_GROUND_M) highest = Math.max(highest, end / next);
			// In a cell z - up = A + B d + C d^2, so (z - up) / d has its top at d = sqrt(A / C) when A and C are negative.
			const middle = above((d + next) / 2);
			const half = (next - d) / 2;
			const bend = (start - 2 * middle + end) / (2 * half * half);
			const slope = (end - start) / (2 * half) - bend * (d + next);
			const constant = start - slope * d - bend * d * d;
			if (constant < 0 && bend < 0) {
				const top = Math.sqrt(constant / bend);
				if (top > Math.max(d, NEAREST_GROUND_M) && top < next)
					highest = Math.max(highest, constant / top + slope + bend * top);
			}
			// Nothing further off can stand higher in the sky.
			if (highest * next >= aboveM) break;
			d = next;
			start = end;
		}
		return highest;
	}

	mesh(): { points: Float64Array; corners: Int32Array } {
		const { columns, rows, cellM, extent, heights } = this;
		const points = new Float64Array(3 * columns * rows);
		const corners = new Int32Array(6 * (columns - 1) * (rows - 1));
		for (let k = 0; k < columns * rows; k++) {
			const column = k % columns;
			points.set(
				[extent[0] + column * cellM, extent[1] + ((k - column) / columns) * cellM, heights[k]],
				3 * k
			);
		}
		let at = 0;
		for (let row = 0; row + 1 < rows; row++) {
			for (let column = 0; column + 1 < columns; column++) {
				const k = row * columns + column;
				corners.set([k, k + 1, k + columns + 1, k, k + columns + 1, k + columns], at);
				at += 6;
			}
		}
		return { points, corners };
	}
}
