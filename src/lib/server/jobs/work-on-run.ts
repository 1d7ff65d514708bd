import type { RunKind } from '$lib/schema/run';
import { computeRun } from '../compute/compute-run';
import { logger } from '../log';
import type { RunQueue, TakenRun } from './queue';
import { tellRun } from './run-events';

/** Between two signs of life in the database, milliseconds. */
const REPORT_EVERY_MS = 1_000;

/** A thread that was asked to stop and has not after this long is ended, milliseconds. */
const STOP_PATIENCE_MS = 2_000;

const stages: Record<RunKind, string> = {
	shade: 'computing the shade of the year',
	mounts: 'computing the mounts over the year',
	answers: 'finding who takes whose light'
};

export type StopReason = 'asked' | 'lost' | 'shutdown';

/** A run that works in threads of this process. */
export interface WorkingRun {
	stop(reason: StopReason): void;
	/** Settles when it has ended and its end is stored. */
	ended: Promise<void>;
}

export function workOnRun(queue: RunQueue, run: TakenRun): WorkingRun {
	const flag = new SharedArrayBuffer(4);
	const abort = new AbortController();
	const stage = stages[run.kind];
	let reason: StopReason | null = null;
	let progress = 0;
	let patience: NodeJS.Timeout | undefined;

	const stop = (why: StopReason) => {
		if (reason) return;
		reason = why;
		Atomics.store(new Int32Array(flag), 0, 1);
		patience = setTimeout(() => abort.abort(), STOP_PATIENCE_MS);
	};

	const onProgress = (done01: number) => {
		progress = Math.max(progress, Math.min(1, done01));
		tellRun(run.id, { status: 'working', progress, stage });
	};
	tellRun(run.id, { status: 'working', progress, stage });

	const reports = setInterval(() => {
		queue.report(run, progress, stage).then(
			(answer) => {
				if (answer !== 'go-on') stop(answer === 'stop' ? 'asked' : 'lost');
			},
			(error: unknown) => logger.warn({ error, runId: run.id }, 'progress of a run could not be stored')
		);
	}, REPORT_EVERY_MS);

	const work = async () => {
		try {
			const begun = performance.now();
			const packed = await computeRun(run, { stop: flag, signal: abort.signal, onProgress });
			if (packed) {
				const stored = await queue.finish(run, {
					status: 'done',
					gzip: packed.gzip,
					computeMs: performance.now() - begun
				});
				if (stored) tellRun(run.id, { status: 'done', progress: 1, stage: 'done' });
			} else await endStopped();
		} catch (error) {
			if (reason) await endStopped();
			else await endFailed(error);
		} finally {
			clearInterval(reports);
			clearTimeout(patience);
		}
	};

	const endStopped = async () => {
		if (reason === 'shutdown') return queue.giveBack(run);
		if (reason === 'lost') return;
		await queue.finish(run, { status: 'cancelled' });
		tellRun(run.id, { status: 'cancelled', progress, stage: 'cancelled' });
	};

	const endFailed = async (error: unknown) => {
		logger.error({ error, runId: run.id }, 'a run failed');
		await queue.finish(run, {
			status: 'failed',
			error: `The computation failed. Tell the support this run's id: ${run.id}.`
		});
		tellRun(run.id, { status: 'failed', progress, stage: 'failed' });
	};

	const ended = work().catch((error: unknown) =>
		logger.error({ error, runId: run.id }, 'the end of a run could not be stored; it is taken up again later')
	);
	return { stop, ended };
}
