import type { RunInput } from '$lib/core/results';
import type { RunKind } from '$lib/schema/run';

/** A run that this process has taken to work on. */
export interface TakenRun {
	id: string;
	kind: RunKind;
	input: RunInput;
	/** Told in the result. */
	inputHash: string;
	/** Proves that it is still ours when its result comes in. */
	leaseId: string;
}

export type RunOutcome =
	| { status: 'done'; gzip: Uint8Array; computeMs: number }
	| { status: 'failed'; error: string }
	| { status: 'cancelled' };

/**
 * Where runs wait and how they end. The one place that knows how a queue is kept: another engine is another
 * implementation of this.
 */
export interface RunQueue {
	/** The oldest run that waits, or one whose process died; null when there is none. */
	take(): Promise<TakenRun | null>;
	/** Sign of life and progress. Tells whether to go on, to stop because somebody asked, or that it is ours no more. */
	report(run: TakenRun, progress: number, stage: string): Promise<'go-on' | 'stop' | 'lost'>;
	/** Stores how it ended, result and all, in one transaction; false when it was not ours any more. */
	finish(run: TakenRun, outcome: RunOutcome): Promise<boolean>;
	/** Puts it back for the next process, as when this one is asked to end. */
	giveBack(run: TakenRun): Promise<void>;
}
