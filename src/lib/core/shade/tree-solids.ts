import type { Vec3 } from '../conventions';
import type { TreeObstacle } from '../document';
import { prismSolid } from './prism-solids';
import { sideLoops, solidFromLoops, type Solid } from './solid';

/** Sides of a trunk or crown; corner k stands at azimuth 360 k / sides. */
const TREE_SIDES = 16;
/** Level rings of a round crown between its poles, 22.5 degrees apart. */
const CROWN_RINGS = 7;
/**
 * Corners of a round crown stand this much outside the ellipsoid, so that outlines of sixteen corners have its area:
 * sqrt(pi / (8 sin 22.5 deg)).
 */
const ROUND_OUT = Math.sqrt(Math.PI / (8 * Math.sin(Math.PI / 8)));
/** The years a tree grows are not carried further than this. */
const MOST_TREE_YEARS = 200;

/** In leaf from 15 April to 31 October north of the equator, half a year apart south of it: common practice, no source. */
export const LEAF_DAYS_NORTH: readonly [from: number, to: number] = [105, 304];
export const LEAF_DAYS_SOUTH: readonly [from: number, to: number] = [288, 121];

/** First and last day of the year in leaf where a tree does not say, by the side of the equator. */
export function commonLeafDays(latitudeDeg: number): readonly [from: number, to: number] {
	return latitudeDeg < 0 ? LEAF_DAYS_SOUTH : LEAF_DAYS_NORTH;
}

/** Height of a tree after some years, metres: grows evenly up to its cap, and never shrinks to it. */
export function treeHeightM(
	tree: Pick<TreeObstacle, 'heightM' | 'growthMPerYear' | 'maxHeightM'>,
	years: number
): number {
	const grown = tree.heightM + tree.growthMPerYear * Math.min(MOST_TREE_YEARS, Math.max(0, years));
	return Math.max(tree.heightM, Math.min(grown, tree.maxHeightM));
}

/** An ellipsoid with an upright axis as one convex body; its outline's area is right to 1 % from any side. */
function roundCrown(
	eastM: number,
	northM: number,
	lowM: number,
	highM: number,
	radiusM: number,
	source: number
): Solid {
	const middle = (lowM + highM) / 2;
	const half = (ROUND_OUT * (highM - lowM)) / 2;
	const corners: Vec3[] = [];
	for (let r = 1; r <= CROWN_RINGS; r++) {
		const latitude = ((r / (CROWN_RINGS + 1)) * 2 - 1) * (Math.PI / 2);
		const radius = ROUND_OUT * radiusM * Math.cos(latitude);
		for (let k = 0; k < TREE_SIDES; k++) {
			const a = (2 * Math.PI * k) / TREE_SIDES;
			corners.push([
				eastM + radius * Math.sin(a),
				northM + radius * Math.cos(a),
				middle + half * Math.sin(latitude)
			]);
		}
	}
	const foot = corners.push([eastM, northM, middle - half]) - 1;
	const tip = corners.push([eastM, northM, middle + half]) - 1;
	const loops: number[][] = [];
	for (let r = 0; r + 1 < CROWN_RINGS; r++) {
		loops.push(...sideLoops(TREE_SIDES, r * TREE_SIDES, (r + 1) * TREE_SIDES));
	}
	const last = (CROWN_RINGS - 1) * TREE_SIDES;
	for (let k = 0; k < TREE_SIDES; k++) {
		const j = (k + 1) % TREE_SIDES;
		loops.push([foot, k, j], [tip, last + k, last + j]);
	}
	return solidFromLoops(corners, loops, 0, source);
}

const share = (value: number): number => Math.min(1, Math.max(0, value));

/**
 * A tree as an opaque upright trunk up to the base of its crown and a crown of its shape: upright with sixteen sides, a
 * cone (base at the crown's foot), or an ellipsoid. Light through a crown is multiplied once by its transmission, however
 * long its way. Only the height grows, the crown's base and radius stay. Parts without size are left out.
 */
export function treeSolids(
	tree: TreeObstacle,
	groundM: number,
	site: { treeYears: number; latitudeDeg: number },
	source: number
): Solid[] {
	const { eastM, northM } = tree;
	const height = treeHeightM(tree, site.treeYears);
	const crownBase = Math.max(0, Math.min(tree.crownBaseM, height));
	const upright = (radiusM: number, topRadiusM: number, fromM: number, toM: number): Solid[] =>
		radiusM > 0 && toM > fromM
			? [
					prismSolid(
						{
							eastM,
							northM,
							baseM: groundM + fromM,
							heightM: toM - fromM,
							bottomRadiusM: radiusM,
							topRadiusM,
							sides: TREE_SIDES
						},
						0,
						source
					)
				]
			: [];
	const radius = tree.crownRadiusM;
	const round = (tree.crownShape ?? 'cylinder') === 'ellipsoid' && radius > 0 && height > crownBase;
	const crowns = round
		? [roundCrown(eastM, northM, groundM + crownBase, groundM + height, radius, source)]
		: upright(radius, tree.crownShape === 'cone' ? 0 : radius, crownBase, height);
	const season =
		tree.leafTransmission === undefined
			? {}
			: {
					leafPasses: share(tree.leafTransmission),
					leafDays: tree.leafDays ?? commonLeafDays(site.latitudeDeg)
				};
	return [
		...upright(tree.trunkRadiusM, tree.trunkRadiusM, 0, crownBase),
		...crowns.map((crown) => ({ ...crown, passes: share(tree.crownTransmission), ...season }))
	];
}
