import { describe, expect, it } from 'vitest';
import type { Layout, Mount, MountPlaceResult, MountResult, Plot } from '$lib/core';
import { emptyLayout, emptyPlot, modelLibrary } from '$lib/schema';
import type { Run } from '$lib/schema/run';
import { openPoints } from './open-points';

const model = modelLibrary[1];
const land: Plot = {
	...emptyPlot(),
	boundary: [
		{
			outer: [
				[-50, -50],
				[50, -50],
				[50, 50],
				[-50, 50]
			],
			holes: []
		}
	]
};
const tree = {
	id: 'tree',
	kind: 'tree',
	name: 'Cypress',
	eastM: 30,
	northM: 30,
	heightM: 9,
	crownBaseM: 2,
	crownRadiusM: 2,
	trunkRadiusM: 0.2,
	crownTransmission: 0.1,
	growthMPerYear: 0.3,
	maxHeightM: 15
} as const;
const mount = { edge: 'top', alongM: 0, outM: 0.08, forwardM: 0.03 } as const;
const layout: Layout = {
	...emptyLayout(),
	models: [model],
	trackers: [
		{
			id: 'a',
			tag: 'A01',
			modelId: model.id,
			eastM: 0,
			northM: 0,
			axisHeightM: null,
			posture: { kind: 'following' }
		}
	],
	mounts: { common: mount, exceptions: {}, fromRunId: null }
};
const done = (over: Partial<Run> = {}): Run => ({
	id: 'r',
	projectId: 'p',
	kind: 'shade',
	status: 'done',
	progress: 1,
	stage: '',
	layoutId: 'l',
	layoutRevision: 1,
	plotRevision: 1,
	year: 2026,
	stepMinutes: 10,
	treeYears: 0,
	energy: null,
	inputHash: 'x',
	coreVersion: '1',
	createdAt: '2026-01-01T00:00:00Z',
	startedAt: null,
	finishedAt: null,
	computeMs: 1,
	error: null,
	outOfDate: false,
	...over
});
const settled = {
	shade: done(),
	mounts: done({ kind: 'mounts' }),
	verdict: null,
	mountResult: null,
	choiceStands: true
};

describe('open points before issue', () => {
	it('are none when layout, runs and mount are settled', () => {
		expect(openPoints(land, layout, settled)).toEqual([]);
	});

	it('name a missing and an out-of-date shade run', () => {
		expect(openPoints(land, layout, { ...settled, shade: null })).toEqual([
			'No shade run was made for this layout.'
		]);
		const [late] = openPoints(land, layout, { ...settled, shade: done({ outOfDate: true }) });
		expect(late).toMatch(/out of date/);
	});

	it('name a mount that is not chosen, and those trackers that have none', () => {
		const none = { ...layout, mounts: { common: null, exceptions: {}, fromRunId: null } };
		expect(openPoints(land, none, settled)).toEqual(['No sensor mount is chosen.']);
		const second = { ...layout.trackers[0], id: 'b', tag: 'A02', eastM: 20 };
		const part = {
			...none,
			trackers: [layout.trackers[0], second],
			mounts: { ...none.mounts, exceptions: { a: mount } }
		};
		expect(openPoints(land, part, settled)).toEqual(['No sensor mount is chosen for A02.']);
	});

	it('name a choice that was made from a run of an earlier layout', () => {
		expect(openPoints(land, layout, { ...settled, choiceStands: false })).toEqual([
			'The mount was chosen from an earlier sensor run: look at the newer one and choose again.'
		]);
	});

	it('carry the findings of the layout and a broken winter rule', () => {
		const near = { ...layout.trackers[0], id: 'b', tag: 'A02', eastM: 3 };
		const points = openPoints(
			land,
			{ ...layout, trackers: [layout.trackers[0], near] },
			{
				...settled,
				verdict: {
					rule: { kind: 'clear-above', elevationDeg: 12 },
					date: '2026-12-21',
					met: false,
					clearAboveDeg: 20,
					judgedMinutes: 240,
					brokenBy: [{ trackerId: 'a', tag: 'A01', shadedUpToDeg: 20, minutes: 60 }]
				}
			}
		);
		expect(points.some((point) => point.includes('A01 and A02') && point.includes('overlap'))).toBe(true);
		expect(points).toContain('The winter rule is not met: 1 tracker breaks it: A01.');
	});

	it('name every rule breaker, and the age of the trees that the run was made with', () => {
		const tags = Array.from({ length: 14 }, (_, i) => `B${String(i + 1).padStart(2, '0')}`);
		const verdict = {
			rule: { kind: 'clear-above', elevationDeg: 12 } as const,
			date: '2026-12-21',
			met: false,
			clearAboveDeg: 20,
			judgedMinutes: 240,
			brokenBy: tags.map((tag) => ({ trackerId: tag, tag, shadedUpToDeg: 20, minutes: 60 }))
		};
		const grove: Plot = { ...land, obstacles: [tree] };
		const [point] = openPoints(grove, layout, { ...settled, verdict, shade: done({ treeYears: 10 }) });
		expect(point).toBe(
			`The winter rule is not met: 14 trackers break it (with trees 10 years older): ${tags.join(', ')}.`
		);
		expect(openPoints(grove, layout, { ...settled, verdict })[0]).not.toContain('older');
	});

	it('name the chosen mounts that the sensor run calls unfit or to be watched, and those that it never looked at', () => {
		const place = (at: Mount, blindHours: number): MountPlaceResult => ({
			mount: at,
			shadedHours: blindHours,
			shadedAbove5Hours: 0,
			blindHours,
			longestBlindMinutes: 0,
			longestRunMinutes: 0,
			longestRunDate: null,
			runUpMeanMinutes: 0,
			runUpWorstMinutes: 0,
			blindByMonth: []
		});
		const aside: Mount = { ...mount, alongM: 0.6 };
		// Limits of blind hours a year: clear 5, sound 15, watch 40.
		const trackers = (
			[
				['F01', 2, 1],
				['F02', 100, 90],
				['F03', 30, 2],
				['F04', 100, 2],
				['F05', 1, 1]
			] as const
		).map(([tag, common, other], i) => ({ id: tag, tag, common, other, eastM: i * 20 - 40 }));
		const result: MountResult = {
			coreVersion: 'test',
			levelGroundTruth: false,
			common: mount,
			commonClassCounts: { clear: 2, sound: 0, watch: 1, unfit: 2 },
			commonServesShare: 0.4,
			exceptions: [],
			trackers: trackers.map(({ tag, common, other }) => ({
				trackerId: tag,
				tag,
				edges: { top: [place(mount, common), place(aside, other)], bottom: [], left: [], right: [] },
				best: place(aside, other),
				bestClass: 'clear',
				bestReason: '',
				common: place(mount, common),
				commonClass: 'clear',
				commonReason: ''
			}))
		};
		const field: Layout = {
			...layout,
			trackers: trackers.map(({ tag, eastM }) => ({ ...layout.trackers[0], id: tag, tag, eastM })),
			mounts: { common: mount, exceptions: { F04: aside, F05: { ...mount, outM: 0.3 } }, fromRunId: null }
		};
		expect(openPoints(land, field, { ...settled, mountResult: result })).toEqual([
			'1 sensor mount is Unfit: F02.',
			'1 sensor mount is Watch: F03.',
			'1 sensor mount is at a place that no run computed: F05.'
		]);
		const all = { ...field, mounts: { common: mount, exceptions: {}, fromRunId: null } };
		expect(openPoints(land, all, { ...settled, mountResult: result })[0]).toBe(
			'2 sensor mounts are Unfit: F02, F04.'
		);
	});
});
