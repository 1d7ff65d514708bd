/** Neighbourhoods of one sector that have been summed, found again by two keys of 32 bits each. */
export class KnownNeighbourhoods {
	key1 = 0;
	key2 = 0;
	/** Whether the last `find` made a new place. */
	isNew = false;
	/** Sums of each, `width` numbers. */
	found = new Float64Array(1024);
	private heads = new Int32Array(16);
	private keys = new Int32Array(32);
	private count = 0;
	private width = 0;

	begin(most: number, width: number): void {
		let size = 16;
		while (size < 2 * most) size *= 2;
		if (this.heads.length < size) {
			this.heads = new Int32Array(size);
			this.keys = new Int32Array(2 * size);
		}
		this.heads.fill(-1);
		this.count = 0;
		this.width = width;
	}

	/** Where the sums of the neighbourhood with the present keys stand; a new place, set to 0, unless `shared`. */
	find(shared: boolean): number {
		const { heads, keys, key1, key2, width } = this;
		const mask = heads.length - 1;
		let slot = (key1 ^ (key2 >>> 7)) & mask;
		if (shared) {
			while (heads[slot] >= 0) {
				const entry = heads[slot];
				if (keys[2 * entry] === key1 && keys[2 * entry + 1] === key2) {
					this.isNew = false;
					return entry * width;
				}
				slot = (slot + 1) & mask;
			}
			heads[slot] = this.count;
		}
		const entry = this.count++;
		keys[2 * entry] = key1;
		keys[2 * entry + 1] = key2;
		if ((entry + 1) * width > this.found.length) {
			const larger = new Float64Array(2 * (entry + 1) * width);
			larger.set(this.found);
			this.found = larger;
		}
		this.found.fill(0, entry * width, (entry + 1) * width);
		this.isNew = true;
		return entry * width;
	}
}
