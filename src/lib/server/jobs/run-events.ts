import { EventEmitter } from 'node:events';
import type { RunEvent } from '$lib/schema/run';

/** What happens to runs in this process, for whoever follows one. Kept across reloads of the development server. */
const holder = globalThis as typeof globalThis & { tiltyardRunEvents?: EventEmitter };

function hub(): EventEmitter {
	if (!holder.tiltyardRunEvents) {
		holder.tiltyardRunEvents = new EventEmitter();
		holder.tiltyardRunEvents.setMaxListeners(0);
	}
	return holder.tiltyardRunEvents;
}

export function tellRun(runId: string, event: RunEvent): void {
	hub().emit(runId, event);
}

/** Calls back with every event of the run until the returned function is called. */
export function listenToRun(runId: string, heard: (event: RunEvent) => void): () => void {
	hub().on(runId, heard);
	return () => hub().off(runId, heard);
}
