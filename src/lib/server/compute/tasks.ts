import type { MessagePort } from 'node:worker_threads';
import type { z } from 'zod';
import type { RunInput } from '$lib/core/results';
import type {
	fieldLossRequestSchema,
	irradianceRequestSchema,
	mountRequestSchema,
	shadeRequestSchema,
	sunRequestSchema
} from '$lib/schema/compute';

/** What a worker thread is given. Plain data, so that it can be copied to the thread. */
export type ComputeTask =
	| { kind: 'shade-run'; input: RunInput }
	| { kind: 'mount-run'; input: RunInput }
	| { kind: 'sun'; request: z.output<typeof sunRequestSchema> }
	| { kind: 'irradiance'; request: z.output<typeof irradianceRequestSchema> }
	| { kind: 'shade-scene'; scene: z.output<typeof shadeRequestSchema> }
	| { kind: 'mount-scene'; scene: z.output<typeof mountRequestSchema> }
	| { kind: 'field-loss'; request: z.output<typeof fieldLossRequestSchema> };

export interface WorkerCall {
	task: ComputeTask;
	/** One 32-bit number, set to 1 by the server to stop the run. */
	stop?: SharedArrayBuffer;
	/** Takes `{ done01 }` from the thread. */
	port?: MessagePort;
}

/** A finished run: the result as JSON text, packed with gzip, since a large field fills tens of megabytes. */
export interface PackedResult {
	gzip: Uint8Array;
	jsonBytes: number;
	computeMs: number;
}
