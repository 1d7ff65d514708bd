import { RADIANS_PER_DEGREE } from '../conventions';

/** Tables in the plan, with what they may throw and take. */
export interface ListedTables {
	readonly count: number;
	readonly east: Float64Array;
	readonly north: Float64Array;
	readonly up: Float64Array;
	readonly groupOf: Int32Array;
}

/** How far two tables reach for each other. */
export interface PairReach {
	/** By group: half of how far apart two of them may stand across the light, and along the height, metres. */
	readonly across: Float64Array;
	readonly upright: Float64Array;
	/**
	 * True when `across` and `upright` are the sides of tables square to the light's azimuth; false when both are the
	 * radius of a ball that holds the table in any posture.
	 */
	readonly square: boolean;
}

/** The part of the sky that lists are made for. */
export interface SkySector {
	fromDeg: number;
	toDeg: number;
	/** Sines of the elevations of the lights in it, from the highest down. */
	sines: Float64Array;
	first: number;
	end: number;
}

/** Lights of a sector are put together into so many tiers of height. */
export const TIERS = 16;
/** A strip of plan is never shorter than this in buckets along the light; only speed depends on it. */
const MOST_CELLS_A_TABLE = 4;
/** Cells are looked through so much farther than they need be, metres: sums of coordinates are rounded. */
const EDGE_M = 1e-6;
/** Offsets between tables are rounded to 2^-30 m by adding and taking away 1.5 x 2^22; good up to 2,000 km. */
export const OFFSET_ROUNDER = 1.5 * 2 ** 22;
/** Kept clear of rounding: a bound is raised by this much, sine. */
export const SLACK = 1e-9;
/** Bound of what may stand before a light in the zenith: above every sine. */
export const OVER = 1 + SLACK;

/**
 * Who can shade whom while the light stands in one sector of azimuth: for each table the neighbours that can reach it,
 * those that reach it from the highest lights first. Tables are laid into strips along the light, so that whoever
 * stands before a table lies in a few runs of memory; memory goes with tables x neighbours of one sector and is used
 * again for the next.
 *
 * A neighbour at bearing b, slope angle p and distance d, its outline within a radius r of both together, blocks
 * lights up to elevation p + asin(r / d) and within r of it across the light; nothing else is left out.
 */
export class SectorLists {
	/** Neighbours, table after table, by tier. */
	items = new Int32Array(256);
	/** [table - from][tier]: end in `items` of those that may block a light of that tier. */
	ends = new Int32Array(0);
	/** [table - from]: where its neighbours begin. */
	starts = new Int32Array(0);
	/** [table - from]: sine of the elevation from which on nothing blocks it; 0 when nothing ever does. */
	clearFrom = new Float64Array(0);
	/** Highest of them all. */
	highestClear = 0;
	from = 0;
	to = 0;
	/** Tier of each light of the sector, and the lowest sine of each tier. */
	tierOf = new Uint8Array(0);
	readonly tierSine = new Float64Array(TIERS);

	private cellStart = new Int32Array(2);
	private cellItems = new Int32Array(0);
	private cell = new Int32Array(0);
	private across = new Float64Array(0);
	private along = new Float64Array(0);
	private foundItems = new Int32Array(256);
	private foundTiers = new Uint8Array(256);

	/** Makes the lists of tables `from` to `to` (not itself) for the lights of one sector. */
	build(tables: ListedTables, reach: PairReach, sector: SkySector, from: number, to: number): void {
		this.from = from;
		this.to = to;
		this.setTiers(sector);
		this.highestClear = 0;
		const asked = to - from;
		if (this.starts.length < asked + 1) {
			this.starts = new Int32Array(asked + 1);
			this.ends = new Int32Array(asked * TIERS);
			this.clearFrom = new Float64Array(asked);
		}
		const lowest = this.tierSine[TIERS - 1];
		const grid = this.layOut(tables, reach, sector);
		const { east, north, up, groupOf } = tables;
		const { across, along, cellStart, cellItems, starts, ends, clearFrom, tierSine } = this;
		const half = ((sector.toDeg - sector.fromDeg) / 2) * RADIANS_PER_DEGREE;
		const spread = Math.tan(half);
		// Across the light of one end of the sector, lengths show shortened by this.
		const shrink = Math.cos(half);
		const counts = new Int32Array(TIERS);
		let size = 0;
		for (let i = from; i < to; i++) {
			const g = groupOf[i];
			const qi = across[i];
			const pi = along[i];
			const widest = (reach.across[g] + grid.widest) / shrink;
			const tallest = reach.upright[g] + grid.tallest;
			// (rise + r) / d bounds the sine for what rises ahead, r / d for what does not.
			const rise = Math.max(0, grid.top - up[i]);
			const far =
				EDGE_M + Math.min(grid.alongTo - pi, lowest > 0 ? (rise + tallest) / lowest + widest : Infinity);
			// A neighbour that stands higher may reach over from a little behind.
			const behind = widest + tallest;
			let found = 0;
			let clear = 0;
			counts.fill(0);
			if (far > -behind) {
				const reachAcross = widest + Math.max(0, far) * spread + EDGE_M;
				const s0 = grid.strip(qi - reachAcross);
				const s1 = grid.strip(qi + reachAcross);
				const lastBucket = grid.bucket(pi + far);
				for (let s = s0; s <= s1; s++) {
					const gap = grid.gapTo(s, qi) - widest;
					const begin = gap > 0 ? (spread > 0 ? gap / spread - EDGE_M : Infinity) : -behind;
					if (begin > far) continue;
					const firstCell = s * grid.buckets + grid.bucket(pi + begin);
					const endCell = s * grid.buckets + lastBucket;
					const end = cellStart[endCell + 1];
					for (let c = cellStart[firstCell]; c < end; c++) {
						const j = cellItems[c];
						if (j === i) continue;
						const t = along[j] - pi;
						const q = across[j] - qi;
						const h = groupOf[j];
						const wide = (reach.across[g] + reach.across[h]) / shrink;
						const limit = wide + Math.abs(t) * spread;
						if (q >= limit || -q >= limit || t <= -behind) continue;
						const tall = reach.upright[g] + reach.upright[h];
						const dx = east[j] - east[i] + OFFSET_ROUNDER - OFFSET_ROUNDER;
						const dy = north[j] - north[i] + OFFSET_ROUNDER - OFFSET_ROUNDER;
						const dz = up[j] - up[i] + OFFSET_ROUNDER - OFFSET_ROUNDER;
						const bound = highestSine(dx * dx + dy * dy, dz, tall, reach.square ? wide : 0);
						if (bound <= lowest) continue;
						// From the lowest lights up: most neighbours stand far off.
						let tier = TIERS - 1;
						while (tier > 0 && tierSine[tier - 1] < bound) tier--;
						if (found === this.foundItems.length) this.growFound();
						this.foundItems[found] = j;
						this.foundTiers[found++] = tier;
						counts[tier]++;
						if (bound > clear) clear = bound;
					}
				}
			}
			const row = i - from;
			clearFrom[row] = clear;
			if (clear > this.highestClear) this.highestClear = clear;
			if (size + found > this.items.length) this.growItems(size + found);
			starts[row] = size;
			let at = size;
			for (let t = 0; t < TIERS; t++) {
				at += counts[t];
				ends[row * TIERS + t] = at;
				counts[t] = at - counts[t];
			}
			const { items, foundItems, foundTiers } = this;
			for (let k = 0; k < found; k++) items[counts[foundTiers[k]]++] = foundItems[k];
			size = at;
		}
	}

	/** Tiers hold about equal numbers of lights. */
	private setTiers({ sines, first, end }: SkySector): void {
		const count = end - first;
		if (this.tierOf.length < count) this.tierOf = new Uint8Array(count);
		for (let t = 0; t < TIERS; t++) {
			const last = Math.ceil(((t + 1) * count) / TIERS) - 1;
			this.tierSine[t] = sines[first + Math.max(0, last)];
		}
		let tier = 0;
		for (let k = 0; k < count; k++) {
			while (tier < TIERS - 1 && sines[first + k] < this.tierSine[tier]) tier++;
			this.tierOf[k] = tier;
		}
	}

	/** Sorts all tables into strips along the middle of the sector, and each strip into buckets. */
	private layOut(tables: ListedTables, reach: PairReach, sector: SkySector): StripGrid {
		const { count, east, north, up } = tables;
		if (this.across.length < count) {
			this.across = new Float64Array(count);
			this.along = new Float64Array(count);
			this.cell = new Int32Array(count);
			this.cellItems = new Int32Array(count);
		}
		const middle = ((sector.fromDeg + sector.toDeg) / 2) * RADIANS_PER_DEGREE;
		const sin = Math.sin(middle);
		const cos = Math.cos(middle);
		const { across, along, cell, cellItems } = this;
		const grid = new StripGrid();
		for (let i = 0; i < count; i++) {
			const q = (across[i] = east[i] * cos - north[i] * sin);
			const p = (along[i] = east[i] * sin + north[i] * cos);
			if (q < grid.acrossFrom) grid.acrossFrom = q;
			if (q > grid.acrossTo) grid.acrossTo = q;
			if (p < grid.alongFrom) grid.alongFrom = p;
			if (p > grid.alongTo) grid.alongTo = p;
			if (up[i] > grid.top) grid.top = up[i];
		}
		for (let g = 0; g < reach.across.length; g++) {
			grid.widest = Math.max(grid.widest, reach.across[g]);
			grid.tallest = Math.max(grid.tallest, reach.upright[g]);
		}
		grid.size(count);
		const cells = grid.strips * grid.buckets;
		if (this.cellStart.length < cells + 1) this.cellStart = new Int32Array(cells + 1);
		const { cellStart } = this;
		cellStart.fill(0, 0, cells + 1);
		for (let i = 0; i < count; i++) {
			const c = (cell[i] = grid.strip(across[i]) * grid.buckets + grid.bucket(along[i]));
			cellStart[c]++;
		}
		let sum = 0;
		for (let c = 0; c <= cells; c++) {
			sum += cellStart[c];
			cellStart[c] = sum;
		}
		// Filled from behind, so that each entry ends as the start of its cell.
		for (let i = count - 1; i >= 0; i--) cellItems[--cellStart[cell[i]]] = i;
		return grid;
	}

	private growFound(): void {
		const items = new Int32Array(2 * this.foundItems.length);
		items.set(this.foundItems);
		this.foundItems = items;
		const tiers = new Uint8Array(2 * this.foundTiers.length);
		tiers.set(this.foundTiers);
		this.foundTiers = tiers;
	}

	private growItems(least: number): void {
		const items = new Int32Array(Math.max(least, 2 * this.items.length));
		items.set(this.items);
		this.items = items;
	}
}

/** Strips across the light, buckets along it. */
class StripGrid {
	acrossFrom = Infinity;
	acrossTo = -Infinity;
	alongFrom = Infinity;
	alongTo = -Infinity;
	top = -Infinity;
	widest = 0;
	tallest = 0;
	strips = 1;
	buckets = 1;
	private stripWidth = 1;
	private bucketLength = 1;

	size(count: number): void {
		const most = Math.max(1, MOST_CELLS_A_TABLE * count);
		const wide = Math.max(this.acrossTo - this.acrossFrom, 0);
		const long = Math.max(this.alongTo - this.alongFrom, 0);
		this.stripWidth = Math.max(2 * this.widest, (2 * wide) / most, 1e-6);
		this.strips = Math.floor(wide / this.stripWidth) + 1;
		this.bucketLength = Math.max(2 * this.widest, (long * this.strips) / most, 1e-6);
		this.buckets = Math.floor(long / this.bucketLength) + 1;
	}

	strip(q: number): number {
		const s = Math.floor((q - this.acrossFrom) / this.stripWidth);
		return s < 0 ? 0 : s >= this.strips ? this.strips - 1 : s;
	}

	bucket(p: number): number {
		const b = Math.floor((p - this.alongFrom) / this.bucketLength);
		return b < 0 ? 0 : b >= this.buckets ? this.buckets - 1 : b;
	}

	/** From a line along the light to the nearest edge of a strip; 0 inside it. */
	gapTo(s: number, q: number): number {
		const low = this.acrossFrom + s * this.stripWidth - q;
		const high = q - (this.acrossFrom + (s + 1) * this.stripWidth);
		return low > 0 ? low : high > 0 ? high : 0;
	}
}

/**
 * Sine of the highest light that something can block at a level distance and a rise dz, with a reach r of both
 * together: sin(p + asin(r / d)). With tables square to the light only the way along it counts, which is shorter than
 * the level distance by up to `aside` across it; the shorter way gives the higher light unless the other stands deeper
 * than r.
 */
function highestSine(level2: number, dz: number, r: number, aside: number): number {
	const along2 = dz < -r ? level2 : Math.max(0, level2 - aside * aside);
	const d2 = along2 + dz * dz;
	if (d2 <= r * r) return OVER;
	// sin(p + q) = sin p cos q + cos p sin q with sin p = dz / d, sin q = r / d.
	const beside = Math.sqrt(d2 - r * r);
	if (dz >= beside) return OVER;
	return (dz * beside + Math.sqrt(along2) * r) / d2 + SLACK;
}
