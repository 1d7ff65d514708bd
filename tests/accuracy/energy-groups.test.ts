/** Cell groups that shadows touch: counted against clipped areas in random fields. */
import { describe, expect, it, vi } from 'vitest';
import { prepareField, ProtectedGroups, stringEffect, LEAST_REACH_M } from '../../src/lib/core';
import type { Obstacle, Posture, Tracker } from '../../src/lib/core/document';
import { testLayout, testModel, testPlace, testPlot, testTracker } from '../../src/lib/core/test-field';
import { randomSource } from '../../src/lib/method/measure/random';

vi.setConfig({ testTimeout: 60_000 });

type Point = [number, number];

/** Area of a convex polygon inside a rectangle (Sutherland and Hodgman 1974). */
function areaInside(polygon: Point[], x0: number, x1: number, y0: number, y1: number): number {
	let points = polygon;
	for (const [axis, limit, sign] of [
		[0, x0, 1],
		[0, x1, -1],
		[1, y0, 1],
		[1, y1, -1]
	] as const) {
		const kept: Point[] = [];
		points.forEach((p, k) => {
			const q = points[(k + 1) % points.length];
			const a = sign * (p[axis] - limit);
			const b = sign * (q[axis] - limit);
			if (a >= 0) kept.push(p);
			if (a >= 0 !== b >= 0) {
				const t = a / (a - b);
				kept.push([p[0] + (q[0] - p[0]) * t, p[1] + (q[1] - p[1]) * t]);
			}
		});
		points = kept;
		if (points.length === 0) return 0;
	}
	let twice = 0;
	points.forEach((p, k) => {
		const q = points[(k + 1) % points.length];
		twice += p[0] * q[1] - q[0] * p[1];
	});
	return Math.abs(twice) / 2;
}

describe('protected cell groups', () => {
	it('are strips along the long side of each module', () => {
		const groups = (changes: Parameters<typeof testModel>[0]) => new ProtectedGroups(testModel(changes));
		expect(groups({ moduleColumns: 6, moduleRows: 2, moduleOrientation: 'portrait' }).count).toBe(36);
		const rect = (x0: number, x1: number, y0: number, y1: number) =>
			Float64Array.from([x0, y0, x1, y0, x1, y1, x0, y1]);
		// Table 6 x 4 m of 6 x 2 modules: a shadow over the lowest 0.5 m touches all strips of a portrait's lower row ...
		const portrait = groups({ moduleColumns: 6, moduleRows: 2, moduleOrientation: 'portrait' });
		portrait.clear();
		portrait.add(rect(-4, 4, -5, -1.5), 4);
		expect(portrait.shaded).toBe(18);
		// ... and the lowest strip of six landscape modules, two of four strings of three modules.
		const landscape = groups({
			moduleColumns: 6,
			moduleRows: 2,
			moduleOrientation: 'landscape',
			modulesPerString: 3
		});
		landscape.clear();
		landscape.add(rect(-4, 4, -5, -1.5), 4);
		expect([landscape.shaded, landscape.stringsTouched(), landscape.strings]).toEqual([6, 2, 4]);
		// A hair's breadth is none.
		landscape.clear();
		landscape.add(rect(-4, 4, -5, -2 + LEAST_REACH_M / 2), 4);
		expect([landscape.shaded, landscape.stringsTouched()]).toEqual([0, 0]);
		// The clear slot moves the halves apart.
		const slot = groups({
			widthM: 6.4,
			centreGapM: 0.4,
			moduleColumns: 6,
			moduleRows: 2,
			moduleOrientation: 'portrait',
			groupsPerModule: 1
		});
		slot.clear();
		slot.add(rect(-0.19, 0.19, -3, 3), 4);
		expect(slot.shaded).toBe(0);
		slot.clear();
		slot.add(rect(-0.25, 0.19, -3, 3), 4);
		expect(slot.shaded).toBe(2);
	});

	it('are counted as areas of clipped shadows count them, in 400 random scenes', () => {
		const seed = 4101;
		console.log(`cell groups, seed ${seed}`);
		const random = randomSource(seed);
		let scenes = 0;
		let touched = 0;
		while (scenes < 400) {
			const model = testModel({
				moduleColumns: 1 + Math.floor(random() * 6),
				moduleRows: 1 + Math.floor(random() * 4),
				moduleOrientation: random() < 0.5 ? 'portrait' : 'landscape',
				groupsPerModule: 1 + Math.floor(random() * 4)
			});
			const posture = (): Posture =>
				random() < 0.5
					? { kind: 'following' }
					: { kind: 'standing', azimuthDeg: 90 + random() * 180, tiltDeg: 20 + random() * 60 };
			const trackers = Array.from({ length: 5 }, (_, k): Tracker =>
				testTracker(k, (k % 3) * 8 + random() * 2, Math.floor(k / 3) * 7 + random() * 2, {
					posture: posture()
				})
			);
			const box: Obstacle = {
				id: 'o',
				kind: 'box',
				name: '',
				eastM: -6,
				northM: -8,
				sizeXM: 3,
				sizeYM: 2,
				heightM: 6,
				turnDeg: random() * 90
			};
			const { engine } = prepareField({
				place: testPlace,
				plot: testPlot({ obstacles: [box] }),
				layout: testLayout(trackers, [model])
			});
			engine.setSun(90 + random() * 180, 4 + random() * 25);
			const groups = new ProtectedGroups(model);
			for (let i = 0; i < engine.count; i++) {
				if (engine.cosine(i) <= 0.01 || engine.collect(i) === 0) continue;
				const shadows: Point[][] = [];
				groups.clear();
				engine.shadowsAhead(i, 0, (shadow, corners) => {
					groups.add(shadow, corners);
					shadows.push(Array.from({ length: corners }, (_, k): Point => [shadow[2 * k], shadow[2 * k + 1]]));
				});
				if (shadows.length === 0) continue;
				const across = model.moduleOrientation === 'portrait' ? (model.groupsPerModule ?? 3) : 1;
				const along = model.moduleOrientation === 'portrait' ? 1 : (model.groupsPerModule ?? 3);
				const columns = model.moduleColumns * across;
				const rows = model.moduleRows * along;
				expect(groups.count).toBe(columns * rows);
				const count = (shrinkM: number): number => {
					let found = 0;
					for (let k = 0; k < columns * rows; k++) {
						const x0 = -3 + ((k % columns) * 6) / columns;
						const y0 = -2 + (Math.floor(k / columns) * 4) / rows;
						const hit = shadows.some(
							(shadow) =>
								areaInside(
									shadow,
									x0 + shrinkM,
									x0 + 6 / columns - shrinkM,
									y0 + shrinkM,
									y0 + 4 / rows - shrinkM
								) > 0
						);
						if (hit) found++;
					}
					return found;
				};
				expect(groups.shaded).toBeLessThanOrEqual(count(0));
				expect(groups.shaded).toBeGreaterThanOrEqual(count(2 * LEAST_REACH_M));
				if (groups.shaded > 0 && groups.shaded < groups.count) touched++;
				scenes++;
			}
		}
		expect(touched).toBeGreaterThan(100);
	});

	it('give losses between the shaded area and everything, more with every group', () => {
		for (const blocks of [1, 3, 36]) {
			for (const geometricShare of [0, 0.05, 0.5, 1]) {
				let before = 0;
				for (let shadedBlocks = 0; shadedBlocks <= blocks; shadedBlocks++) {
					const { loss } = stringEffect({ geometricShare, shadedBlocks, blocks });
					expect(loss).toBeGreaterThanOrEqual(Math.max(geometricShare, before));
					expect(loss).toBeLessThanOrEqual(1);
					before = loss;
				}
			}
		}
	});
});
