import type { RunInput } from '../../src/lib/core';
import type { Bench } from './bench';
import { embreeRays } from './embree-rays';
import { alikeField, unlikeField } from './fields';
import { meshRays } from './mesh-rays';
import { posedScenes } from './posed';
import { everySun } from './suns';
import { polygonUnion } from './union';

/** Rays across a table. */
const MESH_RAYS = [8, 32];
const EMBREE_RAYS = [8, 32, 128];

const SCENES: [field: string, make: (count: number) => RunInput][] = [
	['regular', (count) => alikeField('regular', count)],
	['unlikeSloped', (count) => unlikeField('sloped', count)]
];

/** General libraries on the same scenes: alike poses on the regular field, unlike ones on the slope. */
export async function otherFigures(bench: Bench): Promise<void> {
	const { quick } = bench.options;
	for (const [field, make] of SCENES) {
		for (const count of quick ? [100] : [100, 1000]) {
			const place = `${field}.${count}`;
			const effects = [
				...MESH_RAYS.map((across) => `raysMesh${across}`),
				...EMBREE_RAYS.map((across) => `raysEmbree${across}`),
				'unionPolygons'
			];
			if (!effects.some((effect) => bench.wants(`${effect}.${place}`))) continue;
			// About 40 suns of the year for a hundred tables, 8 for a thousand.
			const posed = posedScenes(make(count), everySun(count > 500 ? 3301 : 659));
			for (const across of quick ? MESH_RAYS.slice(0, 1) : MESH_RAYS) meshRays(bench, posed, place, across);
			await embreeRays(bench, posed, place, quick ? EMBREE_RAYS.slice(0, 2) : EMBREE_RAYS);
			polygonUnion(bench, posed, place);
		}
	}
}
