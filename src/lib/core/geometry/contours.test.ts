import { describe, expect, it } from 'vitest';
import type { Ground, GroundPoint } from '../document';
import { measuredContours } from './contours';
import { groundHeightM } from './ground';

const box = { westM: -100, southM: -100, eastM: 100, northM: 100 };
const cone: Ground = {
	kind: 'points',
	points: Array.from({ length: 60 }, (_, k): GroundPoint => {
		const a = (k * 2.399963) % (2 * Math.PI);
		const r = 8 * Math.sqrt(k);
		return [r * Math.sin(a), r * Math.cos(a), 20 - r / 4];
	})
};

describe('contours of measured ground', () => {
	it('run at their own height, on round steps', () => {
		const pieces = measuredContours(cone, 2, box);
		expect(pieces.length).toBeGreaterThan(40);
		for (const { heightM, from, to } of pieces) {
			expect(heightM % 2).toBe(0);
			for (const [e, n] of [from, to, [(from[0] + to[0]) / 2, (from[1] + to[1]) / 2]])
				expect(groundHeightM(cone, e, n)).toBeCloseTo(heightM, 2);
		}
	});

	it('close around a hill: every end of a piece inside the outline is the end of another', () => {
		const pieces = measuredContours(cone, 2, box).filter(({ heightM }) => heightM === 12);
		const key = ([e, n]: readonly number[]) => `${e.toFixed(6)} ${n.toFixed(6)}`;
		const ends = new Map<string, number>();
		for (const { from, to } of pieces)
			for (const end of [from, to]) ends.set(key(end), (ends.get(key(end)) ?? 0) + 1);
		expect(pieces.length).toBeGreaterThan(5);
		expect([...ends.values()].every((count) => count === 2)).toBe(true);
	});

	it('are none on ground that was not measured, or outside of the box', () => {
		expect(measuredContours({ kind: 'level', heightM: 3 }, 1, box)).toEqual([]);
		expect(measuredContours(cone, 0, box)).toEqual([]);
		expect(measuredContours(cone, 2, { westM: 500, southM: 500, eastM: 600, northM: 600 })).toEqual([]);
	});
});
