import { spawn, type ChildProcess } from 'node:child_process';
import { createHash } from 'node:crypto';
import { once } from 'node:events';
import { gunzipSync } from 'node:zlib';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { asc, eq } from 'drizzle-orm';
import { computeRun } from '$lib/server/compute/compute-run';
import { stopPool } from '$lib/server/compute/pool';
import { db } from '$lib/server/db';
import { runResults, runs } from '$lib/server/db/schema';
import { LEASE_MS } from '$lib/server/jobs/database-queue';
import { callApi, tokenOf } from './helpers/api';
import { gridLayout, place } from './helpers/field';
import { makePerson } from './helpers/people';
import { useTemporaryDatabase } from './helpers/temporary-database';

useTemporaryDatabase();
vi.setConfig({ testTimeout: 240_000, hookTimeout: 120_000 });

const workers: ChildProcess[] = [];
let token = '';

beforeAll(async () => {
	token = await tokenOf(await makePerson('Owner'));
});

afterAll(async () => {
	for (const worker of workers) worker.kill('SIGKILL');
	await stopPool();
});

/** Another process that works on runs of the same database, ready to. */
async function startWorker(): Promise<ChildProcess> {
	const worker = spawn(process.execPath, ['tests/integration/helpers/work-on-runs.mjs'], {
		stdio: ['ignore', 'pipe', 'inherit'],
		env: { ...process.env, LOG_LEVEL: 'silent', VITEST: '', TILTYARD_RUN_THREADS: '2' }
	});
	workers.push(worker);
	const told = once(worker.stdout!, 'data');
	const died = once(worker, 'exit').then(([code]) => {
		throw new Error(`The process that works on runs ended with ${String(code)} before it was ready`);
	});
	await Promise.race([told, died]);
	died.catch(() => {});
	return worker;
}

const rowOf = async (runId: string) => (await db.select().from(runs).where(eq(runs.id, runId)))[0];

describe('a server that is killed outright while a run works', () => {
	it('leaves it to the next one, which ends it with the bytes that it would have had', async () => {
		const project = await callApi('POST', '/api/v1/projects', { token, body: { name: 'Field', place } });
		const projectId = project.body.id as string;
		const layouts = await callApi('GET', `/api/v1/projects/${projectId}/layouts`, { token });
		const layoutId = layouts.body.items[0].id as string;
		await callApi('PUT', `/api/v1/layouts/${layoutId}`, {
			token,
			headers: { 'if-match': '"1"' },
			body: { document: gridLayout(20, 12) }
		});
		const asked = await callApi('POST', `/api/v1/projects/${projectId}/runs`, {
			token,
			body: { kind: 'answers', layoutId, year: 2026, stepMinutes: 10 }
		});
		const runId = asked.body.id as string;

		const first = await startWorker();
		await vi.waitFor(
			async () => {
				expect((await rowOf(runId)).status).toBe('working');
			},
			{ timeout: 60_000, interval: 20 }
		);
		const gone = once(first, 'exit');
		first.kill('SIGKILL');
		expect((await gone)[1]).toBe('SIGKILL');
		const left = await rowOf(runId);
		expect(left.status).toBe('working');

		await startWorker();
		await vi.waitFor(async () => expect((await rowOf(runId)).status).toBe('done'), {
			timeout: LEASE_MS + 120_000,
			interval: 100
		});
		const done = await rowOf(runId);
		expect(done.attempts).toBe(2);
		expect(done.leaseId).not.toBe(left.leaseId);
		const parts = await db
			.select({ bytes: runResults.bytes })
			.from(runResults)
			.where(eq(runResults.runId, runId))
			.orderBy(asc(runResults.part));
		const stored = Buffer.concat(parts.map((part) => part.bytes));
		const again = await computeRun(
			{ kind: 'answers', input: done.input, inputHash: done.inputHash },
			{ stop: new SharedArrayBuffer(4), signal: new AbortController().signal, onProgress: () => {} }
		);
		const sha = (bytes: Uint8Array) => createHash('sha256').update(bytes).digest('hex');
		expect(sha(stored)).toBe(sha(again!.gzip));
		expect(JSON.parse(gunzipSync(stored).toString())).toMatchObject({ inputHash: done.inputHash });
	});
});
