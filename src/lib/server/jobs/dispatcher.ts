import { computePool, stopPool } from '../compute/pool';
import { RUNS_AT_ONCE } from '../compute/threads';
import { logger } from '../log';
import { databaseQueue } from './database-queue';
import { workOnRun, type WorkingRun } from './work-on-run';

/** How often to look for runs that another process left behind, milliseconds. */
const LOOK_EVERY_MS = 3_000;

interface Dispatcher {
	working: Map<string, WorkingRun>;
	looking: Promise<void> | null;
	again: boolean;
	closing: boolean;
	timer: NodeJS.Timeout;
}

/** Kept across reloads of the development server. */
const holder = globalThis as typeof globalThis & { tiltyardDispatcher?: Dispatcher };

/** Starts to work on runs in this process. Safe to call twice. */
export function startJobs(): void {
	if (holder.tiltyardDispatcher) return;
	const timer = setInterval(wakeJobs, LOOK_EVERY_MS);
	timer.unref();
	holder.tiltyardDispatcher = { working: new Map(), looking: null, again: false, closing: false, timer };
	computePool();
	wakeJobs();
}

/** Looks for runs that wait; call it after one was put into the queue. */
export function wakeJobs(): void {
	const jobs = holder.tiltyardDispatcher;
	if (!jobs || jobs.closing) return;
	if (jobs.looking) {
		jobs.again = true;
		return;
	}
	jobs.looking = takeAll(jobs)
		.catch((error: unknown) => logger.error({ error }, 'waiting runs could not be read; trying again soon'))
		.finally(() => {
			jobs.looking = null;
			if (jobs.again) {
				jobs.again = false;
				wakeJobs();
			}
		});
}

async function takeAll(jobs: Dispatcher): Promise<void> {
	while (!jobs.closing && jobs.working.size < RUNS_AT_ONCE) {
		const run = await databaseQueue.take();
		if (!run) return;
		const working = workOnRun(databaseQueue, run);
		jobs.working.set(run.id, working);
		void working.ended.finally(() => {
			jobs.working.delete(run.id);
			wakeJobs();
		});
	}
}

/** Stops a run of this process and waits until it has ended. Runs of other processes stop at their next report. */
export async function stopWorkingRun(runId: string): Promise<void> {
	const working = holder.tiltyardDispatcher?.working.get(runId);
	if (!working) return;
	working.stop('asked');
	await working.ended;
}

/** Gives back what is being worked on and ends the threads. */
export async function stopJobs(): Promise<void> {
	const jobs = holder.tiltyardDispatcher;
	if (!jobs) return;
	jobs.closing = true;
	clearInterval(jobs.timer);
	await jobs.looking;
	for (const working of jobs.working.values()) working.stop('shutdown');
	await Promise.all([...jobs.working.values()].map((working) => working.ended));
	holder.tiltyardDispatcher = undefined;
	await stopPool();
}
