import type { PlanPoint } from '../document';

/**
 * Points along a straight row from one plan point to another, both in metres. With a pitch: from the start, every
 * `pitchM`, as many as fit (the end is reached when the length is a multiple within a millimetre). With a count:
 * evenly spread, ends included; one point stands at the start.
 */
export function rowPoints(
	from: PlanPoint,
	to: PlanPoint,
	spacing: { pitchM: number } | { count: number }
): PlanPoint[] {
	const dx = to[0] - from[0];
	const dy = to[1] - from[1];
	const length = Math.hypot(dx, dy);
	const at = (distance: number): PlanPoint =>
		length === 0
			? [from[0], from[1]]
			: [from[0] + (dx * distance) / length, from[1] + (dy * distance) / length];
	if ('count' in spacing) {
		const count = Math.max(0, Math.floor(spacing.count));
		return Array.from({ length: count }, (_, k) => at(count === 1 ? 0 : (length * k) / (count - 1)));
	}
	if (!(spacing.pitchM > 0)) return [];
	const steps = Math.floor((length + 0.001) / spacing.pitchM);
	return Array.from({ length: steps + 1 }, (_, k) => at(k * spacing.pitchM));
}
