import { MessageChannel } from 'node:worker_threads';
import type { RunInput } from '$lib/core/results';
import type { RunKind } from '$lib/schema/run';
import { computePool } from './pool';
import { Slots } from './slots';
import type { ComputeTask, PackedResult, PortMessage, WorkerCall } from './tasks';
import { PARTS_AT_ONCE, partsOf, rangesOf } from './threads';
import { buffersOf } from './transfer';

/** How far a run in parts is when only the putting together is left. */
const PARTS_01 = 0.97;

export interface RunToCompute {
	kind: RunKind;
	input: RunInput;
	inputHash: string;
}

export interface RunControl {
	/** One 32-bit number, set to 1 to stop every part at its next step. */
	stop: SharedArrayBuffer;
	/** Ends the threads of every part at once. */
	signal: AbortSignal;
	onProgress: (done01: number) => void;
}

/** Kept across reloads of the development server. */
const holder = globalThis as typeof globalThis & { tiltyardRunSlots?: Slots };
const slots = (): Slots => (holder.tiltyardRunSlots ??= new Slots(PARTS_AT_ONCE));

/** One task in a thread, once a run may take one; tells its progress. Null when it was stopped. */
async function inThread(
	task: ComputeTask,
	control: RunControl,
	onProgress: (done01: number) => void,
	handedOver: ArrayBuffer[] = []
): Promise<object | null> {
	return slots().use(async () => {
		const { port1, port2 } = new MessageChannel();
		const sent = new Promise<object>((resolve) => {
			port1.on('message', (message: PortMessage) => {
				if ('found' in message) resolve(message.found);
				else onProgress(message.done01);
			});
		});
		try {
			const call: WorkerCall = { task, stop: control.stop, port: port2 };
			const went = (await computePool().run(call, {
				transferList: [port2, ...handedOver],
				signal: control.signal
			})) as boolean;
			return went ? await sent : null;
		} finally {
			port1.close();
		}
	});
}

/**
 * Computes a run, large fields in parts on several threads; the same bytes on any number of them. Null when it was
 * stopped. When a part fails the others are stopped, and its error is thrown after all have ended.
 */
export async function computeRun(run: RunToCompute, control: RunControl): Promise<PackedResult | null> {
	const { kind, input, inputHash } = run;
	const trackers = input.layout.trackers.length;
	const count = partsOf(kind, trackers);
	if (count === 1) {
		const whole = await inThread({ kind: 'run', run: kind, input, inputHash }, control, control.onProgress);
		return whole as PackedResult | null;
	}
	const ranges = rangesOf(trackers, count);
	const done = ranges.map(() => 0);
	const flag = new Int32Array(control.stop);
	const outcomes = await Promise.allSettled(
		ranges.map(async (range, k) => {
			try {
				return await inThread({ kind: 'run-part', run: kind, input, range }, control, (done01) => {
					done[k] = ((range.to - range.from) / trackers) * done01;
					control.onProgress(PARTS_01 * done.reduce((sum, part) => sum + part, 0));
				});
			} catch (error) {
				Atomics.store(flag, 0, 1);
				throw error;
			}
		})
	);
	const failed = outcomes.find((outcome) => outcome.status === 'rejected');
	if (failed) throw failed.reason;
	const parts = outcomes.flatMap((outcome) => (outcome.status === 'fulfilled' ? [outcome.value] : []));
	if (!parts.every((part) => part !== null)) return null;
	control.onProgress(PARTS_01);
	const join: ComputeTask = { kind: 'run-join', run: kind, input, inputHash, parts };
	return (await inThread(join, control, () => {}, buffersOf(parts))) as PackedResult;
}
