import type { Actor } from '../auth/actor';
import { AppError } from '../errors';
import { computePool } from './pool';
import type { ComputeTask } from './tasks';

/** A calculation that takes longer than this is ended: it would hold a thread for others, milliseconds. */
const LONGEST_MS = 120_000;

/** Calculations of one person that may wait for each other. */
const MOST_OF_ONE = 32;

interface Turns {
	last: Promise<unknown>;
	waiting: number;
}

const turnsOf = new Map<string, Turns>();

/**
 * Runs one stateless calculation in a worker thread, so that the server keeps answering. Those of one person take
 * turns: somebody who asks for many long ones holds one thread, and the others stay free for runs and other people.
 */
export async function calculate(actor: Actor, task: ComputeTask): Promise<unknown> {
	const turns = turnsOf.get(actor.userId) ?? { last: Promise.resolve(), waiting: 0 };
	if (turns.waiting >= MOST_OF_ONE) {
		throw new AppError('too_many', 'Many calculations of yours wait already: let them end first.', {
			retryAfterSeconds: 5
		});
	}
	turnsOf.set(actor.userId, turns);
	turns.waiting += 1;
	const begin = () => runInThread(task);
	const mine = turns.last.then(begin, begin);
	turns.last = mine;
	try {
		return await mine;
	} finally {
		turns.waiting -= 1;
		if (turns.waiting === 0) turnsOf.delete(actor.userId);
	}
}

async function runInThread(task: ComputeTask): Promise<unknown> {
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
