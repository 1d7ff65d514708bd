import { BufferAttribute, BufferGeometry, DoubleSide, Ray } from 'three';
import { MeshBVH } from 'three-mesh-bvh';
import type { Bench } from './bench';
import {
	coreTiming,
	Errors,
	LEAST_ASKED_COSINE,
	type PosedScene,
	type PosedTable,
	type posedScenes
} from './posed';

/** Rays start this far off the glass, metres: coordinates of meshes are single precision. */
const OFF_GLASS_M = 1e-3;

/** Steel outlines as triangles: two a table, four when it has a slot. */
function meshOf(tables: readonly PosedTable[]): BufferGeometry {
	const points: number[] = [];
	for (const { centre, u, v, steelHalfWidth: w, steelHalfHeight: h, halfGap } of tables) {
		const parts =
			halfGap > 0
				? [
						[-w, -halfGap],
						[halfGap, w]
					]
				: [[-w, w]];
		for (const [x0, x1] of parts) {
			const corner = (x: number, y: number): number[] =>
				centre.map((value, c) => value + x * u[c] + y * v[c]);
			const [a, b, c, d] = [corner(x0, -h), corner(x1, -h), corner(x1, h), corner(x0, h)];
			points.push(...a, ...b, ...c, ...a, ...c, ...d);
		}
	}
	const geometry = new BufferGeometry();
	geometry.setAttribute('position', new BufferAttribute(new Float32Array(points), 3));
	return geometry;
}

/** Shaded share of one table by rays from the middles of R x R equal cells of each of its glass parts together. */
function shareByRays(
	bvh: MeshBVH,
	table: PosedTable,
	s: readonly number[],
	across: number,
	ray: Ray
): number {
	const { centre, u, v, n, halfWidth, halfHeight, halfGap } = table;
	ray.direction.set(s[0], s[1], s[2]);
	let hits = 0;
	for (let a = 0; a < across; a++) {
		// Even over the glass: the slot is stepped over.
		const along = ((2 * a + 1) / across - 1) * (halfWidth - halfGap);
		const x = along + Math.sign(along) * halfGap;
		for (let b = 0; b < across; b++) {
			const y = ((2 * b + 1) / across - 1) * halfHeight;
			ray.origin.set(
				centre[0] + x * u[0] + y * v[0] + OFF_GLASS_M * n[0],
				centre[1] + x * u[1] + y * v[1] + OFF_GLASS_M * n[1],
				centre[2] + x * u[2] + y * v[2] + OFF_GLASS_M * n[2]
			);
			if (bvh.raycastFirst(ray, DoubleSide) !== null) hits++;
		}
	}
	return hits / (across * across);
}

/** A general ray caster on the same scenes: a tree of triangles built for each sun, R x R rays from each table. */
export function meshRays(
	bench: Bench,
	posed: ReturnType<typeof posedScenes>,
	place: string,
	across: number
): void {
	const stem = `raysMesh${across}.${place}`;
	if (!bench.wants(stem)) return;
	const ray = new Ray();
	const run = (each: (scene: PosedScene, i: number, share: number) => void): void => {
		for (const scene of posed.scenes) {
			const bvh = new MeshBVH(meshOf(scene.tables));
			scene.tables.forEach((table, i) => {
				if (table.cosine > LEAST_ASKED_COSINE) each(scene, i, shareByRays(bvh, table, scene.s, across, ray));
			});
		}
	};
	const errors = new Errors();
	run((scene, i, share) => errors.add(scene.shares[i], share));
	const tableSuns = posed.scenes.length * posed.field.engine.count;
	const timing = bench.time(() => run(() => undefined), { warmMs: 0, repeats: 3, budgetMs: 3000 });
	bench.note(
		`${stem}.tableSunsPerS`,
		(1000 * tableSuns) / timing.processorMs,
		`${across} x ${across} rays a table`
	);
	errors.note(bench, stem);
	bench.note(`${stem}.timesSlower`, timing.processorMs / coreTiming(bench, posed).processorMs);
}
