import { RADIANS_PER_DEGREE } from '../conventions';
import type { BoxObstacle, Obstacle, TreeObstacle } from '../document';

/** A convex body that casts a shadow. */
export interface Solid {
	/** x, y, z of each corner, metres. */
	vertices: Float64Array;
	/** Pairs of corners. */
	edges: Int32Array;
	/** Outward faces (nx, ny, nz, d): inside where n.p <= d. */
	faces: Float64Array;
	/** Share of the beam that passes, 0 opaque; of a tree, bare. */
	passes: number;
	/** The same in leaf, on the days of the year `leafDays` (first and last, 1..366; may run over the year's end). */
	leafPasses?: number;
	leafDays?: readonly [from: number, to: number];
	/** The obstacle it is part of, for naming who shades. */
	source: number;
}

/** Share of the beam that a solid lets through on a day of the year, 1..366. */
export function passesOn(solid: Solid, dayOfYear: number): number {
	const { passes, leafPasses, leafDays } = solid;
	if (leafPasses === undefined || leafDays === undefined) return passes;
	const [from, to] = leafDays;
	const inLeaf = from <= to ? dayOfYear >= from && dayOfYear <= to : dayOfYear >= from || dayOfYear <= to;
	return inLeaf ? leafPasses : passes;
}

/** Sides of a trunk or crown; corner k stands at azimuth 360 k / sides. */
const TREE_SIDES = 16;
/** The years a tree grows are not carried further than this. */
const MOST_TREE_YEARS = 200;

function facesOf(vertices: Float64Array, loops: readonly (readonly number[])[]): Float64Array {
	const middle = [0, 0, 0];
	const count = vertices.length / 3;
	for (let k = 0; k < count; k++) for (let c = 0; c < 3; c++) middle[c] += vertices[3 * k + c] / count;
	const faces: number[] = [];
	for (const loop of loops) {
		const p = (k: number, c: number) => vertices[3 * loop[k] + c];
		// Newell's sum bears corners that coincide, as at the tip of a cone.
		let nx = 0;
		let ny = 0;
		let nz = 0;
		for (let k = 0; k < loop.length; k++) {
			const j = (k + 1) % loop.length;
			nx += (p(k, 1) - p(j, 1)) * (p(k, 2) + p(j, 2) - 2 * middle[2]);
			ny += (p(k, 2) - p(j, 2)) * (p(k, 0) + p(j, 0) - 2 * middle[0]);
			nz += (p(k, 0) - p(j, 0)) * (p(k, 1) + p(j, 1) - 2 * middle[1]);
		}
		const length = Math.hypot(nx, ny, nz);
		if (length < 1e-12) continue;
		nx /= length;
		ny /= length;
		nz /= length;
		let d = nx * p(0, 0) + ny * p(0, 1) + nz * p(0, 2);
		if (nx * middle[0] + ny * middle[1] + nz * middle[2] > d) {
			nx = -nx;
			ny = -ny;
			nz = -nz;
			d = -d;
		}
		faces.push(nx, ny, nz, d);
	}
	return Float64Array.from(faces);
}

/** A body between two rings of equal corner count, bottom first. */
function ringSolid(
	bottom: readonly [number, number][],
	top: readonly [number, number][],
	baseM: number,
	topM: number,
	passes: number,
	source: number
): Solid {
	const n = bottom.length;
	const vertices = new Float64Array(6 * n);
	bottom.forEach(([x, y], k) => vertices.set([x, y, baseM], 3 * k));
	top.forEach(([x, y], k) => vertices.set([x, y, topM], 3 * (n + k)));
	const edges: number[] = [];
	const loops: number[][] = [bottom.map((_, k) => k), top.map((_, k) => n + k)];
	for (let k = 0; k < n; k++) {
		const j = (k + 1) % n;
		edges.push(k, j, n + k, n + j, k, n + k);
		loops.push([k, j, n + j, n + k]);
	}
	return { vertices, edges: Int32Array.from(edges), faces: facesOf(vertices, loops), passes, source };
}

/** A box: sizes along east and north before a clockwise turn in degrees about its centre; metres. */
export function boxSolid(
	box: Pick<BoxObstacle, 'eastM' | 'northM' | 'sizeXM' | 'sizeYM' | 'heightM' | 'turnDeg'>,
	baseM: number,
	source = 0
): Solid {
	const t = box.turnDeg * RADIANS_PER_DEGREE;
	const ring = (
		[
			[-1, -1],
			[1, -1],
			[1, 1],
			[-1, 1]
		] as const
	).map(([a, b]): [number, number] => {
		const x = (a * box.sizeXM) / 2;
		const y = (b * box.sizeYM) / 2;
		return [box.eastM + x * Math.cos(t) + y * Math.sin(t), box.northM - x * Math.sin(t) + y * Math.cos(t)];
	});
	return ringSolid(ring, ring, baseM, baseM + box.heightM, 0, source);
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
	const ring = (radius: number): [number, number][] =>
		Array.from({ length: prism.sides }, (_, k) => {
			const a = (2 * Math.PI * k) / prism.sides;
			return [prism.eastM + radius * Math.sin(a), prism.northM + radius * Math.cos(a)];
		});
	return ringSolid(
		ring(prism.bottomRadiusM),
		ring(prism.topRadiusM),
		prism.baseM,
		prism.baseM + prism.heightM,
		passes,
		source
	);
}

/** Height of a tree after some years, metres: grows evenly up to its cap, and never shrinks to it. */
export function treeHeightM(
	tree: Pick<TreeObstacle, 'heightM' | 'growthMPerYear' | 'maxHeightM'>,
	years: number
): number {
	const grown = tree.heightM + tree.growthMPerYear * Math.min(MOST_TREE_YEARS, Math.max(0, years));
	return Math.max(tree.heightM, Math.min(grown, tree.maxHeightM));
}

/**
 * The bodies of an obstacle standing on ground of height `groundM`. A tree is an opaque upright trunk up to the base
 * of its crown and a sixteen-sided upright crown with its transmission; only its height grows, the crown's base and
 * radius stay. Parts without size are left out.
 */
export function obstacleSolids(
	obstacle: Obstacle,
	groundM: number,
	treeYears: number,
	source: number
): Solid[] {
	if (obstacle.kind === 'box') {
		const flat = !(obstacle.heightM > 0) || !(obstacle.sizeXM > 0) || !(obstacle.sizeYM > 0);
		return flat ? [] : [boxSolid(obstacle, groundM, source)];
	}
	const height = treeHeightM(obstacle, treeYears);
	const crownBase = Math.max(0, Math.min(obstacle.crownBaseM, height));
	const upright = (radiusM: number, fromM: number, toM: number, passes: number): Solid[] =>
		radiusM > 0 && toM > fromM
			? [
					prismSolid(
						{
							eastM: obstacle.eastM,
							northM: obstacle.northM,
							baseM: groundM + fromM,
							heightM: toM - fromM,
							bottomRadiusM: radiusM,
							topRadiusM: radiusM,
							sides: TREE_SIDES
						},
						passes,
						source
					)
				]
			: [];
	return [
		...upright(obstacle.trunkRadiusM, 0, crownBase, 0),
		...upright(obstacle.crownRadiusM, crownBase, height, Math.min(1, Math.max(0, obstacle.crownTransmission)))
	];
}
