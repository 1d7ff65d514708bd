import { describe, expect, it } from 'vitest';
import type { Layout, Mount, Plot, Tracker } from '$lib/core';
import { emptyPlot, modelLibrary } from '$lib/schema';
import { mergeLayouts, mergePlots } from './merge-documents';

const [small, large] = modelLibrary;

function tracker(id: string, change: Partial<Tracker> = {}): Tracker {
	return {
		id,
		tag: id.toUpperCase(),
		modelId: small.id,
		eastM: 0,
		northM: 0,
		axisHeightM: null,
		posture: { kind: 'following' },
		...change
	};
}

function layoutOf(trackers: Tracker[], change: Partial<Layout> = {}): Layout {
	return {
		version: 1,
		models: [small],
		trackers,
		mounts: { common: null, exceptions: {}, fromRunId: null },
		...change
	};
}

const base = layoutOf([tracker('a01'), tracker('a02', { eastM: 12 }), tracker('a03', { eastM: 24 })]);
const edit = (change: (draft: Layout) => void, from: Layout = base): Layout => {
	const draft = structuredClone(from);
	change(draft);
	return draft;
};
const merged = (mine: Layout, theirs: Layout): Layout => {
	const result = mergeLayouts(base, mine, theirs);
	if (!result.ok) throw new Error('refused');
	return result.value;
};

describe('both versions of a layout in one', () => {
	it('moves what either side moved', () => {
		const mine = edit((draft) => void (draft.trackers[0].eastM = 3));
		const theirs = edit((draft) => void (draft.trackers[2].northM = -4));
		expect(merged(mine, theirs).trackers.map(({ eastM, northM }) => [eastM, northM])).toEqual([
			[3, 0],
			[12, 0],
			[24, -4]
		]);
	});

	it('keeps what either side added and takes away what either side took away', () => {
		const mine = edit((draft) => {
			draft.trackers.shift();
			draft.trackers.push(tracker('b01'));
		});
		const theirs = edit((draft) => {
			draft.trackers.pop();
			draft.trackers.push(tracker('c01'));
		});
		expect(merged(mine, theirs).trackers.map(({ id }) => id)).toEqual(['a02', 'c01', 'b01']);
	});

	it('refuses when both changed one tracker differently, or one moved what the other took away', () => {
		const left = edit((draft) => void (draft.trackers[0].eastM = 3));
		const right = edit((draft) => void (draft.trackers[0].eastM = -3));
		const gone = edit((draft) => void draft.trackers.shift());
		expect(mergeLayouts(base, left, right)).toEqual({ ok: false });
		expect(mergeLayouts(base, left, gone)).toEqual({ ok: false });
		expect(mergeLayouts(base, gone, left)).toEqual({ ok: false });
	});

	it('takes the same change on both sides once', () => {
		const same = edit((draft) => void (draft.trackers[0].eastM = 3));
		expect(merged(same, structuredClone(same))).toEqual(same);
	});

	it('gives my new tracker another tag when theirs took it', () => {
		const mine = edit((draft) => void draft.trackers.push(tracker('m', { tag: 'A04', eastM: 48 })));
		const theirs = edit((draft) => void draft.trackers.push(tracker('t', { tag: 'A04', eastM: 36 })));
		const both = merged(mine, theirs).trackers;
		expect(both.map(({ id, tag }) => `${id} ${tag}`).slice(3)).toEqual(['t A04', 'm A05']);
	});

	it('keeps the models that the merged trackers use, and no others', () => {
		const mine = edit((draft) => {
			draft.models.push(large);
			draft.trackers[0].modelId = large.id;
		});
		const theirs = edit((draft) => void (draft.trackers[1].eastM = 13));
		expect(
			merged(mine, theirs)
				.models.map(({ id }) => id)
				.sort()
		).toEqual([small.id, large.id].sort());
		const none = edit((draft) => void (draft.trackers = []));
		expect(merged(none, base).models).toEqual([]);
	});

	it('merges mounts by tracker, and refuses two choices for the field', () => {
		const mount: Mount = { edge: 'top', alongM: 0, outM: 0.08, forwardM: 0.03 };
		const mine = edit((draft) => void (draft.mounts.exceptions.a01 = mount));
		const theirs = edit((draft) => {
			draft.mounts.common = mount;
			draft.mounts.fromRunId = 'run';
		});
		expect(merged(mine, theirs).mounts).toEqual({
			common: mount,
			exceptions: { a01: mount },
			fromRunId: 'run'
		});
		const other = edit((draft) => void (draft.mounts.common = { ...mount, edge: 'bottom' }));
		expect(mergeLayouts(base, other, theirs)).toEqual({ ok: false });
	});
});

describe('both versions of a plot in one', () => {
	const plot: Plot = emptyPlot();

	it('takes each part from the side that changed it', () => {
		const mine: Plot = { ...plot, setBackM: plot.setBackM + 2 };
		const theirs: Plot = { ...plot, ground: { kind: 'level', heightM: 7 } };
		expect(mergePlots(plot, mine, theirs)).toEqual({
			ok: true,
			value: { ...plot, setBackM: plot.setBackM + 2, ground: { kind: 'level', heightM: 7 } }
		});
	});

	it('refuses two set-backs', () => {
		const other = (setBackM: number): Plot => ({ ...plot, setBackM });
		expect(mergePlots(plot, other(17), other(18))).toEqual({ ok: false });
	});
});
