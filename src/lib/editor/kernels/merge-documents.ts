import type { Layout, Mount, Plot, Tracker } from '$lib/core';
import { mergeByKey, mergeOne, type Merged } from './merge-parts';
import { tagForOne } from './single-tag';

const byId = <T extends { id: string }>(list: readonly T[]): Map<string, T> =>
	new Map(list.map((one) => [one.id, one]));

/** Trackers that only mine added get a tag of their own where theirs gave the same one away. */
function withSingleTags(trackers: readonly Tracker[], addedByMe: ReadonlySet<string>): Tracker[] {
	const kept = trackers.filter(({ id }) => !addedByMe.has(id));
	const taken = new Set(kept.map(({ tag }) => tag));
	return trackers
		.filter(({ id }) => addedByMe.has(id))
		.reduce((list, tracker) => {
			const tag = taken.has(tracker.tag) ? tagForOne(list, [tracker.eastM, tracker.northM]) : tracker.tag;
			taken.add(tag);
			return [...list, { ...tracker, tag }];
		}, kept);
}

/**
 * Both versions of a layout in one, tracker by tracker: their changes, and mine where only mine changed. Refused when one tracker,
 * its mount or one model was changed on both sides; then somebody must choose.
 */
export function mergeLayouts(base: Layout, mine: Layout, theirs: Layout): Merged<Layout> {
	const trackers = mergeByKey(byId(base.trackers), byId(mine.trackers), byId(theirs.trackers));
	const models = mergeByKey(byId(base.models), byId(mine.models), byId(theirs.models));
	const exceptions = mergeByKey<Mount>(
		new Map(Object.entries(base.mounts.exceptions)),
		new Map(Object.entries(mine.mounts.exceptions)),
		new Map(Object.entries(theirs.mounts.exceptions))
	);
	const commonOf = ({ mounts: { common, fromRunId } }: Layout) => ({ common, fromRunId });
	const common = mergeOne(commonOf(base), commonOf(mine), commonOf(theirs));
	const clashes = trackers.clashes.length + models.clashes.length + exceptions.clashes.length;
	if (clashes > 0 || !common.ok) return { ok: false };

	const known = new Set([...base.trackers, ...theirs.trackers].map(({ id }) => id));
	const addedByMe = new Set(mine.trackers.map(({ id }) => id).filter((id) => !known.has(id)));
	const merged = withSingleTags([...trackers.merged.values()], addedByMe);
	const standing = new Set(merged.map(({ id }) => id));
	const used = new Set(merged.map(({ modelId }) => modelId));
	// A model may have been dropped as idle on one side while the other side still uses it.
	const allModels = new Map([...byId(mine.models), ...byId(theirs.models), ...models.merged]);
	return {
		ok: true,
		value: {
			...theirs,
			models: [...allModels.values()].filter(({ id }) => used.has(id)),
			trackers: merged,
			mounts: {
				...common.value,
				exceptions: Object.fromEntries(
					[...exceptions.merged].filter(([trackerId]) => standing.has(trackerId))
				)
			}
		}
	};
}

/** Both versions of a plot in one: boundary, ground, skyline and set-back each as a whole, obstacles one by one. */
export function mergePlots(base: Plot, mine: Plot, theirs: Plot): Merged<Plot> {
	const boundary = mergeOne(base.boundary, mine.boundary, theirs.boundary);
	const ground = mergeOne(base.ground, mine.ground, theirs.ground);
	const skyline = mergeOne(base.skyline, mine.skyline, theirs.skyline);
	const setBackM = mergeOne(base.setBackM, mine.setBackM, theirs.setBackM);
	const obstacles = mergeByKey(byId(base.obstacles), byId(mine.obstacles), byId(theirs.obstacles));
	if (!boundary.ok || !ground.ok || !skyline.ok || !setBackM.ok || obstacles.clashes.length > 0) {
		return { ok: false };
	}
	return {
		ok: true,
		value: {
			...theirs,
			boundary: boundary.value,
			ground: ground.value,
			skyline: skyline.value,
			setBackM: setBackM.value,
			obstacles: [...obstacles.merged.values()]
		}
	};
}
