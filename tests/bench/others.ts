import type { Bench } from './bench';
import { embreeRays } from './embree-rays';
import { unlikeField } from './fields';
import { meshRays } from './mesh-rays';
import { posedScenes } from './posed';
import { everySun } from './suns';
import { polygonUnion } from './union';

/** Rays across a table. */
const COARSE = 8;
const FINE = 32;

/** General libraries on the same scenes: unlike poses on the sloped field, suns spread over the year. */
export async function otherFigures(bench: Bench): Promise<void> {
	const { quick } = bench.options;
	for (const count of quick ? [100] : [100, 1000]) {
		const place = `sloped.${count}`;
		const asked = [
			`raysMesh${COARSE}`,
			`raysMesh${FINE}`,
			`raysEmbree${COARSE}`,
			`raysEmbree${FINE}`,
			'unionPolygons'
		];
		if (!asked.some((effect) => bench.wants(`${effect}.${place}`))) continue;
		// About 40 suns for a hundred tables, 8 for a thousand.
		const posed = posedScenes(unlikeField('sloped', count), everySun(count > 500 ? 3301 : 659));
		meshRays(bench, posed, place, COARSE);
		if (!quick) meshRays(bench, posed, place, FINE);
		await embreeRays(bench, posed, place, [COARSE, FINE]);
		polygonUnion(bench, posed, place);
	}
}
