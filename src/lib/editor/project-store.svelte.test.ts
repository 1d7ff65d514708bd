import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { emptyPlot, modelLibrary } from '$lib/schema';
import type { Layout } from '$lib/core';
import { shiftTrackers } from './kernels/layout-edit';
import type { ProjectData } from './project-data';
import { ProjectStore } from './project-store.svelte';

const [model] = modelLibrary;

function layoutOf(count: number): Layout {
	return {
		version: 1,
		models: [model],
		trackers: Array.from({ length: count }, (_, i) => ({
			id: `t${i}`,
			tag: `A0${i + 1}`,
			modelId: model.id,
			eastM: i * 9,
			northM: 0,
			axisHeightM: null,
			posture: { kind: 'following' }
		})),
		mounts: { common: null, exceptions: {}, fromRunId: null }
	};
}

function data(role: ProjectData['project']['role'] = 'designer', revision = 3): ProjectData {
	return {
		project: {
			id: 'p',
			name: 'Invented',
			place: {
				latitudeDeg: 41.2,
				longitudeDeg: 14.5,
				altitudeM: 0,
				timeZone: 'Europe/Rome',
				magneticDeclinationDeg: 0
			},
			winterRule: { kind: 'clear-above', elevationDeg: 12 },
			role
		},
		plot: { document: emptyPlot(), revision: 1 },
		layout: { id: 'l', name: 'Layout 1', revision, document: layoutOf(3) },
		models: [...modelLibrary]
	};
}

const now = Date.UTC(2026, 5, 1);

describe('the project store', () => {
	// Saving waits for a timer that never comes: these tests are about the documents.
	beforeEach(() => void vi.useFakeTimers());
	afterEach(() => void vi.useRealTimers());

	it('undoes and redoes edits of layout and plot in the order they were made', () => {
		const store = new ProjectStore(data(), now);
		store.editLayout('Move A01', (draft) => void (draft.trackers[0].eastM = -5));
		store.editPlot('Set-back', (draft) => void (draft.setBackM = 4));
		expect(store.undoLabel).toBe('Set-back');
		store.undo();
		expect(store.plot.setBackM).toBe(emptyPlot().setBackM);
		expect(store.layout.trackers[0].eastM).toBe(-5);
		store.undo();
		expect(store.layout.trackers[0].eastM).toBe(0);
		expect(store.canUndo).toBe(false);
		store.redo();
		store.redo();
		expect(store.plot.setBackM).toBe(4);
		expect(store.saveState).toBe('unsaved');
	});

	it('makes one undo step of a gesture, and none of one that is given up', () => {
		const store = new ProjectStore(data(), now);
		const before = store.layout;
		store.begin('Move A02');
		for (let i = 1; i <= 10; i += 1) {
			store.replaceLayout('Move A02', shiftTrackers(before, new Set(['t1']), i, 0));
		}
		expect(store.saveState).toBe('saved');
		store.commit();
		expect(store.saveState).toBe('unsaved');
		store.undo();
		expect(store.layout).toBe(before);
		expect(store.canUndo).toBe(false);

		store.begin('Move A02');
		store.replaceLayout('Move A02', shiftTrackers(before, new Set(['t1']), 7, 0));
		store.cancel();
		expect(store.layout).toBe(before);
	});

	it('shades by the same numbers after a cheap move as after preparing everything anew', () => {
		const moved = new ProjectStore(data(), now);
		expect(moved.shares).toHaveLength(3);
		moved.replaceLayout('Move A02', shiftTrackers(moved.layout, new Set(['t1']), -4.6, -4.1));
		const cheap = [...moved.shares];
		const fresh = new ProjectStore({ ...data(), layout: { ...data().layout, document: moved.layout } }, now);
		expect(cheap).toEqual([...fresh.shares]);
		expect(Math.max(...cheap)).toBeGreaterThan(0);
	});

	it.each(['crew', 'client'] as const)('lets %s look and change nothing', (role) => {
		const store = new ProjectStore(data(role), now);
		const before = store.layout;
		store.editLayout('Move A01', (draft) => void (draft.trackers[0].eastM = -5));
		store.begin('Move A02');
		store.replaceLayout('Move A02', shiftTrackers(before, new Set(['t1']), 7, 0));
		store.commit();
		expect(store.readOnly).toBe(true);
		expect(store.layout).toBe(before);
		expect(store.saveState).toBe('saved');
	});

	it('takes over newer page data, but never over work that waits to be saved', () => {
		const store = new ProjectStore(data(), now);
		const newer = {
			...data('designer', 4),
			layout: { ...data('designer', 4).layout, document: layoutOf(5) }
		};
		store.adopt(newer);
		expect(store.layout.trackers).toHaveLength(5);
		expect(store.layoutRevision).toBe(4);
		store.editLayout('Move A01', (draft) => void (draft.trackers[0].eastM = -5));
		store.adopt({ ...newer, layout: { ...newer.layout, revision: 9 } });
		expect(store.layout.trackers[0].eastM).toBe(-5);
		expect(store.layoutRevision).toBe(4);
	});
});
