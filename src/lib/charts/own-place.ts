import { MOUNT_MEASURES, rankMount, type MountPlaceResult, type MountResult } from '$lib/core';
import { sameMount } from './mount-words';

/** A measure counts as much better when it is at most this part of what it was. */
const MUCH_BETTER = 0.5;

/**
 * Whether another place is worth a kind of its own on a tracker: a better class, or every measure that is worse than
 * Sound at the common place at least halved. Anything less only adds a kind of place to build and to keep a list of.
 */
export function worthOwnPlace(common: MountPlaceResult, own: MountPlaceResult): boolean {
	if (sameMount(common.mount, own.mount)) return false;
	const gain = rankMount(common).rank - rankMount(own).rank;
	if (gain !== 0) return gain > 0;
	const poor = MOUNT_MEASURES.filter((measure) => common[measure.key] > measure.sound);
	return poor.length > 0 && poor.every(({ key }) => own[key] <= MUCH_BETTER * common[key]);
}

/** The exceptions of a run: those worth a place of their own, and those that keep the common mount and need another remedy. */
export interface ExceptionGroups {
	own: MountResult['exceptions'];
	left: MountResult['exceptions'];
}

export function exceptionGroups(result: Pick<MountResult, 'exceptions' | 'trackers'>): ExceptionGroups {
	const trackers = new Map(result.trackers.map((tracker) => [tracker.trackerId, tracker]));
	const groups: ExceptionGroups = { own: [], left: [] };
	for (const entry of result.exceptions) {
		const tracker = trackers.get(entry.trackerId);
		const worth = tracker !== undefined && worthOwnPlace(tracker.common, tracker.best);
		groups[worth ? 'own' : 'left'].push(entry);
	}
	return groups;
}
