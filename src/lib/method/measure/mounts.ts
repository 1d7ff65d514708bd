import { mountScene, type MountEdge, type MountScene } from '../../core';
import { distances, within, type Check, type Row } from '../check';
import { referenceValues } from './fixtures';

interface MountValues {
	scenes: (MountScene & { name: string; expected: Partial<Record<MountEdge, string>>[] })[];
}
const { scenes } = referenceValues<MountValues>('mount-truth.json');

/** Points that the rays place within 2 mm of a shadow's edge are marked and not compared. */
const ON_EDGE = '?';

function* pointRows(): Generator<Row> {
	for (const scene of scenes) {
		const steps = mountScene(scene);
		for (const [k, expected] of scene.expected.entries()) {
			for (const edge of scene.points.edges) {
				const ours = steps[k]?.[edge] ?? '';
				const marks = expected[edge] ?? '';
				yield [`${scene.name}, step ${k}, ${edge}, points`, ours.length, marks.length];
				for (let p = 0; p < marks.length; p++) {
					if (marks[p] === ON_EDGE) continue;
					yield [`${scene.name}, step ${k}, ${edge}, point ${p}`, Number(ours[p]), Number(marks[p])];
				}
			}
		}
	}
}

export const mountChecks: Check[] = [
	{
		id: 'mount-points',
		effect: 'mounts',
		title: 'Points along the edges of tables, shaded or lit',
		against: 'rays; points within 2 mm of a shadow edge are left out',
		source: 'Embree ray caster',
		provenance: 'library',
		unit: '',
		// A point is shaded or it is not: no disagreement at all.
		tolerance: within(0),
		measure: () => distances(pointRows())
	}
];
