import type { Run } from '$lib/schema/run';
import type { Actor } from '../auth/actor';
import { findRun } from './find-run';
import { runView } from './run-view';

export async function getRun(actor: Actor, runId: string): Promise<Run> {
	return runView(await findRun(actor, runId, 'run.read'));
}
