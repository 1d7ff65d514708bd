/** Keeps the part of a polygon with sign x coordinate <= limit; corners left. Sutherland and Hodgman 1974. */
export function clipSide(
	from: Float64Array,
	m: number,
	axis: 0 | 1,
	sign: number,
	limit: number,
	to: Float64Array
): number {
	if (m < 3) return 0;
	let size = 0;
	let px = from[2 * m - 2];
	let py = from[2 * m - 1];
	let pd = limit - sign * (axis === 0 ? px : py);
	for (let k = 0; k < 2 * m; k += 2) {
		const x = from[k];
		const y = from[k + 1];
		const d = limit - sign * (axis === 0 ? x : y);
		if ((d > 0 && pd < 0) || (d < 0 && pd > 0)) {
			const t = pd / (pd - d);
			to[size++] = axis === 0 ? sign * limit : px + (x - px) * t;
			to[size++] = axis === 0 ? py + (y - py) * t : sign * limit;
		}
		if (d >= 0) {
			to[size++] = x;
			to[size++] = y;
		}
		px = x;
		py = y;
		pd = d;
	}
	return size / 2;
}

/** Twice the signed area of n corners from `at` on, about the first, to keep digits. */
export function doubleArea(points: Float64Array, at: number, n: number): number {
	const ox = points[at];
	const oy = points[at + 1];
	let twice = 0;
	for (let k = at + 2; k + 3 < at + 2 * n; k += 2) {
		twice += (points[k] - ox) * (points[k + 3] - oy) - (points[k + 2] - ox) * (points[k + 1] - oy);
	}
	return twice;
}

/** Turns n corners the other way round. */
export function reverse(points: Float64Array, n: number): void {
	for (let a = 0, b = 2 * n - 2; a < b; a += 2, b -= 2) {
		const x = points[a];
		const y = points[a + 1];
		points[a] = points[b];
		points[a + 1] = points[b + 1];
		points[b] = x;
		points[b + 1] = y;
	}
}
