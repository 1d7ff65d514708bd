import { promisify } from 'node:util';
import { gunzip } from 'node:zlib';
import { asc, eq } from 'drizzle-orm';
import type { MountResult, ShadeResult } from '$lib/core/results';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { runResults } from '../db/schema';
import { AppError } from '../errors';
import { findRun } from './find-run';

const unpack = promisify(gunzip);

/** Packed result of a finished run, as stored: gzip of JSON. `etag` names it: the same inputs give the same bytes. */
export async function getPackedResult(actor: Actor, runId: string): Promise<{ gzip: Buffer; etag: string }> {
	const run = await findRun(actor, runId, 'run.read');
	if (run.status !== 'done') {
		throw new AppError('conflict', `The run has no result: it is ${run.status}.`);
	}
	const parts = await db
		.select({ bytes: runResults.bytes })
		.from(runResults)
		.where(eq(runResults.runId, runId))
		.orderBy(asc(runResults.part));
	return { gzip: Buffer.concat(parts.map((part) => part.bytes)), etag: run.inputHash };
}

/** JSON text of a finished run's result. */
export async function unpackResult(gzip: Buffer): Promise<string> {
	return (await unpack(gzip)).toString('utf8');
}

/** The result of a finished shade run. */
export async function getShadeResult(actor: Actor, runId: string): Promise<ShadeResult> {
	return JSON.parse(await resultText(actor, runId, 'shade')) as ShadeResult;
}

/** The result of a finished mount run. */
export async function getMountResult(actor: Actor, runId: string): Promise<MountResult> {
	return JSON.parse(await resultText(actor, runId, 'mounts')) as MountResult;
}

async function resultText(actor: Actor, runId: string, kind: 'shade' | 'mounts'): Promise<string> {
	const run = await findRun(actor, runId, 'run.read');
	if (run.kind !== kind) throw new AppError('conflict', `This run is of another kind: ${run.kind}.`);
	return unpackResult((await getPackedResult(actor, runId)).gzip);
}
