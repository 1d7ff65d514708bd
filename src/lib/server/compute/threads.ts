import { availableParallelism } from 'node:os';
import { runThreads } from '../env';
import type { RunKind } from '$lib/schema/run';

/** Stored runs at once: at least two, so that a quick one does not wait behind a long one. */
export const RUNS_AT_ONCE = Math.max(2, Math.min(4, availableParallelism() - 1));

/** Threads that one run may take: more than the cores would only take turns. */
const MOST_PARTS = Math.max(1, Math.min(8, availableParallelism()));

/** Parts of runs that may work at once: a run in parts leaves room for another one. */
export const PARTS_AT_ONCE = Math.max(RUNS_AT_ONCE, MOST_PARTS + 1);

/** One more thread than runs may take, so that a calculation asked for by the API never waits behind a long run. */
export const THREADS = PARTS_AT_ONCE + 1;

/** Fewer trackers than this are not worth a thread of their own: every part prepares the whole field. */
const LEAST_TRACKERS = 100;

/** Kinds of run that can be computed tracker by tracker. */
const inParts: ReadonlySet<RunKind> = new Set(['shade', 'answers']);

/** In how many parts to compute a run of so many trackers. */
export function partsOf(kind: RunKind, trackers: number): number {
	if (!inParts.has(kind)) return 1;
	const most = Math.max(1, Math.floor(trackers / LEAST_TRACKERS));
	return Math.min(runThreads() ?? MOST_PARTS, most);
}

/** Ranges of trackers that follow each other and cover all, as even as whole trackers allow. */
export function rangesOf(trackers: number, parts: number): { from: number; to: number }[] {
	return Array.from({ length: parts }, (_, k) => ({
		from: Math.floor((k * trackers) / parts),
		to: Math.floor(((k + 1) * trackers) / parts)
	}));
}
