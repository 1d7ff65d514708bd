/**
 * The range around a computed loss: 20 % of itself and 0.2 points either way, unless heights were measured. Common practice,
 * no source: a rule of thumb for obstacles, skyline and ground known from ordinary surveys, not a statistical bound.
 * Shares 0..1 in and out.
 */
export function lossRange(loss: number): { low: number; high: number } {
	const half = 0.2 * loss + 0.002;
	return { low: Math.max(0, loss - half), high: Math.min(1, loss + half) };
}
