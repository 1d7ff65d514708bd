import { describe, expect, it } from 'vitest';
import type { Layout, Plot } from '$lib/core';
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
});
