import { describe, expect, it } from 'vitest';
import { fitPlan } from './thumbnail';

describe('the plan on a card', () => {
	it('fits the land into the picture with north up', () => {
		const square = {
			boundary: [
				[
					[0, 0],
					[100, 0],
					[100, 100],
					[0, 100]
				] as [number, number][]
			],
			trackers: []
		};
		expect(fitPlan(square, 220, 120, 10)?.rings).toBe('M60 110L160 110L160 10L60 10Z');
	});

	it('draws trackers without a boundary, and nothing for nothing', () => {
		expect(fitPlan({ boundary: [], trackers: [[5, 5]] }, 100, 100)?.dots).toEqual([{ x: 50, y: 50 }]);
		expect(fitPlan({ boundary: [], trackers: [] }, 100, 100)).toBeNull();
	});
});
