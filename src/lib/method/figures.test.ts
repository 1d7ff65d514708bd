import { describe, expect, it } from 'vitest';
import { barPosition, figure, roomWords } from './figures';

describe('figures of the method page', () => {
	it('shows two digits, and powers of ten where zeros would have to be counted', () => {
		expect([0.00319, 0.5, 30, 12345, 0].map(figure)).toEqual(['0.0032', '0.5', '30', '12000', '0']);
		expect([4.78e-13, 1e-9, 5e-5, 2e6].map(figure)).toEqual(['4.8 × 10⁻¹³', '10⁻⁹', '5 × 10⁻⁵', '2 × 10⁶']);
		expect(figure(Number.MAX_VALUE)).toBe('beyond measure');
	});

	it('places a distance on the bar by its powers of ten', () => {
		expect([1, 0.1, 0.01, 1e-4, 1e-9, 0].map((distance) => barPosition(distance, 1))).toEqual([
			1, 0.75, 0.5, 0, 0, 0
		]);
		expect(barPosition(2, 1)).toBe(1);
		expect([barPosition(0, 0), barPosition(1, 0)]).toEqual([0, 1]);
	});

	it('says how much room is left', () => {
		expect(roomWords(0.9, 1)).toBe('just inside');
		expect(roomWords(0.3, 1)).toBe('3.3 times inside');
		expect(roomWords(1e-3, 1)).toBe('1,000 times inside');
		expect(roomWords(1e-9, 1)).toBe('over a million times inside');
		expect(roomWords(0, 0)).toBe('no difference');
		expect(roomWords(2, 1)).toBe('outside');
	});
});
