import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { gzipSync } from 'node:zlib';
import { eq } from 'drizzle-orm';
import type { RunEvent } from '$lib/schema';
import { CORE_VERSION, shadeYear } from '$lib/core';
import { db } from '$lib/server/db';
import { runResults, runs } from '$lib/server/db/schema';
import { databaseQueue, LEASE_MS } from '$lib/server/jobs/database-queue';
import { startJobs, stopJobs } from '$lib/server/jobs';
import { roundedJson } from '$lib/server/compute/rounded-json';
import { callApi, callApiRaw, tokenOf } from './helpers/api';
import { gridLayout, place } from './helpers/field';
import { makePerson } from './helpers/people';
import { useTemporaryDatabase } from './helpers/temporary-database';

useTemporaryDatabase();
vi.setConfig({ testTimeout: 90_000, hookTimeout: 120_000 });

let token = '';

beforeAll(async () => {
	token = await tokenOf(await makePerson('Owner'));
});

afterAll(async () => {
	await stopJobs();
});

async function makeField(columns: number, rows: number) {
	const project = await callApi('POST', '/api/v1/projects', { token, body: { name: 'Field', place } });
	const projectId = project.body.id as string;
	const layouts = await callApi('GET', `/api/v1/projects/${projectId}/layouts`, { token });
	const layoutId = layouts.body.items[0].id as string;
	const saved = await callApi('PUT', `/api/v1/layouts/${layoutId}`, {
		token,
		headers: { 'if-match': '"1"' },
		body: { document: gridLayout(columns, rows) }
	});
	expect(saved.status).toBe(200);
	return { projectId, layoutId };
}

async function ask(field: { projectId: string; layoutId: string }, request: Record<string, unknown> = {}) {
	return callApi('POST', `/api/v1/projects/${field.projectId}/runs`, {
		token,
		body: { kind: 'shade', layoutId: field.layoutId, year: 2026, ...request }
	});
}

const read = async (runId: string) => (await callApi('GET', `/api/v1/runs/${runId}`, { token })).body;

const until = (runId: string, status: string) =>
	vi.waitFor(
		async () => {
			const run = await read(runId);
			expect(run.status).toBe(status);
			return run;
		},
		{ timeout: 60_000, interval: 50 }
	);

describe('a shade run', () => {
	it('waits while nobody works, and is answered at once', async () => {
		const field = await makeField(2, 2);
		const asked = await ask(field);
		expect(asked.status).toBe(202);
		expect(asked.body).toMatchObject({
			status: 'queued',
			progress: 0,
			outOfDate: false,
			coreVersion: CORE_VERSION
		});
		expect((await callApi('GET', `/api/v1/runs/${asked.body.id}/result`, { token })).status).toBe(409);
		const cancelled = await callApi('POST', `/api/v1/runs/${asked.body.id}/cancel`, { token });
		expect(cancelled.body.status).toBe('cancelled');
	});

	it('stores what the core computes from the same input, and hands it out packed or plain', async () => {
		startJobs();
		const field = await makeField(3, 2);
		const asked = await ask(field);
		const done = await until(asked.body.id, 'done');
		expect(done.computeMs).toBeGreaterThan(0);
		const [row] = await db.select({ input: runs.input }).from(runs).where(eq(runs.id, asked.body.id));
		expect(row.input.utcOffsetMinutes).toBe(60);
		const plain = await callApi('GET', `/api/v1/runs/${asked.body.id}/result`, { token });
		const { coreVersion, ...found } = shadeYear(row.input)!;
		expect(plain.text).toBe(roundedJson({ coreVersion, inputHash: asked.body.inputHash, ...found }));
		expect(plain.body.trackers).toHaveLength(6);
		const packed = await callApiRaw('GET', `/api/v1/runs/${asked.body.id}/result`, {
			token,
			headers: { 'accept-encoding': 'gzip' }
		});
		expect(packed.headers.get('content-encoding')).toBe('gzip');
		const again = await callApi('GET', `/api/v1/runs/${asked.body.id}/result`, {
			token,
			headers: { 'if-none-match': packed.headers.get('etag')! }
		});
		expect(again.status).toBe(304);
	});

	it('of an older core still opens, and a plan is issued from it', async () => {
		startJobs();
		const field = await makeField(2, 1);
		const done = await until((await ask(field)).body.id, 'done');
		const path = `/api/v1/runs/${done.id}/result`;
		const newer = (await callApi('GET', path, { token })).body;
		// As it was stored before results told their input and before runs could ask for energy.
		const older = { ...newer, coreVersion: '0.1.0' };
		delete older.inputHash;
		delete older.energy;
		const [{ input }] = await db.select({ input: runs.input }).from(runs).where(eq(runs.id, done.id));
		expect(input).not.toHaveProperty('energy');
		await db.update(runs).set({ coreVersion: '0.1.0' }).where(eq(runs.id, done.id));
		const stored = eq(runResults.runId, done.id);
		await db.delete(runResults).where(stored);
		await db.insert(runResults).values({ runId: done.id, part: 0, bytes: gzipSync(JSON.stringify(older)) });

		const opened = await callApi('GET', path, { token });
		expect(opened.status).toBe(200);
		expect(opened.body).toEqual(older);
		expect(await read(done.id)).toMatchObject({ status: 'done', energy: null, coreVersion: '0.1.0' });
		const plan = await callApi('POST', `/api/v1/projects/${field.projectId}/plans`, {
			token,
			body: { layoutId: field.layoutId, reason: 'From an older result' }
		});
		expect(plan.status).toBe(201);
	});

	it('is not computed twice: identical inputs answer the stored run, also after the layout came back', async () => {
		startJobs();
		const field = await makeField(2, 1);
		const first = await ask(field);
		await until(first.body.id, 'done');
		expect((await ask(field)).body).toMatchObject({ id: first.body.id, status: 'done' });
		const path = `/api/v1/layouts/${field.layoutId}`;
		const original = gridLayout(2, 1);
		const moved = structuredClone(original);
		moved.trackers[0].eastM += 1;
		await callApi('PUT', path, { token, headers: { 'if-match': '"2"' }, body: { document: moved } });
		expect((await read(first.body.id)).outOfDate).toBe(true);
		const second = await ask(field);
		expect(second.body.id).not.toBe(first.body.id);
		await callApi('PUT', path, { token, headers: { 'if-match': '"3"' }, body: { document: original } });
		expect((await read(first.body.id)).outOfDate).toBe(false);
		expect((await ask(field)).body.id).toBe(first.body.id);
	});

	it('is not out of date when only a mount was chosen, and is when the plot or the place changed', async () => {
		startJobs();
		const field = await makeField(2, 1);
		const run = await until((await ask(field)).body.id, 'done');
		const chosen = gridLayout(2, 1);
		chosen.mounts.common = { edge: 'top', alongM: 0, outM: 0.08, forwardM: 0.03 };
		await callApi('PUT', `/api/v1/layouts/${field.layoutId}`, {
			token,
			headers: { 'if-match': '"2"' },
			body: { document: chosen }
		});
		expect((await read(run.id)).outOfDate).toBe(false);
		await callApi('PATCH', `/api/v1/projects/${field.projectId}`, {
			token,
			body: { place: { ...place, latitudeDeg: 42 } }
		});
		expect((await read(run.id)).outOfDate).toBe(true);
	});

	it('tells its progress in events that end with its end', async () => {
		startJobs();
		const field = await makeField(8, 8);
		const asked = await ask(field, { stepMinutes: 2 });
		const response = await callApiRaw('GET', `/api/v1/runs/${asked.body.id}/events`, { token });
		expect(response.headers.get('content-type')).toBe('text/event-stream');
		const events = (await response.text())
			.split('\n\n')
			.filter((block) => block.startsWith('data: '))
			.map((block) => JSON.parse(block.slice(6)) as RunEvent);
		expect(events.at(-1)).toMatchObject({ status: 'done', progress: 1 });
		const fractions = events.map((event) => event.progress);
		expect(fractions).toEqual([...fractions].sort((a, b) => a - b));
		expect(fractions.some((fraction) => fraction > 0 && fraction < 1)).toBe(true);
	});

	it('stops when it is cancelled while it works, and leaves no result', async () => {
		startJobs();
		const field = await makeField(30, 20);
		const asked = await ask(field, { kind: 'mounts', stepMinutes: 1 });
		await until(asked.body.id, 'working');
		const cancelled = await callApi('POST', `/api/v1/runs/${asked.body.id}/cancel`, { token });
		expect(cancelled.body.status).toBe('cancelled');
		expect((await callApi('GET', `/api/v1/runs/${asked.body.id}/result`, { token })).status).toBe(409);
		const anew = await ask(field, { kind: 'mounts', stepMinutes: 1 });
		expect(anew.body.id).not.toBe(asked.body.id);
		await callApi('POST', `/api/v1/runs/${anew.body.id}/cancel`, { token });
	});

	it('is put back when the server stops in the middle, and finished by the next one', async () => {
		startJobs();
		const field = await makeField(12, 10);
		const asked = await ask(field, { kind: 'mounts', stepMinutes: 2 });
		await until(asked.body.id, 'working');
		await stopJobs();
		expect((await read(asked.body.id)).status).toBe('queued');
		await db
			.update(runs)
			.set({ input: { ...(await inputOf(asked.body.id)), stepMinutes: 20 } })
			.where(eq(runs.id, asked.body.id));
		startJobs();
		await until(asked.body.id, 'done');
	});

	it('is taken up again when its process died without a word', async () => {
		await stopJobs();
		const field = await makeField(2, 2);
		const asked = await ask(field);
		const taken = await databaseQueue.take();
		expect(taken?.id).toBe(asked.body.id);
		expect(await databaseQueue.take()).toBeNull();
		await db
			.update(runs)
			.set({ heartbeatAt: new Date(Date.now() - LEASE_MS - 1000) })
			.where(eq(runs.id, asked.body.id));
		startJobs();
		await until(asked.body.id, 'done');
		const late = await databaseQueue.finish(taken!, { status: 'failed', error: 'too late' });
		expect(late).toBe(false);
		expect((await read(asked.body.id)).status).toBe('done');
	});

	it('is given up after it has taken its process down three times', async () => {
		await stopJobs();
		const field = await makeField(1, 2);
		const asked = await ask(field);
		await db.update(runs).set({ attempts: 3 }).where(eq(runs.id, asked.body.id));
		expect(await databaseQueue.take()).toBeNull();
		const run = await read(asked.body.id);
		expect(run.status).toBe('failed');
		expect(run.error).toMatch(/smaller/);
	});
});

const inputOf = async (runId: string) =>
	(await db.select({ input: runs.input }).from(runs).where(eq(runs.id, runId)))[0].input;

describe('asking for a run', () => {
	it('is refused for a layout with no tracker, of another project, or with terms out of range', async () => {
		const field = await makeField(1, 1);
		const other = await makeField(1, 1);
		const empty = await callApi('POST', `/api/v1/projects/${field.projectId}/layouts`, {
			token,
			body: { name: 'Empty' }
		});
		const refusedEmpty = await ask({ ...field, layoutId: empty.body.id });
		expect(refusedEmpty.status).toBe(422);
		expect(refusedEmpty.body.errors[0]).toMatchObject({ path: 'layoutId' });
		expect((await ask({ ...field, layoutId: other.layoutId })).status).toBe(422);
		const terms = await ask(field, { stepMinutes: 60, year: 3000, treeYears: -1 });
		expect(terms.body.errors.map((one: { path: string }) => one.path).sort()).toEqual([
			'stepMinutes',
			'treeYears',
			'year'
		]);
	});

	it('lists runs of a project by kind and layout, newest first', async () => {
		const field = await makeField(1, 2);
		const shade = await ask(field);
		const mounts = await ask(field, { kind: 'mounts' });
		const all = await callApi('GET', `/api/v1/projects/${field.projectId}/runs`, { token });
		expect(all.body.items.map((run: { id: string }) => run.id)).toEqual([mounts.body.id, shade.body.id]);
		const some = await callApi('GET', `/api/v1/projects/${field.projectId}/runs?kind=shade&limit=1`, {
			token
		});
		expect(some.body.items.map((run: { id: string }) => run.id)).toEqual([shade.body.id]);
		expect(some.body.nextCursor).toBeNull();
	});
});
