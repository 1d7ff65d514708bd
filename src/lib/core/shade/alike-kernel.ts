import type { Aim } from '../machine/aim';
import { LEAST_COSINE, UP_SUN_M, type TableGroup } from './table-group';
import { CornerUnion } from './corner-union';
import { KnownNeighbourhoods } from './known-neighbourhoods';
import { OFFSET_ROUNDER, TIERS, type ListedTables, type SectorLists } from './sector-lists';
import { sunVector, tableAxes } from '../conventions';

/** Offsets are whole numbers of 1 / UNITS metres. */
const UNITS = 2 ** 30;

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
 * Goes table by table through the lights of a sector, so that a table's neighbours stay at hand. Tables whose
 * neighbours stand alike, as in every regular field, have the same shade: it is computed once for each such
 * neighbourhood, offsets rounded to 2^-30 m, so that it does not matter which of the tables came first.
 */
export class AlikeKernel {
	/** Numbers of each light in `axes`. */
	static readonly FIELDS = 9;
	/** [light - first][U, V, n]: projections of an offset on the table and ahead of it. */
	axes = new Float64Array(0);
	private facing = new Float64Array(0);
	/** Offsets to the neighbours of one table, side by side. */
	private near = new Float64Array(3 * 256);
	/** A mix of the bits of each offset. */
	private mixes = new Int32Array(256);
	private readonly union = new CornerUnion();
	private readonly known = new KnownNeighbourhoods();
	private readonly ends = new Int32Array(TIERS);
	/** Bins that the sector's lights fall into, and the place of each light's among them. */
	private slotBin = new Int32Array(0);
	private slotOf = new Uint16Array(0);
	private slots = 0;

	/** Turns to the lights of a sector; `aimAt` as a group's. True when every pose keeps to the light's azimuth. */
	setSuns(suns: SectorSuns, aimAt: (azimuthDeg: number, elevationDeg: number) => Aim): boolean {
		const count = suns.end - suns.first;
		if (this.facing.length < count) {
			this.axes = new Float64Array(AlikeKernel.FIELDS * count);
			this.facing = new Float64Array(count);
			this.slotOf = new Uint16Array(count);
		}
		this.setSlots(suns);
		const { FIELDS } = AlikeKernel;
		const { axes, facing } = this;
		let square = true;
		for (let k = 0; k < count; k++) {
			const azimuth = suns.azimuthDeg[suns.first + k];
			const elevation = suns.elevationDeg[suns.first + k];
			const pose = aimAt(azimuth, elevation);
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

	/** Distinct bins of the sector's lights. */
	private setSlots({ bin, first, end }: SectorSuns): void {
		if (this.slotBin.length < end - first) this.slotBin = new Int32Array(end - first);
		const { slotBin, slotOf } = this;
		this.slots = 0;
		for (let k = 0; k < end - first; k++) {
			let slot = 0;
			while (slot < this.slots && slotBin[slot] !== bin[first + k]) slot++;
			if (slot === this.slots) slotBin[this.slots++] = bin[first + k];
			slotOf[k] = slot;
		}
	}

	/** Forgets the neighbourhoods of the last sector; call after the lists are built. */
	begin(lists: SectorLists): void {
		this.known.begin(lists.to - lists.from, this.slots + 2);
	}

	/**
	 * Adds the shade of table i over the sector's lights that stand at or above the sine `downTo`. Call `setSuns`, build
	 * the lists, and `begin` first.
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
		const { first, end, sine } = suns;
		if (end <= first || clearFrom <= sine[end - 1]) return;
		this.gather(i, tables, lists, row);
		const { known, slots, slotBin } = this;
		// An obstacle cuts the lights short: a neighbourhood of its own.
		const shared = downTo <= sine[end - 1];
		const tierEnds = this.tierEnds(lists, row);
		const at = known.find(shared, this.near, this.mixes, tierEnds);
		if (known.isNew) {
			this.sortTiers(tierEnds);
			known.keep(this.near, this.mixes, tierEnds);
			this.sum(at, group, lists, suns, clearFrom, downTo);
		}
		const { found } = known;
		sums.share[row] += found[at];
		sums.shadedSteps[row] += found[at + 1];
		const lostRow = row * sums.bins;
		for (let slot = 0; slot < slots; slot++) sums.lost[lostRow + slotBin[slot]] += found[at + 2 + slot];
	}

	/** Sums one neighbourhood over the sector's lights, into its place among the known ones. */
	private sum(
		at: number,
		group: TableGroup,
		lists: SectorLists,
		suns: SectorSuns,
		clearFrom: number,
		downTo: number
	): void {
		const { axes, facing, near, union, slotOf, ends } = this;
		const { tierOf } = lists;
		const { first, end, sine, weight } = suns;
		const { found } = this.known;
		const { halfWidth: w, halfHeight: h, steelHalfWidth: sw, steelHalfHeight: sh } = group;
		const wide = w + sw;
		const tall = h + sh;
		const area = 4 * w * h;
		union.setSizes(w, h, sw, sh);
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
			const last = 3 * ends[tierOf[k]];
			let hits = 0;
			let firstX = 0;
			let firstY = 0;
			for (let c = 0; c < last; c += 3) {
				const dx = near[c];
				const dy = near[c + 1];
				const dz = near[c + 2];
				const sx = ux * dx + uy * dy + uz * dz;
				if (sx >= wide || sx <= -wide) continue;
				const sy = vx * dx + vy * dy + vz * dz;
				if (sy >= tall || sy <= -tall) continue;
				if (axes[o + 6] * dx + axes[o + 7] * dy + axes[o + 8] * dz <= UP_SUN_M) continue;
				if (hits === 0) {
					firstX = sx;
					firstY = sy;
					hits = 1;
					continue;
				}
				if (hits === 1) {
					union.x[0] = firstX;
					union.y[0] = firstY;
				}
				if (hits === union.x.length) union.grow();
				union.x[hits] = sx;
				union.y[hits++] = sy;
			}
			if (hits === 0) continue;
			let shaded: number;
			if (hits === 1) {
				// Most shaded tables have one shadow: the overlap of two rectangles with parallel sides.
				const across = wide - Math.abs(firstX);
				const upright = tall - Math.abs(firstY);
				shaded = (across < 2 * w ? across : 2 * w) * (upright < 2 * h ? upright : 2 * h);
			} else {
				union.measure(hits);
				shaded = union.found[0];
			}
			const share = shaded < area ? shaded / area : 1;
			if (share <= ANY_SHADE) continue;
			shareSum += share;
			shadedSteps++;
			found[at + 2 + slotOf[k]] += weight[first + k] * facing[k] * share;
		}
		found[at] = shareSum;
		found[at + 1] = shadedSteps;
	}

	/** Offsets to the neighbours of a table, rounded, and the key of the neighbourhood. */
	private gather(i: number, tables: ListedTables, lists: SectorLists, row: number): void {
		const { east, north, up } = tables;
		const { items } = lists;
		const begin = lists.starts[row];
		const end = lists.ends[row * TIERS + TIERS - 1];
		if (this.mixes.length < end - begin) {
			this.near = new Float64Array(6 * (end - begin));
			this.mixes = new Int32Array(2 * (end - begin));
		}
		const { near, mixes, known } = this;
		const ei = east[i];
		const ni = north[i];
		const ui = up[i];
		let key = end - begin;
		for (let k = begin, c = 0; k < end; k++, c += 3) {
			const j = items[k];
			const dx = east[j] - ei + OFFSET_ROUNDER - OFFSET_ROUNDER;
			const dy = north[j] - ni + OFFSET_ROUNDER - OFFSET_ROUNDER;
			const dz = up[j] - ui + OFFSET_ROUNDER - OFFSET_ROUNDER;
			near[c] = dx;
			near[c + 1] = dy;
			near[c + 2] = dz;
			// A key that does not depend on the order; what it finds is compared offset by offset.
			let mix = Math.imul((dx * UNITS) | 0, 0x9e3779b1) ^ Math.imul((dy * UNITS) | 0, 0x85ebca6b);
			mix ^= Math.imul((dz * UNITS) | 0, 0xc2b2ae35);
			mix = Math.imul(mix ^ (mix >>> 15), 0x2c1b3c6d);
			mix ^= mix >>> 13;
			mixes[k - begin] = mix;
			key = (key + mix) | 0;
		}
		known.key = key;
	}

	/** Where each tier of a table's neighbours ends in `near`, in neighbours. */
	private tierEnds(lists: SectorLists, row: number): Int32Array {
		const { ends } = this;
		for (let t = 0; t < TIERS; t++) ends[t] = lists.ends[row * TIERS + t] - lists.starts[row];
		return ends;
	}

	/** Neighbours of one tier in the order of their offsets, whatever order the field has them in. */
	private sortTiers(ends: Int32Array): void {
		const { near, mixes } = this;
		let from = 0;
		for (let t = 0; t < TIERS; t++) {
			const to = 3 * ends[t];
			for (let k = from + 3; k < to; k += 3) {
				const x = near[k];
				const y = near[k + 1];
				const z = near[k + 2];
				const mix = mixes[k / 3];
				let at = k;
				for (; at > from && comesBefore(x, y, z, near, at - 3); at -= 3) {
					near[at] = near[at - 3];
					near[at + 1] = near[at - 2];
					near[at + 2] = near[at - 1];
					mixes[at / 3] = mixes[at / 3 - 1];
				}
				near[at] = x;
				near[at + 1] = y;
				near[at + 2] = z;
				mixes[at / 3] = mix;
			}
			from = to;
		}
	}
}

/** Whether an offset comes before the one at a place: by east, then north, then up. */
function comesBefore(x: number, y: number, z: number, offsets: Float64Array, at: number): boolean {
	if (x !== offsets[at]) return x < offsets[at];
	if (y !== offsets[at + 1]) return y < offsets[at + 1];
	return z < offsets[at + 2];
}
