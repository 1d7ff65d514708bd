import { describe, expect, it } from 'vitest';
import type { Tracker } from '$lib/core';
import { tagForOne } from './single-tag';

function tracker(tag: string, eastM: number, northM: number): Tracker {
	return { id: tag, tag, modelId: 'm', eastM, northM, axisHeightM: null, posture: { kind: 'following' } };
}

describe('the tag of one more tracker', () => {
	const trackers = [tracker('A01', 0, 20), tracker('A02', 13, 20), tracker('B01', 0, 9.5)];

	it('continues the row that it joins', () => {
		expect(tagForOne(trackers, [26, 20])).toBe('A03');
		expect(tagForOne(trackers, [13, 10])).toBe('B02');
	});

	it('begins a new row where there is none', () => {
		expect(tagForOne(trackers, [0, -5])).toBe('C01');
		expect(tagForOne([], [0, 0])).toBe('A01');
	});

	it('never gives a tag of its row twice, gaps or not', () => {
		expect(tagForOne([tracker('A01', 0, 0), tracker('A09', 90, 0)], [10, 0])).toBe('A10');
	});
});
