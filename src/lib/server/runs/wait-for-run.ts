import type { Run } from '$lib/schema/run';
import type { Actor } from '../auth/actor';
import { AppError } from '../errors';
import { getRun } from './get-run';

const LOOK_EVERY_MS = 50;

/** Waits until a run is done. Throws when it ends in another way or takes longer than `patienceMs`. */
export async function waitForRun(actor: Actor, runId: string, patienceMs: number): Promise<Run> {
	const until = Date.now() + patienceMs;
	for (;;) {
		const run = await getRun(actor, runId);
		if (run.status === 'done') return run;
		if (run.status !== 'queued' && run.status !== 'working') {
			throw new AppError('conflict', `The run has ${run.status}${run.error ? `: ${run.error}` : ''}.`);
		}
		if (Date.now() > until) throw new AppError('unavailable', 'The run takes longer than it was given.');
		await new Promise((resume) => setTimeout(resume, LOOK_EVERY_MS));
	}
}
