import { createHash } from 'node:crypto';
import { afterAll, beforeAll, beforeEach, describe, expect, it, vi } from 'vitest';
import type { RunInput } from '$lib/core/results';
import { CORE_VERSION } from '$lib/core';
import { defaultWinterRule, type RunKind } from '$lib/schema';
import { computeRun } from '$lib/server/compute/compute-run';
import { stopPool } from '$lib/server/compute/pool';
import { partsOf, rangesOf } from '$lib/server/compute/threads';
import { db } from '$lib/server/db';
import { runResults } from '$lib/server/db/schema';
import { startJobs, stopJobs } from '$lib/server/jobs';
import { asc, eq } from 'drizzle-orm';
import { callApi, tokenOf } from './helpers/api';
import { gridLayout, place, squarePlot } from './helpers/field';
import { makePerson } from './helpers/people';
import { useTemporaryDatabase } from './helpers/temporary-database';

useTemporaryDatabase();
vi.setConfig({ testTimeout: 180_000, hookTimeout: 120_000 });

/** Enough trackers for three parts. */
const COLUMNS = 20;
const ROWS = 15;
let token = '';

function input(changes: Partial<RunInput> = {}): RunInput {
	return {
		place,
		plot: squarePlot(400),
		layout: gridLayout(COLUMNS, ROWS),
		winterRule: defaultWinterRule,
		year: 2026,
		stepMinutes: 20,
		utcOffsetMinutes: 60,
		treeYears: 0,
		...changes
	};
}

function control() {
	const stop = new SharedArrayBuffer(4);
	const heard: number[] = [];
	const abort = new AbortController();
	return {
		stop,
		heard,
		abort,
		signal: abort.signal,
		onProgress: (done01: number) => void heard.push(done01)
	};
}

const sha = (bytes: Uint8Array) => createHash('sha256').update(bytes).digest('hex');

beforeAll(async () => {
	token = await tokenOf(await makePerson('Owner'));
});

beforeEach(() => {
	delete process.env.TILTYARD_RUN_THREADS;
});

afterAll(async () => {
	delete process.env.TILTYARD_RUN_THREADS;
	await stopJobs();
	await stopPool();
});

async function makeField() {
	const project = await callApi('POST', '/api/v1/projects', { token, body: { name: 'Field', place } });
	const projectId = project.body.id as string;
	const layouts = await callApi('GET', `/api/v1/projects/${projectId}/layouts`, { token });
	const layoutId = layouts.body.items[0].id as string;
	await callApi('PUT', `/api/v1/layouts/${layoutId}`, {
		token,
		headers: { 'if-match': '"1"' },
		body: { document: gridLayout(COLUMNS, ROWS) }
	});
	return { projectId, layoutId };
}

/** Runs a kind on a new project with the same layout and answers the stored bytes. */
async function storedBytes(kind: RunKind, threads: number): Promise<string> {
	process.env.TILTYARD_RUN_THREADS = String(threads);
	const { projectId, layoutId } = await makeField();
	const asked = await callApi('POST', `/api/v1/projects/${projectId}/runs`, {
		token,
		body: { kind, layoutId, year: 2026, stepMinutes: 20 }
	});
	await vi.waitFor(
		async () => {
			const run = await callApi('GET', `/api/v1/runs/${asked.body.id}`, { token });
			expect(run.body.status).not.toBe('failed');
			expect(run.body.status).toBe('done');
		},
		{ timeout: 120_000, interval: 100 }
	);
	const parts = await db
		.select({ bytes: runResults.bytes })
		.from(runResults)
		.where(eq(runResults.runId, asked.body.id))
		.orderBy(asc(runResults.part));
	return sha(Buffer.concat(parts.map((part) => part.bytes)));
}

describe('a run in parts', () => {
	it('is cut so that the parts follow each other and cover every tracker', () => {
		for (const [trackers, parts] of [
			[1, 1],
			[300, 3],
			[1001, 2],
			[7, 3]
		]) {
			const ranges = rangesOf(trackers, parts);
			expect(ranges[0].from).toBe(0);
			expect(ranges.at(-1)!.to).toBe(trackers);
			for (let k = 1; k < ranges.length; k++) expect(ranges[k].from).toBe(ranges[k - 1].to);
		}
		expect(partsOf('answers', 99)).toBe(1);
		process.env.TILTYARD_RUN_THREADS = '3';
		expect(partsOf('answers', 1000)).toBe(3);
		expect(partsOf('answers', 250)).toBe(2);
		expect(partsOf('mounts', 1000)).toBe(1);
	});

	it.each(['shade', 'answers'] as const)(
		'stores the same bytes of %s on one, two and three threads',
		async (kind) => {
			startJobs();
			const one = await storedBytes(kind, 1);
			expect(await storedBytes(kind, 2)).toBe(one);
			expect(await storedBytes(kind, 3)).toBe(one);
		}
	);

	it('tells progress of all parts together, and its result says its core and its input', async () => {
		process.env.TILTYARD_RUN_THREADS = '2';
		const own = control();
		const packed = await computeRun({ kind: 'answers', input: input(), inputHash: 'abc' }, own);
		expect(packed).not.toBeNull();
		expect(own.heard).toEqual([...own.heard].sort((a, b) => a - b));
		expect(own.heard.some((done) => done > 0 && done < 0.97)).toBe(true);
		const { gunzipSync } = await import('node:zlib');
		const result = JSON.parse(gunzipSync(packed!.gzip).toString()) as Record<string, unknown>;
		expect(Object.keys(result).slice(0, 2)).toEqual(['coreVersion', 'inputHash']);
		expect(result).toMatchObject({ coreVersion: CORE_VERSION, inputHash: 'abc' });
	});

	it('stops every part when it is asked to', async () => {
		process.env.TILTYARD_RUN_THREADS = '3';
		const own = control();
		const long = input({ stepMinutes: 1 });
		const onProgress = () => Atomics.store(new Int32Array(own.stop), 0, 1);
		expect(
			await computeRun({ kind: 'answers', input: long, inputHash: 'abc' }, { ...own, onProgress })
		).toBeNull();
		// All threads are free again at once: a short run goes through.
		const next = control();
		expect(
			await computeRun({ kind: 'shade', input: input({ layout: gridLayout(2, 2) }), inputHash: 'x' }, next)
		).not.toBeNull();
	});

	it('fails as a whole when a part fails, with the others stopped', async () => {
		process.env.TILTYARD_RUN_THREADS = '3';
		const own = control();
		const layout = gridLayout(COLUMNS, ROWS);
		layout.trackers[5].modelId = 'gone';
		await expect(
			computeRun({ kind: 'answers', input: input({ layout }), inputHash: 'abc' }, own)
		).rejects.toThrow(/not in its layout/);
		expect(new Int32Array(own.stop)[0]).toBe(1);
	});
});
