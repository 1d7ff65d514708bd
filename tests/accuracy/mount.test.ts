import { describe, expect, it } from 'vitest';
import { readFileSync } from 'node:fs';
import { mountScene, type MountScene } from '../../src/lib/core';

interface MountChecks {
	scenes: (MountScene & { name: string; expected: Record<string, string>[] })[];
}
const { scenes } = JSON.parse(
	readFileSync(new URL('../fixtures/checks/mount-truth.json', import.meta.url), 'utf8')
) as MountChecks;

describe('shaded points along the edges against rays cast with Embree', () => {
	it('has scenes to compare', () => expect(scenes.length).toBeGreaterThan(2));
	for (const scene of scenes) {
		it(`${scene.name}: no disagreement outside the points within 2 mm of a shadow edge`, () => {
			const steps = mountScene(scene);
			expect(steps.length).toBe(scene.expected.length);
			let compared = 0;
			const wrong: string[] = [];
			scene.expected.forEach((expected, k) => {
				for (const [edge, marks] of Object.entries(expected)) {
					const ours = steps[k][edge as keyof (typeof steps)[number]] ?? '';
					expect(ours.length).toBe(marks.length);
					[...marks].forEach((mark, p) => {
						if (mark === '?') return;
						compared++;
						if (ours[p] !== mark) wrong.push(`step ${k}, ${edge}, point ${p}`);
					});
				}
			});
			expect(wrong).toEqual([]);
			expect(compared).toBeGreaterThan(1000);
		});
	}
});
