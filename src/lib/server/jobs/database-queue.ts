import { and, asc, eq, lt, or, sql } from 'drizzle-orm';
import { db } from '../db';
import { newId } from '../db/ids';
import { runResults, runs } from '../db/schema';
import type { RunOutcome, RunQueue, TakenRun } from './queue';

/** A run without a sign of life for so long has lost its process, milliseconds. */
export const LEASE_MS = 12_000;

/** A run that took its process down so often is given up. */
const MAX_ATTEMPTS = 3;

/** Bytes of one stored part of a result: the driver doubles it on the wire, and the server takes 16 MB at once. */
const PART_BYTES = 2 * 1024 * 1024;

const stale = () => new Date(Date.now() - LEASE_MS);

const free = () =>
	or(eq(runs.status, 'queued'), and(eq(runs.status, 'working'), lt(runs.heartbeatAt, stale())));

const ours = (run: TakenRun) =>
	and(eq(runs.id, run.id), eq(runs.leaseId, run.leaseId), eq(runs.status, 'working'));

/** The queue as rows of the runs table: what is waiting survives any restart. */
export const databaseQueue: RunQueue = {
	async take() {
		for (;;) {
			const [next] = await db
				.select({ id: runs.id, attempts: runs.attempts, cancelRequested: runs.cancelRequested })
				.from(runs)
				.where(free())
				.orderBy(asc(runs.createdAt), asc(runs.id))
				.limit(1);
			if (!next) return null;
			const now = new Date();
			const leaseId = newId();
			const [taken] = await db
				.update(runs)
				.set({
					status: 'working',
					stage: 'starting',
					progress: 0,
					leaseId,
					startedAt: now,
					heartbeatAt: now,
					attempts: sql`${runs.attempts} + 1`
				})
				.where(and(eq(runs.id, next.id), free()));
			if (taken.affectedRows === 0) continue;
			const [row] = await db
				.select({ id: runs.id, kind: runs.kind, input: runs.input, inputHash: runs.inputHash })
				.from(runs)
				.where(eq(runs.id, next.id));
			if (!row) continue;
			const run: TakenRun = { ...row, leaseId };
			if (next.cancelRequested) await this.finish(run, { status: 'cancelled' });
			else if (next.attempts >= MAX_ATTEMPTS) {
				await this.finish(run, {
					status: 'failed',
					error: `The server ended ${next.attempts} times while this run worked. Make the layout smaller and try again.`
				});
			} else return run;
		}
	},

	async report(run, progress, stage) {
		const [done] = await db.update(runs).set({ progress, stage, heartbeatAt: new Date() }).where(ours(run));
		if (done.affectedRows === 0) return 'lost';
		const [row] = await db
			.select({ cancelRequested: runs.cancelRequested })
			.from(runs)
			.where(eq(runs.id, run.id));
		return row?.cancelRequested ? 'stop' : 'go-on';
	},

	async finish(run, outcome) {
		return db.transaction(async (tx) => {
			const [done] = await tx.update(runs).set(endOf(outcome)).where(ours(run));
			if (done.affectedRows === 0) return false;
			if (outcome.status === 'done') {
				const all = Buffer.from(outcome.gzip.buffer, outcome.gzip.byteOffset, outcome.gzip.byteLength);
				for (let part = 0; part * PART_BYTES < all.byteLength; part += 1) {
					const bytes = all.subarray(part * PART_BYTES, (part + 1) * PART_BYTES);
					await tx.insert(runResults).values({ runId: run.id, part, bytes });
				}
			}
			return true;
		});
	},

	async giveBack(run) {
		await db
			.update(runs)
			.set({
				status: 'queued',
				stage: 'waiting',
				progress: 0,
				leaseId: null,
				startedAt: null,
				attempts: sql`${runs.attempts} - 1`
			})
			.where(ours(run));
	}
};

function endOf(outcome: RunOutcome): Partial<typeof runs.$inferInsert> {
	const finishedAt = new Date();
	switch (outcome.status) {
		case 'done':
			return { status: 'done', progress: 1, stage: 'done', computeMs: outcome.computeMs, finishedAt };
		case 'failed':
			return { status: 'failed', stage: 'failed', error: outcome.error, finishedAt };
		case 'cancelled':
			return { status: 'cancelled', stage: 'cancelled', finishedAt };
	}
}
