import { describe, expect, it } from 'vitest';
import { readFileSync } from 'node:fs';
import { shadeScene, type ShadeScene } from '../../src/lib/core';

interface ShadeChecks {
	scenes: (ShadeScene & {
		name: string;
		expected: { shadedShare: number[]; frontLit: boolean[]; hiddenBySkyline: boolean };
	})[];
}
const { scenes } = JSON.parse(
	readFileSync(new URL('../fixtures/checks/shade-truth.json', import.meta.url), 'utf8')
) as ShadeChecks;

describe('shaded shares against exact polygon unions (made with the Shapely library, confirmed by ray casting)', () => {
	it('has scenes to compare', () => expect(scenes.length).toBeGreaterThan(20));
	for (const scene of scenes) {
		it(`${scene.name}: within 1e-9`, () => {
			const tables = shadeScene(scene);
			tables.forEach((table, i) => {
				expect(Math.abs(table.shadedShare - scene.expected.shadedShare[i])).toBeLessThan(1e-9);
				expect(table.frontLit).toBe(scene.expected.frontLit[i]);
				expect(table.hiddenBySkyline).toBe(scene.expected.hiddenBySkyline);
			});
		});
	}
});

describe('two equal tables square to the sun on closed formulas', () => {
	// Neighbour offset east, north, up; width, height; sun; shaded share: from the overlap of two shifted rectangles,
	// confirmed with a 200 x 200 ray cast.
	const rows: [number[], number, number, number, number, number][] = [
		[[0, -20, 0], 10, 6, 180, 10, 0.421173],
		[[0, -20, 0], 10, 6, 180, 17.4576, 0],
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
	for (const [offset, widthM, heightM, azimuthDeg, elevationDeg, share] of rows) {
		it(`neighbour at ${offset.join(', ')}, sun ${azimuthDeg}, ${elevationDeg}`, () => {
			const table = { widthM, heightM, azimuthDeg, tiltDeg: 90 - elevationDeg };
			const [result] = shadeScene({
				sun: { azimuthDeg, elevationDeg },
				tables: [
					{ id: 'a', eastM: 0, northM: 0, upM: 0, ...table },
					{ id: 'b', eastM: offset[0], northM: offset[1], upM: offset[2], ...table }
				],
				obstacles: [],
				skyline: []
			});
			expect(Math.abs(result.shadedShare - share)).toBeLessThan(1e-5);
		});
	}
});
