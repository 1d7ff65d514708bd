import { describe, expect, it } from 'vitest';
import type { Layout, Plot, Tracker, TrackerModel } from '$lib/core/document';
import { emptyPlot, modelLibrary } from '$lib/schema';
import { listWords, unlevelReasons } from './level-ground';

const model: TrackerModel = { ...modelLibrary[0], stops: null, maxTiltDeg: 90 };
const tracker = (id: string, change: Partial<Tracker> = {}): Tracker => ({
	id,
	tag: id,
	modelId: model.id,
	eastM: 0,
	northM: 0,
	axisHeightM: null,
	posture: { kind: 'following' },
	...change
});
const layoutOf = (trackers: Tracker[], models = [model]): Layout => ({
	version: 1,
	models,
	trackers,
	mounts: { common: null, exceptions: {}, fromRunId: null }
});

describe('why the top edge may be shaded', () => {
	const level: Plot = emptyPlot();

	it('has no reason on level ground with equal machines that follow', () => {
		expect(unlevelReasons(level, layoutOf([tracker('a'), tracker('b')]))).toEqual([]);
	});

	it('names slope, unlike heights, postures and what stands near', () => {
		const plot: Plot = {
			...level,
			ground: { kind: 'plane', heightM: 0, risePercent: 9, riseTowardsDeg: 90 },
			skyline: [{ azimuthDeg: 100, elevationDeg: 3 }]
		};
		const layout = layoutOf([tracker('a', { axisHeightM: 9 }), tracker('b', { posture: { kind: 'flat' } })]);
		expect(unlevelReasons(plot, layout)).toEqual([
			'the ground rises 9 m in 100 m',
			'the axes stand at different heights',
			'not every tracker follows the sun'
		]);
	});
});

describe('a list in words', () => {
	it('has commas and an and', () => {
		expect([[], ['a'], ['a', 'b'], ['a', 'b', 'c']].map(listWords)).toEqual([
			'',
			'a',
			'a and b',
			'a, b and c'
		]);
	});
});
