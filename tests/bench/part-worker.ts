/** A thread that computes parts of runs, one after another, and hands their numbers over without copying them. */
import { parentPort } from 'node:worker_threads';
import { PART_RUNS, type PartTask } from './parts';

parentPort?.on('message', ({ run, input, range }: PartTask) => {
	const part = PART_RUNS[run].part(input, range);
	const buffers = new Set<ArrayBuffer>();
	for (const value of Object.values(part)) {
		if (ArrayBuffer.isView(value) && value.buffer instanceof ArrayBuffer) buffers.add(value.buffer);
	}
	parentPort?.postMessage(part, [...buffers]);
});
