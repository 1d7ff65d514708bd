/** Shares against a plain ray sampler that shares no code with the core: triangles, Moller and Trumbore 1997. */
import { shadeScene, type SceneObstacle, type SceneTable, type ShadeScene } from '../../core';
import { distances, type Check, type Extent, type Row } from '../check';
import { plainScene } from './random-scenes';
import { randomSource } from './random';

type Vector = [number, number, number];
type Triangle = [Vector, Vector, Vector];
const SEED = 1997;
/** Jittered rays a table, along each side. */
const SIDE = 48;

const minus = (a: Vector, b: Vector): Vector => [a[0] - b[0], a[1] - b[1], a[2] - b[2]];
const dot = (a: Vector, b: Vector): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
const cross = (a: Vector, b: Vector): Vector => [
	a[1] * b[2] - a[2] * b[1],
	a[2] * b[0] - a[0] * b[2],
	a[0] * b[1] - a[1] * b[0]
];
const rad = (degrees: number): number => (degrees * Math.PI) / 180;

/** Moller and Trumbore 1997: whether the ray from p along s meets the triangle ahead of it. */
function meets(p: Vector, s: Vector, [a, b, c]: Triangle): boolean {
	const e1 = minus(b, a);
	const e2 = minus(c, a);
	const h = cross(s, e2);
	const det = dot(e1, h);
	if (Math.abs(det) < 1e-12) return false;
	const t = minus(p, a);
	const u = dot(t, h) / det;
	if (u < 0 || u > 1) return false;
	const q = cross(t, e1);
	const v = dot(s, q) / det;
	return v >= 0 && u + v <= 1 && dot(e2, q) / det > 1e-7;
}

/** A point of a table, a to the right and b up the slope of its front. */
function pointOf(table: SceneTable, a: number, b: number): Vector {
	const [az, tilt] = [rad(table.azimuthDeg), rad(table.tiltDeg)];
	return [
		table.eastM - a * Math.cos(az) - b * Math.sin(az) * Math.cos(tilt),
		table.northM + a * Math.sin(az) - b * Math.cos(az) * Math.cos(tilt),
		table.upM + b * Math.sin(tilt)
	];
}

function tableTriangles(table: SceneTable): Triangle[] {
	const [w, h] = [table.widthM / 2, table.heightM / 2];
	const [p, q, r, s] = [
		pointOf(table, -w, -h),
		pointOf(table, w, -h),
		pointOf(table, w, h),
		pointOf(table, -w, h)
	];
	return [
		[p, q, r],
		[p, r, s]
	];
}

/** Corners of bottom and top, fanned; sides as two triangles each. */
function obstacleTriangles(obstacle: SceneObstacle): Triangle[] {
	const { eastM, northM, baseM, heightM } = obstacle;
	const ring = (scale: 'bottom' | 'top'): Vector[] => {
		const up = scale === 'bottom' ? baseM : baseM + heightM;
		if (obstacle.kind === 'prism') {
			const radius = scale === 'bottom' ? obstacle.bottomRadiusM : obstacle.topRadiusM;
			return Array.from({ length: obstacle.sides }, (_, k) => {
				const turn = (2 * Math.PI * k) / obstacle.sides;
				return [eastM + radius * Math.sin(turn), northM + radius * Math.cos(turn), up];
			});
		}
		const turn = rad(obstacle.turnDeg);
		const [x, y] = [obstacle.sizeXM / 2, obstacle.sizeYM / 2];
		return [
			[-x, -y],
			[x, -y],
			[x, y],
			[-x, y]
		].map(([a, b]) => [
			eastM + a * Math.cos(turn) + b * Math.sin(turn),
			northM - a * Math.sin(turn) + b * Math.cos(turn),
			up
		]);
	};
	const [low, high] = [ring('bottom'), ring('top')];
	const triangles: Triangle[] = [];
	for (let k = 0; k < low.length; k++) {
		const j = (k + 1) % low.length;
		triangles.push([low[0], low[k], low[j]], [high[0], high[k], high[j]]);
		triangles.push([low[k], low[j], high[j]], [low[k], high[j], high[k]]);
	}
	return triangles;
}

/** Shaded share of the first table by rays, one in each of SIDE x SIDE cells. */
function sampledShare(scene: ShadeScene, random: () => number): number {
	const [target, ...others] = scene.tables;
	const [az, el] = [rad(scene.sun.azimuthDeg), rad(scene.sun.elevationDeg)];
	const s: Vector = [Math.sin(az) * Math.cos(el), Math.cos(az) * Math.cos(el), Math.sin(el)];
	const triangles = [...others.flatMap(tableTriangles), ...scene.obstacles.flatMap(obstacleTriangles)];
	let shaded = 0;
	for (let i = 0; i < SIDE; i++) {
		for (let j = 0; j < SIDE; j++) {
			const a = ((i + random()) / SIDE - 0.5) * target.widthM;
			const b = ((j + random()) / SIDE - 0.5) * target.heightM;
			const p = pointOf(target, a, b);
			if (triangles.some((triangle) => meets(p, s, triangle))) shaded++;
		}
	}
	return shaded / (SIDE * SIDE);
}

function* rayRows(extent: Extent): Generator<Row> {
	const random = randomSource(SEED);
	let found = 0;
	// Scenes in which the target is partly shaded: the others agree without any doubt.
	for (let k = 0; found < (extent === 'whole' ? 150 : 20); k++) {
		const scene = plainScene(random);
		const [{ shadedShare }] = shadeScene(scene);
		if (shadedShare <= 0.02 || shadedShare >= 0.98) continue;
		found++;
		yield [`scene ${k}`, shadedShare, sampledShare(scene, random)];
	}
}

/*
 * In a cell that a shadow's edge runs through, one ray errs by up to half a cell in the mean square of 1/6: with some
 * 3 x SIDE such cells the standard error is sqrt(3 SIDE / 6) / SIDE² = 0.0021. Four of them are allowed.
 */
const STANDARD_ERROR = Math.sqrt((3 * SIDE) / 6) / SIDE ** 2;

export const rayChecks: Check[] = [
	{
		id: 'shade-rays',
		effect: 'shade',
		title: 'Partly shaded tables among unlike tables, boxes, prisms and cones',
		against: `${SIDE} x ${SIDE} jittered rays a table; standard error ${STANDARD_ERROR.toFixed(4)} (seed ${SEED})`,
		source: 'Ray and triangle of Moller and Trumbore 1997, written for this check',
		provenance: 'library',
		unit: '',
		tolerance: { worst: 4 * STANDARD_ERROR, mean: STANDARD_ERROR },
		measure: (extent) => distances(rayRows(extent))
	}
];
