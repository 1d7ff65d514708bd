/**
 * Exact tests of position between points whose coordinates are whole numbers within +-2^25 (millimetres: +-33 km). With
 * them a triangulation cannot go astray on points that lie on one line or one circle.
 */

/** Relative error bound of the in-circle sum in double precision: (10 + 96 eps) eps, J. R. Shewchuk 1997, iccerrboundA. */
const EPSILON = 2 ** -53;
const CIRCLE_BOUND = (10 + 96 * EPSILON) * EPSILON;

/** Twice the signed area of a triangle, positive counter-clockwise. Exact: differences have 26 bits, products 52. */
export function orientation(ax: number, ay: number, bx: number, by: number, cx: number, cy: number): number {
	return (bx - ax) * (cy - ay) - (by - ay) * (cx - ax);
}

/** True when d lies strictly inside the circle through a, b, c (counter-clockwise). Exact. */
export function insideCircle(
	ax: number,
	ay: number,
	bx: number,
	by: number,
	cx: number,
	cy: number,
	dx: number,
	dy: number
): boolean {
	const adx = ax - dx;
	const ady = ay - dy;
	const bdx = bx - dx;
	const bdy = by - dy;
	const cdx = cx - dx;
	const cdy = cy - dy;
	const a2 = adx * adx + ady * ady;
	const b2 = bdx * bdx + bdy * bdy;
	const c2 = cdx * cdx + cdy * cdy;
	const bc = bdx * cdy - bdy * cdx;
	const ca = cdx * ady - cdy * adx;
	const ab = adx * bdy - ady * bdx;
	const sum = a2 * bc + b2 * ca + c2 * ab;
	const size =
		a2 * (Math.abs(bdx * cdy) + Math.abs(bdy * cdx)) +
		b2 * (Math.abs(cdx * ady) + Math.abs(cdy * adx)) +
		c2 * (Math.abs(adx * bdy) + Math.abs(ady * bdx));
	const bound = CIRCLE_BOUND * size;
	if (sum > bound) return true;
	if (sum < -bound) return false;
	// Every factor is a whole number below 2^53, so only the last sum needs more digits.
	return BigInt(a2) * BigInt(bc) + BigInt(b2) * BigInt(ca) + BigInt(c2) * BigInt(ab) > 0n;
}
