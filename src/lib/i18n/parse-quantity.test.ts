import { describe, expect, it } from 'vitest';
import { outsideRange, parseQuantity } from './parse-quantity';

describe('a quantity field', () => {
	it.each([
		['12.5', 'm', 12.5],
		['12,5', 'm', 12.5],
		['12.5+0.3', 'm', 12.8],
		['12,5 + 0,3', 'm', 12.8],
		['6 m - 20 cm', 'm', 5.8],
		['-3', 'm', -3],
		['\u22123.2', 'm', -3.2],
		['10 ft', 'm', 3.048],
		['1 234,5', 'm', 1234.5],
		['1.234,5', 'm', 1234.5],
		['1,234.5', 'm', 1234.5],
		["1'234.5", 'm', 1234.5],
		['1,234,567', 'm', 1234567],
		['12°', '°', 12],
		['12 deg', '°', 12],
		['4.8 kW', 'W', 4800],
		['10 %', '%', 10],
		['.5', '', 0.5],
		['25 mm', 'm', 0.025]
	])('reads “%s” in %s as %d', (text, unit, value) => {
		expect(parseQuantity(text, unit)).toEqual({ ok: true, value });
	});

	it.each([
		['', 'm', 'Write a number in m.'],
		['abc', 'm', 'is not a number'],
		['12 kg', 'm', '“kg” is not a unit for this field'],
		['12+', 'm', 'not a sum'],
		['1.2.3', 'm', 'is not a number'],
		['3 m', '', 'bare number'],
		['Infinity', 'm', 'is not a number'],
		['9'.repeat(400), 'm', 'too large']
	])('refuses “%s” in %s and says why', (text, unit, words) => {
		const parsed = parseQuantity(text, unit);
		expect(parsed.ok).toBe(false);
		if (!parsed.ok) expect(parsed.message).toContain(words);
	});

	it('says its range', () => {
		expect(outsideRange(5, 'm', 0, 4)).toBe('Write a value from 0 m to 4 m.');
		expect(outsideRange(-1, '°', 0)).toBe('Write 0° or more.');
		expect(outsideRange(3, 'm', 0, 4)).toBeNull();
	});
});
