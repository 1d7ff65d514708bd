import type { Layout, PlanPoint, Posture, Tracker, TrackerModel } from '$lib/core';

/**
 * Edits of a layout as data in, data out. Trackers that an edit leaves alone are shared with the layout before it, which keeps
 * history small and lets the shade of the rest be kept while one tracker is dragged. Metres, east and north.
 */

/** Places are kept to the millimetre: finer digits are noise on the ground. */
export function toMillimetre(valueM: number): number {
	return Math.round(valueM * 1000) / 1000;
}

function mapTrackers(
	layout: Layout,
	ids: ReadonlySet<string>,
	change: (tracker: Tracker) => Tracker
): Layout {
	return {
		...layout,
		trackers: layout.trackers.map((tracker) => (ids.has(tracker.id) ? change(tracker) : tracker))
	};
}

/** Shifts trackers from where they stand in `layout`. */
export function shiftTrackers(
	layout: Layout,
	ids: ReadonlySet<string>,
	eastM: number,
	northM: number
): Layout {
	if (eastM === 0 && northM === 0) return layout;
	return mapTrackers(layout, ids, (tracker) => ({
		...tracker,
		eastM: toMillimetre(tracker.eastM + eastM),
		northM: toMillimetre(tracker.northM + northM)
	}));
}

export type TrackerChange = Partial<Pick<Tracker, 'tag' | 'eastM' | 'northM' | 'axisHeightM'>> & {
	posture?: Posture;
};

export function changeTrackers(layout: Layout, ids: ReadonlySet<string>, change: TrackerChange): Layout {
	return mapTrackers(layout, ids, (tracker) => ({ ...tracker, ...change }));
}

/** Gives trackers another model, keeping the model with the layout and dropping models that nothing uses any more. */
export function changeModel(layout: Layout, ids: ReadonlySet<string>, model: TrackerModel): Layout {
	const changed = mapTrackers(withModel(layout, model), ids, (tracker) => ({
		...tracker,
		modelId: model.id
	}));
	return withoutIdleModels(changed);
}

export function withModel(layout: Layout, model: TrackerModel): Layout {
	if (layout.models.some((known) => known.id === model.id)) return layout;
	return { ...layout, models: [...layout.models, model] };
}

function withoutIdleModels(layout: Layout): Layout {
	const used = new Set(layout.trackers.map((tracker) => tracker.modelId));
	const models = layout.models.filter((model) => used.has(model.id));
	return models.length === layout.models.length ? layout : { ...layout, models };
}

/** Takes trackers away, with their own mounts and models that nothing uses any more. */
export function removeTrackers(layout: Layout, ids: ReadonlySet<string>): Layout {
	const exceptions = Object.fromEntries(
		Object.entries(layout.mounts.exceptions).filter(([trackerId]) => !ids.has(trackerId))
	);
	return withoutIdleModels({
		...layout,
		trackers: layout.trackers.filter((tracker) => !ids.has(tracker.id)),
		mounts: { ...layout.mounts, exceptions }
	});
}

export interface NewTracker {
	id: string;
	tag: string;
	point: PlanPoint;
	axisHeightM?: number | null;
	posture?: Posture;
}

export function addTrackers(layout: Layout, model: TrackerModel, added: readonly NewTracker[]): Layout {
	const next = withModel(layout, model);
	const trackers = added.map(({ id, tag, point, axisHeightM, posture }) => ({
		id,
		tag,
		modelId: model.id,
		eastM: toMillimetre(point[0]),
		northM: toMillimetre(point[1]),
		axisHeightM: axisHeightM ?? null,
		posture: posture ?? ({ kind: 'following' } as const)
	}));
	return { ...next, trackers: [...next.trackers, ...trackers] };
}

/** Gives tags by position in `tags` to the trackers in layout order. */
export function retag(layout: Layout, tags: readonly string[]): Layout {
	return {
		...layout,
		trackers: layout.trackers.map((tracker, index) =>
			tracker.tag === tags[index] ? tracker : { ...tracker, tag: tags[index] }
		)
	};
}
