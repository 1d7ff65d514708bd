import { describe, expect, it } from 'vitest';
import { MOUNT_MEASURES, mountYear, type Layout, type MountPlaceResult } from '$lib/core';
import { emptyPlot, modelLibrary } from '$lib/schema';
import { fieldChoice, placeAt } from './field-choice';
import { classOf, measuresOf, thresholdRows } from './mount-measures';

const calm: MountPlaceResult = {
	mount: { edge: 'top', alongM: 0, outM: 0.08, forwardM: 0.03 },
	shadedHours: 1,
	shadedAbove5Hours: 0,
	blindHours: 0,
	longestBlindMinutes: 0,
	longestRunMinutes: 0,
	longestRunDate: null,
	runUpMeanMinutes: 0,
	runUpWorstMinutes: 0,
	blindByMonth: Array<number>(12).fill(0)
};

describe('the measures of a mount', () => {
	it('give the place the worst of their classes, never an average', () => {
		expect(classOf(calm)).toBe('clear');
		for (const measure of MOUNT_MEASURES) {
			const spoiled = { ...calm, [measure.key]: measure.watch + 1 };
			expect(classOf(spoiled)).toBe('unfit');
			const rows = measuresOf(spoiled);
			expect(rows.find((row) => row.key === measure.key)?.class).toBe('unfit');
			expect(rows.filter((row) => row.class === 'unfit')).toHaveLength(1);
		}
	});

	it('say when the longest run was', () => {
		const place = { ...calm, longestRunMinutes: 14, longestRunDate: '2026-01-09' };
		expect(measuresOf(place).find((row) => row.key === 'longestRunMinutes')?.value).toBe(
			'14\u00a0min · 9 January'
		);
	});

	it('list every limit once', () => {
		expect(thresholdRows).toHaveLength(MOUNT_MEASURES.length);
		expect(thresholdRows[0].cells).toEqual(['to 5', 'to 15', 'to 40', 'above 40']);
	});
});

describe('one place for a field', () => {
	const model = modelLibrary[1];
	const layout: Layout = {
		version: 1,
		models: [model],
		trackers: [0, 1, 2].map((i) => ({
			id: `t${i}`,
			tag: `A0${i + 1}`,
			modelId: model.id,
			eastM: i * 12,
			northM: 0,
			axisHeightM: null,
			posture: { kind: 'following' }
		})),
		mounts: { common: null, exceptions: {}, fromRunId: null }
	};
	const result = mountYear(
		{
			place: {
				latitudeDeg: 41.2,
				longitudeDeg: 14.5,
				altitudeM: 0,
				timeZone: 'Europe/Rome',
				magneticDeclinationDeg: 0
			},
			plot: emptyPlot(),
			layout,
			winterRule: { kind: 'clear-above', elevationDeg: 12 },
			year: 2026,
			stepMinutes: 20,
			utcOffsetMinutes: 60,
			treeYears: 0
		},
		{ spacingM: 0.5 }
	);
	if (!result) throw new Error('The run was not cancelled and must have a result.');

	it('agrees with the core about the core\u2019s own common mount', () => {
		expect(fieldChoice(result, result.common, classOf).counts).toEqual(result.commonClassCounts);
		for (const tracker of result.trackers) {
			expect(placeAt(tracker, result.common)).toEqual(tracker.common);
			expect(classOf(tracker.best)).toBe(tracker.bestClass);
		}
	});

	it('names trackers for which a worse place needs an exception', () => {
		const bottom = fieldChoice(result, { edge: 'bottom', alongM: 0, outM: 0.08, forwardM: 0.03 }, classOf);
		expect(bottom.serves).toBeLessThan(3);
		expect(bottom.exceptions).toHaveLength(3 - bottom.serves);
		for (const entry of bottom.exceptions) expect(entry.place.mount.edge).toBe('top');
	});
});
