import { TIERS } from './sector-lists';

/**
 * Neighbourhoods of one sector that have been summed. A key finds one that may be the same; it is the same only when
 * it has equal offsets in every tier, which is looked up one by one: nothing is taken on trust.
 */
export class KnownNeighbourhoods {
	/** Of the neighbourhood that is asked about: a sum over its offsets. */
	key = 0;
	/** Whether the last `find` made a new place. */
	isNew = false;
	/** Sums of each, `width` numbers. */
	found = new Float64Array(1024);
	private heads = new Int32Array(16);
	private keys = new Int32Array(16);
	/** Where each one's offsets begin, and where its tiers end from there. */
	private begins = new Int32Array(16);
	private ends = new Int32Array(16 * TIERS);
	/** Offsets x, y, z of all, tier by tier. */
	private offsets = new Float64Array(4096);
	/** Each one's table of its offsets, found by their mixes: place in its list + 1, and 0 where nothing stands. */
	private tables = new Int32Array(4096);
	private tableBegins = new Int32Array(16);
	private tableMasks = new Int32Array(16);
	private tablesUsed = 0;
	private used = 0;
	private count = 0;
	private width = 0;

	/** Forgets all; there will be at most `most`, of `width` sums each. */
	begin(most: number, width: number): void {
		let size = 16;
		while (size < 2 * most) size *= 2;
		if (this.heads.length < size) {
			this.heads = new Int32Array(size);
			this.keys = new Int32Array(size);
			this.begins = new Int32Array(size);
			this.tableBegins = new Int32Array(size);
			this.tableMasks = new Int32Array(size);
			this.ends = new Int32Array(size * TIERS);
		}
		this.heads.fill(-1);
		this.count = 0;
		this.used = 0;
		this.tablesUsed = 0;
		this.width = width;
	}

	/**
	 * Where the sums of the neighbourhood with these offsets stand; a new place, set to 0, where there is none or it is
	 * not to be `shared`. `keep` a new one before the next question.
	 */
	find(shared: boolean, near: Float64Array, mixes: Int32Array, tierEnds: Int32Array): number {
		const { heads, keys, key, width } = this;
		const mask = heads.length - 1;
		let slot = (key ^ (key >>> 11)) & mask;
		if (shared) {
			for (; heads[slot] >= 0; slot = (slot + 1) & mask) {
				const entry = heads[slot];
				if (keys[entry] !== key || !this.same(entry, near, mixes, tierEnds)) continue;
				this.isNew = false;
				return entry * width;
			}
			heads[slot] = this.count;
		}
		const entry = this.count++;
		keys[entry] = key;
		if ((entry + 1) * width > this.found.length) {
			const larger = new Float64Array(2 * (entry + 1) * width);
			larger.set(this.found);
			this.found = larger;
		}
		this.found.fill(0, entry * width, (entry + 1) * width);
		this.isNew = true;
		return entry * width;
	}

	/** Keeps the offsets, and their mixes, of the neighbourhood that the last `find` made. */
	keep(near: Float64Array, mixes: Int32Array, tierEnds: Int32Array): void {
		const entry = this.count - 1;
		const count = tierEnds[TIERS - 1];
		let size = 4;
		while (size < 2 * count) size *= 2;
		if (this.used + 3 * count > this.offsets.length) {
			const larger = new Float64Array(2 * (this.used + 3 * count));
			larger.set(this.offsets);
			this.offsets = larger;
		}
		if (this.tablesUsed + size > this.tables.length) {
			const larger = new Int32Array(2 * (this.tablesUsed + size));
			larger.set(this.tables);
			this.tables = larger;
		}
		const { offsets, used, tables, tablesUsed } = this;
		for (let k = 0; k < 3 * count; k++) offsets[used + k] = near[k];
		tables.fill(0, tablesUsed, tablesUsed + size);
		for (let k = 0; k < count; k++) {
			let slot = mixes[k] & (size - 1);
			while (tables[tablesUsed + slot] !== 0) slot = (slot + 1) & (size - 1);
			tables[tablesUsed + slot] = k + 1;
		}
		this.begins[entry] = used;
		this.ends.set(tierEnds, entry * TIERS);
		this.tableBegins[entry] = tablesUsed;
		this.tableMasks[entry] = size - 1;
		this.used += 3 * count;
		this.tablesUsed += size;
	}

	/** Whether a known neighbourhood has as many neighbours in every tier and holds each of these offsets in its tier. */
	private same(entry: number, near: Float64Array, mixes: Int32Array, tierEnds: Int32Array): boolean {
		const { offsets, begins, ends, tables } = this;
		const begin = begins[entry];
		const tableBegin = this.tableBegins[entry];
		const mask = this.tableMasks[entry];
		const first = entry * TIERS;
		let from = 0;
		for (let t = 0; t < TIERS; t++) {
			const to = tierEnds[t];
			if (ends[first + t] !== to) return false;
			for (let k = from; k < to; k++) {
				const x = near[3 * k];
				const y = near[3 * k + 1];
				const z = near[3 * k + 2];
				let slot = mixes[k] & mask;
				for (;;) {
					const place = tables[tableBegin + slot] - 1;
					if (place < 0) return false;
					const at = begin + 3 * place;
					if (offsets[at] === x && offsets[at + 1] === y && offsets[at + 2] === z) {
						if (place < from || place >= to) return false;
						break;
					}
					slot = (slot + 1) & mask;
				}
			}
			from = to;
		}
		return true;
	}
}
