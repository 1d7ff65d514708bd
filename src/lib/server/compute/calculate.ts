import { AppError } from '../errors';
import { computePool } from './pool';
import type { ComputeTask } from './tasks';

/** A calculation that takes longer than this is ended: it would hold a thread for others, milliseconds. */
const LONGEST_MS = 120_000;

/** Runs one stateless calculation in a worker thread, so that the server keeps answering. */
export async function calculate(task: ComputeTask): Promise<unknown> {
	const abort = new AbortController();
	const timer = setTimeout(() => abort.abort(), LONGEST_MS);
	try {
		return await computePool().run({ task }, { signal: abort.signal });
	} catch (error) {
		if (abort.signal.aborted) {
			throw new AppError(
				'too_large',
				'This takes too long for one call: send a smaller scene or a coarser step.'
			);
		}
		if (error instanceof Error && error.message === 'Task queue is at limit') {
			throw new AppError('unavailable', 'Many calculations wait already: try again shortly.', {
				retryAfterSeconds: 5
			});
		}
		throw error;
	} finally {
		clearTimeout(timer);
	}
}
