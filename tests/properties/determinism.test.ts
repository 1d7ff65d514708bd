/** The same inputs give the same bytes, whatever was computed before. */
import { describe, expect, it, vi } from 'vitest';
import {
	fieldLitPieces,
	fieldShade,
	joinShadeYear,
	prepareField,
	shadeYear,
	shadeYearPart,
	type RunInput
} from '../../src/lib/core';
import { testGrid, testLayout, testModel, testPlace, testPlot } from '../../src/lib/core/test-field';

// Long only on a machine that is busy with other things.
vi.setConfig({ testTimeout: 300_000 });

const input = (): RunInput => ({
	place: testPlace,
	plot: testPlot({ ground: { kind: 'plane', heightM: 0, risePercent: 8, riseTowardsDeg: 60 } }),
	layout: testLayout(testGrid(4, 3, 10, 9), [
		testModel({ stops: { fromDeg: 60, toDeg: 290 }, centreGapM: 0.2 })
	]),
	year: 2025,
	stepMinutes: 20,
	utcOffsetMinutes: 60,
	treeYears: 0,
	winterRule: { kind: 'clear-above', elevationDeg: 15 }
});

describe('same inputs, same bytes', () => {
	it('a year twice over, with another field computed between', () => {
		const first = JSON.stringify(shadeYear(input()));
		shadeYear({ ...input(), layout: testLayout(testGrid(3, 2, 14, 8)) });
		expect(JSON.stringify(shadeYear(input()))).toBe(first);
		expect(first.length).toBeGreaterThan(10_000);
	});

	it('a year in one part or in several, as threads compute it', () => {
		const whole = JSON.stringify(shadeYear(input()));
		const count = input().layout.trackers.length;
		for (const cuts of [
			[0, 5, count],
			[0, 1, 2, 7, count]
		]) {
			const parts = cuts.slice(1).map((to, k) => {
				const part = shadeYearPart(input(), undefined, { from: cuts[k], to });
				if (!part) throw new Error('Nothing stops this part');
				return part;
			});
			expect(JSON.stringify(joinShadeYear(input(), parts))).toBe(whole);
		}
	});

	it('a sun asked again after other suns, on one field and on a fresh one', () => {
		const field = prepareField(input());
		const sun = { azimuthDeg: 128, elevationDeg: 9 };
		const shares = [...fieldShade(field, sun)];
		const pieces = JSON.stringify(fieldLitPieces(field, sun));
		for (let k = 0; k < 50; k++) fieldShade(field, { azimuthDeg: 90 + 3 * k, elevationDeg: 1 + k / 2 });
		expect([...fieldShade(field, sun)]).toEqual(shares);
		expect(JSON.stringify(fieldLitPieces(field, sun))).toBe(pieces);
		expect([...fieldShade(prepareField(input()), sun)]).toEqual(shares);
		expect(shares.some((share) => share > 0 && share < 1)).toBe(true);
	});
});
