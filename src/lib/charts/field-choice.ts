import type { Mount } from '$lib/core/document';
import type { MountClass, MountPlaceResult, MountResult, TrackerMounts } from '$lib/core/results';
import { nearestPlace } from './edge-cells';
import { worthOwnPlace } from './own-place';

/** What one place would mean for the whole field. */
export interface FieldChoice {
	mount: Mount;
	counts: Record<MountClass, number>;
	/** Trackers for which it is Clear or Sound. */
	serves: number;
	/** Trackers for which it is worse and their own best place is worth having, with that place. */
	exceptions: { trackerId: string; tag: string; place: MountPlaceResult; commonClass: MountClass }[];
}

export type ClassOf = (place: MountPlaceResult) => MountClass;

/** The result of a tracker at a mount: the candidate nearest to it on that edge. */
export function placeAt(tracker: TrackerMounts, mount: Mount): MountPlaceResult {
	return nearestPlace(tracker.edges, mount) ?? tracker.best;
}

/** Puts one mount on every tracker; where it is worse than Sound, the tracker's own best place stands in if that is worth it. */
export function fieldChoice(result: MountResult, mount: Mount, classOf: ClassOf): FieldChoice {
	const counts: Record<MountClass, number> = { clear: 0, sound: 0, watch: 0, unfit: 0 };
	const exceptions: FieldChoice['exceptions'] = [];
	for (const tracker of result.trackers) {
		const there = placeAt(tracker, mount);
		const kind = classOf(there);
		counts[kind] += 1;
		if ((kind === 'watch' || kind === 'unfit') && worthOwnPlace(there, tracker.best)) {
			exceptions.push({
				trackerId: tracker.trackerId,
				tag: tracker.tag,
				place: tracker.best,
				commonClass: kind
			});
		}
	}
	return { mount, counts, serves: counts.clear + counts.sound, exceptions };
}
