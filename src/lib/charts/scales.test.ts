import { describe, expect, it } from 'vitest';
import { percentDigits, rampScale } from './ramp-scale';
import { shadeColour } from './shade-ramp';
import { orderRows, type StripRow } from './strip-order';
import { lossRange } from './uncertainty';

describe('the scale of a ramp', () => {
	it('ends at the next round share and spreads the whole ramp under it', () => {
		const scale = rampScale([0.031, null, 0.047]);
		expect(scale.max).toBe(0.05);
		expect(scale.colour(0.05)).toBe(shadeColour(1));
		expect(scale.colour(0)).toBe(shadeColour(0));
		expect(scale.ticks).toEqual([0, 0.0125, 0.025, 0.037500000000000006, 0.05]);
	});

	it('has a scale for a field with no loss and never goes beyond everything', () => {
		expect(rampScale([0, null]).max).toBe(0.005);
		expect(rampScale([]).max).toBe(0.005);
		expect(rampScale([0.9]).max).toBe(1);
	});

	it('gives labels as many decimals as tell them apart', () => {
		for (const max of [0.005, 0.01, 0.02, 0.03, 0.05, 0.1, 0.2, 0.3, 0.5, 1]) {
			const labels = rampScale([max]).ticks.map((tick) => (tick * 100).toFixed(percentDigits(max)));
			expect(new Set(labels).size).toBe(labels.length);
		}
	});
});

describe('rows of the shade strip', () => {
	const row = (tag: string, eastM: number, loss: number, index: number): StripRow => ({
		trackerId: tag,
		tag,
		eastM,
		northM: 0,
		loss,
		index
	});
	const rows = [row('B10', 0, 0.02, 0), row('A01', 20, 0.01, 1), row('B02', 10, 0.03, 2)];

	it('come by tag with numbers as numbers, by loss with the most first, and from west to east', () => {
		expect(orderRows(rows, 'tag').map((r) => r.tag)).toEqual(['A01', 'B02', 'B10']);
		expect(orderRows(rows, 'loss').map((r) => r.tag)).toEqual(['B02', 'B10', 'A01']);
		expect(orderRows(rows, 'position').map((r) => r.tag)).toEqual(['B10', 'B02', 'A01']);
	});
});

describe('the range around a loss', () => {
	it('is a fifth of itself and 0.2 points either way, and stays between nothing and everything', () => {
		// 3 %: 20 % of 3 is 0.6, with 0.2 makes 0.8 points either way.
		const { low, high } = lossRange(0.03);
		expect(low).toBeCloseTo(0.022, 12);
		expect(high).toBeCloseTo(0.038, 12);
		expect(lossRange(0.001).low).toBe(0);
		expect(lossRange(0.95).high).toBe(1);
	});
});
