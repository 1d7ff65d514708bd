import type { MessagePort } from 'node:worker_threads';
import type { z } from 'zod';
import type { TrackerRange } from '$lib/core';
import type { RunInput } from '$lib/core/results';
import type {
	fieldLossRequestSchema,
	irradianceRequestSchema,
	mountRequestSchema,
	shadeRequestSchema,
	sunRequestSchema
} from '$lib/schema/compute';
import type { RunMethodName } from './run-kinds';

/** What a worker thread is given. Plain data, so that it can be copied to the thread. */
export type ComputeTask =
	| { kind: 'run'; run: RunMethodName; input: RunInput; inputHash: string }
	| { kind: 'run-part'; run: RunMethodName; input: RunInput; range: TrackerRange }
	| { kind: 'run-join'; run: RunMethodName; input: RunInput; inputHash: string; parts: object[] }
	| { kind: 'sun'; request: z.output<typeof sunRequestSchema> }
	| { kind: 'irradiance'; request: z.output<typeof irradianceRequestSchema> }
	| { kind: 'shade-scene'; scene: z.output<typeof shadeRequestSchema> }
	| { kind: 'mount-scene'; scene: z.output<typeof mountRequestSchema> }
	| { kind: 'field-loss'; request: z.output<typeof fieldLossRequestSchema> };

export interface WorkerCall {
	task: ComputeTask;
	/** One 32-bit number, set to 1 by the server to stop the run. */
	stop?: SharedArrayBuffer;
	/** Takes a `PortMessage` from the thread. */
	port?: MessagePort;
}

/** How far a run is, or what came of it; a task of a run answers true once it has sent the latter, false when it was stopped. */
export type PortMessage = { done01: number } | { found: object };

/** A finished run: the result as JSON text, packed with gzip, since a large field fills tens of megabytes. */
export interface PackedResult {
	gzip: Uint8Array;
	jsonBytes: number;
}
