import type { PlanPoint } from '../core';

/**
 * Leaves out corners that lie within a tolerance of the line between their neighbours (Douglas and Peucker 1973).
 * For drawing and for very long rings only: what is set out keeps every corner.
 * @param ring open ring, metres
 * @param toleranceM greatest distance of a left-out corner from the drawn line
 */
export function simplifyRing(ring: PlanPoint[], toleranceM: number): PlanPoint[] {
	if (ring.length < 8) return ring;
	// The two ends of the cut ring: the first corner and the one furthest from it.
	let far = 0;
	let farDistance = -1;
	ring.forEach((p, i) => {
		const d = Math.hypot(p[0] - ring[0][0], p[1] - ring[0][1]);
		if (d > farDistance) [far, farDistance] = [i, d];
	});
	const closed = [...ring, ring[0]];
	const keep = new Uint8Array(closed.length);
	keep[0] = keep[far] = 1;
	const open: [number, number][] = [
		[0, far],
		[far, closed.length - 1]
	];
	for (let span = open.pop(); span; span = open.pop()) {
		const [a, b] = span;
		const [dx, dy] = [closed[b][0] - closed[a][0], closed[b][1] - closed[a][1]];
		const length = Math.hypot(dx, dy);
		let worst = a;
		let worstM = toleranceM;
		for (let i = a + 1; i < b; i += 1) {
			const [x, y] = [closed[i][0] - closed[a][0], closed[i][1] - closed[a][1]];
			const d = length > 1e-12 ? Math.abs(x * dy - y * dx) / length : Math.hypot(x, y);
			if (d > worstM) [worst, worstM] = [i, d];
		}
		if (worst === a) continue;
		keep[worst] = 1;
		open.push([a, worst], [worst, b]);
	}
	return ring.filter((_, i) => keep[i] === 1);
}
