/** Shaded shares against exact unions of another library and against closed formulas. */
import { shadeScene, type SceneTable, type ShadeScene } from '../../core';
import { distances, within, type Check, type Row } from '../check';
import { referenceValues } from './fixtures';

interface ShadeValues {
	scenes: (ShadeScene & {
		name: string;
		expected: { shadedShare: number[]; frontLit: boolean[]; hiddenBySkyline: boolean };
	})[];
}
const { scenes } = referenceValues<ShadeValues>('shade-truth.json');

function* sceneRows(): Generator<Row> {
	for (const scene of scenes) {
		for (const [i, table] of shadeScene(scene).entries()) {
			const { expected } = scene;
			const at = `${scene.name}, table ${table.id}`;
			yield [at, table.shadedShare, expected.shadedShare[i]];
			yield [`${at}, front`, Number(table.frontLit), Number(expected.frontLit[i])];
			yield [`${at}, skyline`, Number(table.hiddenBySkyline), Number(expected.hiddenBySkyline)];
		}
	}
}

/** Offset of the neighbour east, north, up; width, height; sun azimuth, elevation; shaded share. */
const PAIRS: readonly (readonly [readonly number[], number, number, number, number, number])[] = [
	[[0, -20, 0], 10, 6, 180, 10, 0.421173],
	[[0, -20, 0], 10, 6, 180, 17.4576, 0],
	[[0, -20, 0], 10, 6, 180, 17.5, 0],
	[[0, -20, 0], 10, 6, 170, 5, 0.465962],
	[[15, 0, 0], 10, 6, 90, 15, 0.352952],
	[[15, 0, 0], 10, 6, 110, 8, 0.327755],
	[[12, -12, 0], 10, 6, 135, 12, 0.411937],
	[[0, -20, 2], 10, 6, 180, 20, 0.173164],
	[[0, -20, -2], 10, 6, 180, 10, 0.092903],
	[[0, 20, 0], 10, 6, 0, 10, 0.421173],
	[[30, 0, 1.5], 12, 5, 95, 3, 0.771762],
	[[14, 0, 0], 10, 6, 90, 0.0001, 0.999996]
];

/** Share of the first of two equal tables; degrees, metres. */
export function pairShare(
	offset: readonly number[],
	widthM: number,
	heightM: number,
	sun: ShadeScene['sun'],
	pose: { azimuthDeg: number; tiltDeg: number }
): number {
	const table = (id: string, at: readonly number[]): SceneTable => ({
		...{ id, eastM: at[0], northM: at[1], upM: at[2] },
		...{ widthM, heightM, ...pose }
	});
	const tables = [table('a', [0, 0, 0]), table('b', offset)];
	return shadeScene({ sun, tables, obstacles: [], skyline: [] })[0].shadedShare;
}

const pairRows = (): Row[] =>
	PAIRS.map(([offset, widthM, heightM, azimuthDeg, elevationDeg, share]) => [
		`neighbour at ${offset.join(', ')} m, sun ${azimuthDeg}, ${elevationDeg}`,
		pairShare(
			offset,
			widthM,
			heightM,
			{ azimuthDeg, elevationDeg },
			{ azimuthDeg, tiltDeg: 90 - elevationDeg }
		),
		share
	]);

export const shadeChecks: Check[] = [
	{
		id: 'shade-scenes',
		effect: 'shade',
		title: 'Scenes of tables, boxes, prisms, cones and skyline',
		against: 'polygon unions in double precision, confirmed by rays (2,000 x 2,000 a table)',
		source: 'Shapely library; Embree ray caster',
		provenance: 'library',
		unit: '',
		tolerance: within(1e-9, 1e-11),
		measure: () => distances(sceneRows())
	},
	{
		id: 'shade-pairs',
		effect: 'shade',
		title: 'Two equal tables square to the sun',
		against: 'overlap of two shifted rectangles, confirmed by 200 x 200 rays',
		source: 'Geometry: u = d·x, v = d·y in the plane square to the sun',
		provenance: 'formula',
		unit: '',
		tolerance: within(1e-5, 1e-6),
		measure: () => distances(pairRows())
	}
];
