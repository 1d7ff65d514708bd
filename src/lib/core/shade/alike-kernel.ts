import type { AimedPose, TableGroup } from './engine';
import { CornerUnion } from './corner-union';
import { TIERS, type ListedTables, type SectorLists } from './sector-lists';
import { sunVector, tableAxes } from '../conventions';

/** Shaders must stand this far up-sun along the target's normal, metres. */
const UP_SUN_M = 1e-7;
/** A table counts as turned away from the sun below this cosine. */
const LEAST_COSINE = 1e-6;

/** Lights of one sector and what is summed over them. */
export interface SectorSuns {
	azimuthDeg: Float64Array;
	elevationDeg: Float64Array;
	sine: Float64Array;
	weight: Float64Array;
	bin: Int32Array;
	first: number;
	end: number;
}

/** Sums by table - from. */
export interface ShadeSums {
	/** [table][bin]: weight x cosine x shaded share. */
	lost: Float64Array;
	bins: number;
	/** Sum of the shaded shares, and steps with any shade, while the front faces the light. */
	share: Float64Array;
	shadedSteps: Float64Array;
}

/** Shares below this are rounding, not shade. */
export const ANY_SHADE = 1e-9;

/**
 * Shade of tables that are all of one kind and one pose at a time: shadows are rectangles along the table's own axes.
 * Goes table by table through the lights of a sector, so that a table's neighbours stay at hand.
 */
export class AlikeKernel {
	/** Numbers of each light in `axes`. */
	static readonly FIELDS = 9;
	/** [light - first][U, V, n]: projections of an offset on the table and ahead of it. */
	axes = new Float64Array(0);
	private facing = new Float64Array(0);
	private near = new Float64Array(3 * 256);
	private readonly union = new CornerUnion();

	/** Turns to the lights of a sector; `poseAt` as a group's. True when every pose keeps to the light's azimuth. */
	setSuns(suns: SectorSuns, poseAt: (azimuthDeg: number, elevationDeg: number) => AimedPose): boolean {
		const count = suns.end - suns.first;
		if (this.facing.length < count) {
			this.axes = new Float64Array(AlikeKernel.FIELDS * count);
			this.facing = new Float64Array(count);
		}
		const { FIELDS } = AlikeKernel;
		const { axes, facing } = this;
		let square = true;
		for (let k = 0; k < count; k++) {
			const azimuth = suns.azimuthDeg[suns.first + k];
			const elevation = suns.elevationDeg[suns.first + k];
			const pose = poseAt(azimuth, elevation);
			if (pose.azimuthDeg !== azimuth) square = false;
			const s = sunVector(azimuth, elevation);
			const { u, v, n } = tableAxes(pose.azimuthDeg, pose.tiltDeg);
			const cosine = n[0] * s[0] + n[1] * s[1] + n[2] * s[2];
			facing[k] = cosine > LEAST_COSINE ? cosine : 0;
			if (facing[k] === 0) continue;
			const us = (u[0] * s[0] + u[1] * s[1] + u[2] * s[2]) / cosine;
			const vs = (v[0] * s[0] + v[1] * s[1] + v[2] * s[2]) / cosine;
			for (let c = 0; c < 3; c++) {
				axes[FIELDS * k + c] = u[c] - us * n[c];
				axes[FIELDS * k + 3 + c] = v[c] - vs * n[c];
				axes[FIELDS * k + 6 + c] = n[c];
			}
		}
		return square;
	}

	/** Cosine of light k (from the sector's first) to the front of every table; 0 when it is not lit. */
	cosine(k: number): number {
		return this.facing[k];
	}

	/**
	 * Adds the shade of table i over the sector's lights that stand at or above the sine `downTo`. Call `setSuns` and
	 * build the lists first.
	 */
	add(
		i: number,
		tables: ListedTables,
		group: TableGroup,
		lists: SectorLists,
		suns: SectorSuns,
		downTo: number,
		sums: ShadeSums
	): void {
		const row = i - lists.from;
		const clearFrom = lists.clearFrom[row];
		if (clearFrom <= downTo) return;
		const { first, end, sine, weight, bin } = suns;
		if (end <= first || clearFrom <= sine[end - 1]) return;
		const begin = lists.starts[row];
		this.gather(i, tables, lists, begin, lists.ends[row * TIERS + TIERS - 1]);
		const { axes, facing, near, union } = this;
		const { tierOf, ends } = lists;
		const { halfWidth: w, halfHeight: h, steelHalfWidth: sw, steelHalfHeight: sh } = group;
		const wide = w + sw;
		const tall = h + sh;
		const area = 4 * w * h;
		union.setSizes(w, h, sw, sh);
		const lostRow = row * sums.bins;
		let shareSum = 0;
		let shadedSteps = 0;
		let k = 0;
		while (sine[first + k] >= clearFrom) k++;
		for (const count = end - first; k < count && sine[first + k] >= downTo; k++) {
			if (facing[k] === 0) continue;
			const o = AlikeKernel.FIELDS * k;
			const ux = axes[o];
			const uy = axes[o + 1];
			const uz = axes[o + 2];
			const vx = axes[o + 3];
			const vy = axes[o + 4];
			const vz = axes[o + 5];
			const last = 3 * (ends[row * TIERS + tierOf[k]] - begin);
			let hits = 0;
			let { x, y } = union;
			for (let c = 0; c < last; c += 3) {
				const dx = near[c];
				const dy = near[c + 1];
				const dz = near[c + 2];
				const sx = ux * dx + uy * dy + uz * dz;
				if (sx >= wide || sx <= -wide) continue;
				const sy = vx * dx + vy * dy + vz * dz;
				if (sy >= tall || sy <= -tall) continue;
				if (axes[o + 6] * dx + axes[o + 7] * dy + axes[o + 8] * dz <= UP_SUN_M) continue;
				if (hits === x.length) {
					union.grow();
					x = union.x;
					y = union.y;
				}
				x[hits] = sx;
				y[hits++] = sy;
			}
			if (hits === 0) continue;
			union.measure(hits);
			const share = union.found[0] < area ? union.found[0] / area : 1;
			if (share <= ANY_SHADE) continue;
			shareSum += share;
			shadedSteps++;
			sums.lost[lostRow + bin[first + k]] += weight[first + k] * facing[k] * share;
		}
		sums.share[row] += shareSum;
		sums.shadedSteps[row] += shadedSteps;
	}

	/** Offsets to the neighbours of a table, side by side. */
	private gather(i: number, tables: ListedTables, lists: SectorLists, begin: number, end: number): void {
		const { east, north, up } = tables;
		const { items } = lists;
		if (this.near.length < 3 * (end - begin)) this.near = new Float64Array(6 * (end - begin));
		const { near } = this;
		for (let k = begin, c = 0; k < end; k++, c += 3) {
			const j = items[k];
			near[c] = east[j] - east[i];
			near[c + 1] = north[j] - north[i];
			near[c + 2] = up[j] - up[i];
		}
	}
}
