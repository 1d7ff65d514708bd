/**
 * Convex hull of n flat points, counter-clockwise, by Andrew's monotone chain: the order of the corners goes to
 * `out`, their number is returned. Points on an edge are left out.
 */
export function hullOrder(xs: Float64Array, ys: Float64Array, n: number, out: Int32Array): number {
	const order = Array.from({ length: n }, (_, k) => k).sort((a, b) => xs[a] - xs[b] || ys[a] - ys[b]);
	let size = 0;
	const turn = (a: number, b: number, c: number): number =>
		(xs[b] - xs[a]) * (ys[c] - ys[a]) - (ys[b] - ys[a]) * (xs[c] - xs[a]);
	const chain = (from: number, to: number, step: number) => {
		const base = size;
		for (let k = from; k !== to; k += step) {
			const p = order[k];
			while (size >= base + 2 && turn(out[size - 2], out[size - 1], p) <= 0) size--;
			out[size++] = p;
		}
		// The last point begins the other chain.
		size--;
	};
	if (n < 3) return 0;
	chain(0, n, 1);
	chain(n - 1, -1, -1);
	return size;
}
