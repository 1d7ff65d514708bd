import { classifyMount, type Layout, type Mount, type MountClass, type MountResult } from '$lib/core';

/** Tags by the class of the place that is chosen for them, in the layout's order. */
export type ChosenMountClasses = Record<MountClass | 'unknown', string[]>;

const TOLERANCE_M = 0.0005;

const same = (a: Mount, b: Mount) =>
	a.edge === b.edge &&
	Math.abs(a.alongM - b.alongM) < TOLERANCE_M &&
	Math.abs(a.outM - b.outM) < TOLERANCE_M &&
	Math.abs(a.forwardM - b.forwardM) < TOLERANCE_M;

/**
 * How a mount run judges the places that a layout has chosen; trackers without a place are left out. A place that the
 * run did not compute, or a tracker that it does not know, is `unknown`.
 */
export function chosenMountClasses(layout: Layout, result: MountResult): ChosenMountClasses {
	const computed = new Map(result.trackers.map((each) => [each.trackerId, each]));
	const tags: ChosenMountClasses = { clear: [], sound: [], watch: [], unfit: [], unknown: [] };
	for (const { id, tag } of layout.trackers) {
		const mount = layout.mounts.exceptions[id] ?? layout.mounts.common;
		if (!mount) continue;
		const tracker = computed.get(id);
		const places = tracker ? [tracker.common, tracker.best, ...tracker.edges[mount.edge]] : [];
		const place = places.find((each) => same(each.mount, mount));
		tags[place ? classifyMount(place).class : 'unknown'].push(tag);
	}
	return tags;
}
