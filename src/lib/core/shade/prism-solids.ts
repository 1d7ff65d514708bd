import { RADIANS_PER_DEGREE, type Vec3 } from '../conventions';
import type { BoxObstacle, MastObstacle, PlanPoint } from '../document';
import { ringSolid, type Solid } from './solid';

/** Plan corners of a box: sizes along east and north before a clockwise turn in degrees about its middle. */
export function boxRing(
	box: Pick<BoxObstacle, 'eastM' | 'northM' | 'sizeXM' | 'sizeYM' | 'turnDeg'>
): PlanPoint[] {
	const t = box.turnDeg * RADIANS_PER_DEGREE;
	const signs: PlanPoint[] = [
		[-1, -1],
		[1, -1],
		[1, 1],
		[-1, 1]
	];
	return signs.map(([a, b]): PlanPoint => {
		const x = (a * box.sizeXM) / 2;
		const y = (b * box.sizeYM) / 2;
		return [box.eastM + x * Math.cos(t) + y * Math.sin(t), box.northM - x * Math.sin(t) + y * Math.cos(t)];
	});
}

export const atHeight = (ring: readonly PlanPoint[], upM: number): Vec3[] =>
	ring.map(([east, north]) => [east, north, upM]);

/** A box: sizes along east and north before a clockwise turn in degrees about its centre; metres. */
export function boxSolid(
	box: Pick<BoxObstacle, 'eastM' | 'northM' | 'sizeXM' | 'sizeYM' | 'heightM' | 'turnDeg'>,
	baseM: number,
	source = 0
): Solid {
	const ring = boxRing(box);
	return ringSolid(atHeight(ring, baseM), atHeight(ring, baseM + box.heightM), 0, source);
}

/** A regular prism or, with unlike radii, a cut cone; corner k at azimuth 360 k / sides from the centre. */
export function prismSolid(
	prism: {
		eastM: number;
		northM: number;
		baseM: number;
		heightM: number;
		bottomRadiusM: number;
		topRadiusM: number;
		sides: number;
	},
	passes = 0,
	source = 0
): Solid {
	const ring = (radius: number, upM: number): Vec3[] =>
		Array.from({ length: prism.sides }, (_, k) => {
			const a = (2 * Math.PI * k) / prism.sides;
			return [prism.eastM + radius * Math.sin(a), prism.northM + radius * Math.cos(a), upM];
		});
	return ringSolid(
		ring(prism.bottomRadiusM, prism.baseM),
		ring(prism.topRadiusM, prism.baseM + prism.heightM),
		passes,
		source
	);
}

/** Sides of a mast. */
const MAST_SIDES = 16;

/** A mast as an upright prism of sixteen sides, corners on its circle (0.6 % narrower than round on average). */
export function mastSolids(mast: MastObstacle, groundM: number, source: number): Solid[] {
	if (!(mast.radiusM > 0) || !(mast.heightM > 0)) return [];
	const { eastM, northM, heightM, radiusM } = mast;
	return [
		prismSolid(
			{
				eastM,
				northM,
				baseM: groundM,
				heightM,
				bottomRadiusM: radiusM,
				topRadiusM: radiusM,
				sides: MAST_SIDES
			},
			0,
			source
		)
	];
}
