import { describe, expect, it } from 'vitest';
import type { Layout, Plot, Tracker } from '$lib/core';
import { layoutDifferences, plotDifferences } from './difference';

function tracker(id: string, change: Partial<Tracker> = {}): Tracker {
	return {
		id,
		tag: id.toUpperCase(),
		modelId: 'm',
		eastM: 0,
		northM: 0,
		axisHeightM: null,
		posture: { kind: 'following' },
		...change
	};
}

function layoutOf(...trackers: Tracker[]): Layout {
	return { version: 1, models: [], trackers, mounts: { common: null, exceptions: {}, fromRunId: null } };
}

describe('differences in words', () => {
	it('name the trackers that were added, taken away, moved and renamed', () => {
		const mine = layoutOf(tracker('a1'), tracker('a2'), tracker('a3'));
		const theirs = layoutOf(tracker('a1', { eastM: 4 }), tracker('a3', { tag: 'C09' }), tracker('b1'));
		expect(layoutDifferences(mine, theirs)).toEqual([
			'The other version has 1 tracker (B1) that yours has not.',
			'Yours has 1 tracker (A2) that the other version has not.',
			'Places differ: A1 by 4.0 m.',
			'It has 1 tracker (A3) under another tag.'
		]);
	});

	it('name five trackers at most', () => {
		const ids = ['a', 'b', 'c', 'd', 'e', 'f', 'g'];
		const [line] = layoutDifferences(layoutOf(...ids.map((id) => tracker(id))), layoutOf());
		expect(line).toBe('Yours has 7 trackers (A, B, C, D, E and 2 more) that the other version has not.');
	});

	it('name a posture that differs', () => {
		const lines = layoutDifferences(
			layoutOf(tracker('a')),
			layoutOf(tracker('a', { posture: { kind: 'flat' } }))
		);
		expect(lines).toEqual(['It has 1 tracker (A) with another model, axis height or posture.']);
	});

	it('say what differs in a plot', () => {
		const mine: Plot = {
			version: 1,
			boundary: [],
			ground: { kind: 'level', heightM: 0 },
			skyline: [],
			obstacles: [],
			setBackM: 3
		};
		const theirs: Plot = { ...mine, setBackM: 5, ground: { kind: 'level', heightM: 1 } };
		expect(plotDifferences(mine, theirs)).toEqual([
			'The ground differs.',
			'The set-back is 5 m there and 3 m in yours.'
		]);
		expect(plotDifferences(mine, structuredClone(mine))).toEqual([]);
	});
});
