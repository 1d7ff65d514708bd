import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type { Run, RunEvent } from '$lib/schema';
import { readEvent, type RunAnswer, type RunApi } from './run-api';
import { RunWatch } from './run-watch.svelte';

function aRun(change: Partial<Run> = {}): Run {
	return {
		id: 'run-1',
		projectId: 'project-1',
		kind: 'shade',
		status: 'working',
		progress: 0.25,
		stage: 'Computing',
		layoutId: 'layout-1',
		layoutRevision: 3,
		plotRevision: 2,
		year: 2026,
		stepMinutes: 10,
		treeYears: 0,
		energy: null,
		inputHash: 'abc',
		coreVersion: '1',
		createdAt: '2026-01-01T00:00:00Z',
		startedAt: null,
		finishedAt: null,
		computeMs: null,
		error: null,
		outOfDate: false,
		...change
	};
}

class FakeApi implements RunApi {
	stored: Run = aRun();
	startAnswer: RunAnswer<Run> | null = null;
	reads = 0;
	followers = 0;
	emit: (event: RunEvent) => void = () => {};
	breakLine: () => void = () => {};

	start = async (): Promise<RunAnswer<Run>> => this.startAnswer ?? { ok: true, value: this.stored };
	read = async (): Promise<RunAnswer<Run>> => {
		this.reads += 1;
		return { ok: true, value: this.stored };
	};
	cancel = async (): Promise<RunAnswer<Run>> => {
		this.stored = { ...this.stored, status: 'cancelled' };
		return { ok: true, value: this.stored };
	};
	result = async (id: string): Promise<RunAnswer<unknown>> => ({ ok: true, value: { of: id } });
	follow(_id: string, onEvent: (event: RunEvent) => void, onLost: () => void) {
		this.followers += 1;
		this.emit = onEvent;
		this.breakLine = onLost;
		return () => (this.followers -= 1);
	}
}

const settled = () => vi.advanceTimersByTimeAsync(0);

describe('RunWatch', () => {
	beforeEach(() => void vi.useFakeTimers());
	afterEach(() => void vi.useRealTimers());

	it('follows a started run to its result', async () => {
		const api = new FakeApi();
		const watch = new RunWatch<{ of: string }>('project-1', 'shade', api);
		await watch.start({ layoutId: 'layout-1' });
		expect(watch.working).toBe(true);
		api.emit({ status: 'working', progress: 0.5, stage: 'March' });
		expect(watch.run?.progress).toBe(0.5);
		expect(watch.run?.stage).toBe('March');
		api.stored = aRun({ status: 'done', progress: 1 });
		api.emit({ status: 'done', progress: 1, stage: '' });
		await settled();
		expect(watch.working).toBe(false);
		expect(watch.result).toEqual({ of: 'run-1' });
		expect(api.followers).toBe(0);
	});

	it('takes up a run that was underway before the page was loaded', async () => {
		const api = new FakeApi();
		const watch = new RunWatch('project-1', 'shade', api);
		await watch.resume(aRun({ progress: 0.4 }));
		expect(watch.run?.progress).toBe(0.4);
		expect(api.followers).toBe(1);
	});

	it('fetches the result of a run that was done before', async () => {
		const watch = new RunWatch<{ of: string }>('project-1', 'shade', new FakeApi());
		await watch.resume(aRun({ status: 'done' }));
		expect(watch.result).toEqual({ of: 'run-1' });
	});

	it('asks every second once the line of events is broken', async () => {
		const api = new FakeApi();
		const watch = new RunWatch('project-1', 'shade', api);
		await watch.resume(aRun());
		api.breakLine();
		api.stored = aRun({ progress: 0.7 });
		await vi.advanceTimersByTimeAsync(1000);
		expect(watch.run?.progress).toBe(0.7);
		api.stored = aRun({ status: 'done' });
		await vi.advanceTimersByTimeAsync(1000);
		expect(watch.result).toEqual({ of: 'run-1' });
		const reads = api.reads;
		await vi.advanceTimersByTimeAsync(5000);
		expect(api.reads).toBe(reads);
	});

	it('cancels a run and keeps no follower', async () => {
		const api = new FakeApi();
		const watch = new RunWatch('project-1', 'shade', api);
		await watch.resume(aRun());
		await watch.cancel();
		expect(watch.run?.status).toBe('cancelled');
		expect(watch.working).toBe(false);
		expect(api.followers).toBe(0);
	});

	it('shows why a run was refused and keeps the run that stood before', async () => {
		const api = new FakeApi();
		const watch = new RunWatch('project-1', 'shade', api);
		await watch.resume(aRun({ status: 'done' }));
		api.startAnswer = {
			ok: false,
			message: 'No tracker.',
			fields: [{ path: 'year', message: 'Too early.' }]
		};
		await watch.start({ layoutId: 'layout-1', year: 12 });
		expect(watch.message).toBe('No tracker.');
		expect(watch.fields).toEqual([{ path: 'year', message: 'Too early.' }]);
		expect(watch.result).not.toBeNull();
	});

	it('learns that its run is out of date without fetching the result again', async () => {
		const api = new FakeApi();
		const fetched = vi.spyOn(api, 'result');
		const watch = new RunWatch('project-1', 'shade', api);
		await watch.resume(aRun({ status: 'done' }));
		api.stored = aRun({ status: 'done', outOfDate: true });
		await watch.refresh();
		expect(watch.run?.outOfDate).toBe(true);
		await watch.resume(aRun({ status: 'done', outOfDate: false }));
		expect(watch.run?.outOfDate).toBe(false);
		expect(fetched).toHaveBeenCalledTimes(1);
	});

	it('stops asking when the page is left', async () => {
		const api = new FakeApi();
		const watch = new RunWatch('project-1', 'shade', api);
		await watch.resume(aRun());
		api.breakLine();
		watch.close();
		await vi.advanceTimersByTimeAsync(5000);
		expect(api.reads).toBe(0);
	});
});

describe('run events', () => {
	it('reads an event and passes over what is none', () => {
		expect(readEvent('{"status":"working","progress":0.5,"stage":"March"}')).toEqual({
			status: 'working',
			progress: 0.5,
			stage: 'March'
		});
		expect(readEvent('{"status":"working"}')).toBeNull();
		expect(readEvent('null')).toBeNull();
		expect(readEvent('cut {')).toBeNull();
	});
});
