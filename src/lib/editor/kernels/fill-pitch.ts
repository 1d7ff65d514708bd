/**
 * Least pitches that keep reach circles of one model apart, metres. `apartM` is what two feet must keep: twice the reach.
 * Rounded up to the centimetre, so that the named figure is itself allowed.
 */

const upToCentimetre = (valueM: number): number => Math.ceil(valueM * 100 - 1e-6) / 100;

/** Along the row: neighbours stand one pitch apart. */
export function leastAlongM(apartM: number): number {
	return upToCentimetre(apartM);
}

/**
 * Across the rows, given the pitch along them. Every other row is shifted by `stagger` (0..1) of the pitch along the row, so that
 * its nearest neighbour stands aside by that much or by the rest; rows two apart stand in line again.
 */
export function leastAcrossM(apartM: number, alongM: number, stagger: number): number {
	const asideM = Math.min(stagger, 1 - stagger) * alongM;
	const nextRowM = Math.sqrt(Math.max(0, apartM ** 2 - asideM ** 2));
	return upToCentimetre(Math.max(nextRowM, apartM / 2));
}
