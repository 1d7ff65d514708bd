let order = new Int32Array(64);

/**
 * Convex hull of n flat points, counter-clockwise, by Andrew's monotone chain: the order of the corners goes to
 * `out`, their number is returned. Points on an edge are left out.
 */
export function hullOrder(xs: Float64Array, ys: Float64Array, n: number, out: Int32Array): number {
	if (n < 3) return 0;
	if (order.length < n) order = new Int32Array(2 * n);
	for (let k = 0; k < n; k++) {
		const x = xs[k];
		const y = ys[k];
		let at = k;
		for (; at > 0; at--) {
			const before = order[at - 1];
			if (xs[before] < x || (xs[before] === x && ys[before] <= y)) break;
			order[at] = before;
		}
		order[at] = k;
	}
	let size = 0;
	for (let pass = 0; pass < 2; pass++) {
		const base = size;
		for (let k = 0; k < n; k++) {
			const p = pass === 0 ? order[k] : order[n - 1 - k];
			while (size >= base + 2) {
				const a = out[size - 2];
				const b = out[size - 1];
				if ((xs[b] - xs[a]) * (ys[p] - ys[a]) - (ys[b] - ys[a]) * (xs[p] - xs[a]) > 0) break;
				size--;
			}
			out[size++] = p;
		}
		// The last point begins the other chain.
		size--;
	}
	return size;
}
