import { describe, expect, it } from 'vitest';
import { MOUNT_MEASURES, type MountPlaceResult } from '$lib/core';
import { exceptionGroups, worthOwnPlace } from './own-place';

const [blind] = MOUNT_MEASURES;

function place(alongM: number, blindHours: number, shadedAbove5Hours = 0): MountPlaceResult {
	return {
		mount: { edge: 'top', alongM, outM: 0.08, forwardM: 0.03 },
		shadedHours: blindHours,
		shadedAbove5Hours,
		blindHours,
		longestBlindMinutes: 0,
		longestRunMinutes: 0,
		longestRunDate: null,
		runUpMeanMinutes: 0,
		runUpWorstMinutes: 0,
		blindByMonth: Array<number>(12).fill(0)
	};
}

describe('a place of its own', () => {
	it('is worth it for a better class', () => {
		expect(worthOwnPlace(place(0, blind.watch + 1), place(1, blind.watch - 1))).toBe(true);
		expect(worthOwnPlace(place(0, blind.sound + 1), place(1, blind.sound - 1))).toBe(true);
	});

	it('is not worth it for a little less of the same class', () => {
		expect(worthOwnPlace(place(0, blind.watch), place(1, blind.watch - 2))).toBe(false);
		expect(worthOwnPlace(place(0, 4 * blind.watch), place(1, 3 * blind.watch))).toBe(false);
	});

	it('is worth it in the same class when all that was poor is halved', () => {
		expect(worthOwnPlace(place(0, 4 * blind.watch), place(1, 2 * blind.watch))).toBe(true);
		// One poor measure halved and another left as it was is no gain.
		expect(worthOwnPlace(place(0, 4 * blind.watch, 200), place(1, 2 * blind.watch, 200))).toBe(false);
	});

	it('is never the common place itself', () => {
		expect(worthOwnPlace(place(0, 90), place(0, 90))).toBe(false);
	});

	it('parts the exceptions of a run, each in one group', () => {
		const tracker = (id: string, common: MountPlaceResult, best: MountPlaceResult) => ({
			trackerId: id,
			tag: id,
			edges: { top: [common, best], right: [], bottom: [], left: [] },
			best,
			bestClass: 'watch' as const,
			bestReason: '',
			common,
			commonClass: 'watch' as const,
			commonReason: ''
		});
		const trackers = [
			tracker('gains', place(0, blind.watch), place(1, 1)),
			tracker('same', place(0, blind.watch), place(1, blind.watch - 1))
		];
		const exceptions = trackers.map((one) => ({
			trackerId: one.trackerId,
			tag: one.tag,
			mount: one.best.mount,
			class: one.bestClass,
			reason: ''
		}));
		const { own, left } = exceptionGroups({ exceptions, trackers });
		expect(own.map((entry) => entry.tag)).toEqual(['gains']);
		expect(left.map((entry) => entry.tag)).toEqual(['same']);
	});
});
