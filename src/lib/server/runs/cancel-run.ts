import type { Run } from '$lib/schema/run';
import type { Actor } from '../auth/actor';
import { findRun } from './find-run';
import { getRun } from './get-run';
import { stopRun } from './stop-runs';

/** Stops a run that waits or works, and answers how it stands then. One that has ended stays as it is. */
export async function cancelRun(actor: Actor, runId: string): Promise<Run> {
	await findRun(actor, runId, 'run.cancel');
	await stopRun(runId);
	return getRun(actor, runId);
}
