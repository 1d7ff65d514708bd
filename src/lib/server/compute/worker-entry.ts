import { gzipSync } from 'node:zlib';
import { fieldLoss, irradiance, mountScene, shadeScene, sunPosition } from '../../core';
import { roundedJson } from './rounded-json';
import { methodOf } from './run-kinds';
import type { PackedResult, WorkerCall } from './tasks';
import { buffersOf } from './transfer';

/** Fewest milliseconds between two messages about progress. */
const PROGRESS_EVERY_MS = 100;

/** What a worker thread runs. Bundled to one module; imports only the core. */
export default function work(call: WorkerCall): unknown {
	const { task } = call;
	switch (task.kind) {
		case 'run': {
			const method = methodOf(task.run);
			const range = { from: 0, to: task.input.layout.trackers.length };
			const part = method.part(task.input, progressOf(call), range);
			return part !== null && handOver(call, packed(method.join(task.input, [part]), task.inputHash));
		}
		case 'run-part': {
			const part = methodOf(task.run).part(task.input, progressOf(call), task.range);
			return part !== null && handOver(call, part);
		}
		case 'run-join':
			return handOver(call, packed(methodOf(task.run).join(task.input, task.parts), task.inputHash));
		case 'sun': {
			const { latitudeDeg, longitudeDeg, times } = task.request;
			return times.map((time) => ({
				time,
				...sunPosition(Date.parse(time), latitudeDeg, longitudeDeg)
			}));
		}
		case 'irradiance':
			return irradiance(task.request);
		case 'shade-scene':
			return shadeScene(task.scene);
		case 'mount-scene':
			return mountScene(task.scene);
		case 'field-loss':
			return fieldLoss(task.request);
	}
}

/** Tells how far a run is, not too often, and whether to go on. */
function progressOf(call: WorkerCall): (done01: number) => boolean {
	const stop = call.stop ? new Int32Array(call.stop) : null;
	let toldAt = performance.now();
	return (done01) => {
		const now = performance.now();
		if (now - toldAt >= PROGRESS_EVERY_MS) {
			toldAt = now;
			call.port?.postMessage({ done01 });
		}
		return stop === null || Atomics.load(stop, 0) === 0;
	};
}

/** Sends what a run found through its port, the buffers without a copy: a thread's plain answer would copy them. */
function handOver(call: WorkerCall, found: object): boolean {
	call.port?.postMessage({ found }, buffersOf(found));
	return true;
}

/** A result as it is stored: it says itself which core made it and from what. */
function packed(result: { coreVersion: string }, inputHash: string): PackedResult {
	const { coreVersion, ...found } = result;
	const text = Buffer.from(roundedJson({ coreVersion, inputHash, ...found }));
	// Copied out of Node's shared pool of small buffers, which cannot be handed over.
	const gzip = new Uint8Array(gzipSync(text, { level: 4 }));
	return { gzip, jsonBytes: text.byteLength };
}
