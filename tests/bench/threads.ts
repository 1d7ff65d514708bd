import { join } from 'node:path';
import { once } from 'node:events';
import { Worker } from 'node:worker_threads';
import type { RunInput } from '../../src/lib/core';
import { median, type Bench } from './bench';
import { PART_RUNS, type PartRun, type PartRunName, type PartTask } from './parts';

const THREADS = 2;
const MOST_REPEATS = 5;
const BUDGET_MS = 6000;

async function inThread(worker: Worker, task: PartTask): Promise<unknown> {
	worker.postMessage(task);
	const [part] = (await once(worker, 'message')) as [unknown];
	return part;
}

interface Taken {
	clockMs: number;
	/** All threads together. */
	note: string;
}

/** Medians of some repeats; the first one only warms up when they are short. */
async function timed(work: () => Promise<void>): Promise<Taken> {
	const clock: number[] = [];
	const used: number[] = [];
	const start = performance.now();
	do {
		const usedBefore = process.cpuUsage();
		const before = performance.now();
		await work();
		clock.push(performance.now() - before);
		const { user, system } = process.cpuUsage(usedBefore);
		used.push((user + system) / 1000);
	} while (clock.length < MOST_REPEATS && performance.now() - start < BUDGET_MS);
	const from = clock.length > 2 ? 1 : 0;
	const processorMs = median(used.slice(from));
	return {
		clockMs: median(clock.slice(from)),
		note: `by the clock [${Number(processorMs.toPrecision(3))} ms of processor, ${clock.length} repeats]`
	};
}

/**
 * A run of the whole field on one thread, then in halves on two, by the clock: what a person waits. Joining the parts
 * counts on both sides. Threads are started before, as those of a server are.
 */
export async function threadFigures(
	bench: Bench,
	name: PartRunName,
	stem: string,
	input: RunInput
): Promise<void> {
	if (!bench.wants(stem)) return;
	// Parts of one kind come back from their own threads: what `part` made, `join` takes.
	const run: PartRun<unknown> = PART_RUNS[name] as PartRun<unknown>;
	const count = input.layout.trackers.length;
	const whole = { from: 0, to: count };
	const workers = Array.from(
		{ length: THREADS },
		() => new Worker(join(bench.options.folder, 'part-worker.mjs'))
	);
	try {
		const one = await timed(async () => {
			run.join(input, [await inThread(workers[0], { run: name, input, range: whole })]);
		});
		bench.note(`${stem}.oneThreadMs`, one.clockMs, one.note);
		const two = await timed(async () => {
			const parts = workers.map((worker, k) => {
				const range = {
					from: Math.floor((count * k) / THREADS),
					to: Math.floor((count * (k + 1)) / THREADS)
				};
				return inThread(worker, { run: name, input, range });
			});
			run.join(input, await Promise.all(parts));
		});
		bench.note(`${stem}.twoThreadsMs`, two.clockMs, two.note);
		bench.note(`${stem}.threadGain`, one.clockMs / two.clockMs);
	} finally {
		await Promise.all(workers.map((worker) => worker.terminate()));
	}
}
