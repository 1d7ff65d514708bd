import type { RunEvent } from '$lib/schema/run';
import type { Actor } from '../auth/actor';
import { listenToRun } from '../jobs';
import { logger } from '../log';
import { findRun } from './find-run';

/** Looks into the database so often too, for runs that another process works on, milliseconds. */
const LOOK_EVERY_MS = 2_000;

const hasEnded = (event: RunEvent) => event.status !== 'queued' && event.status !== 'working';

/** Server-sent events of a run: where it stands at once, every step, and its end, after which the stream closes. */
export async function followRun(actor: Actor, runId: string): Promise<ReadableStream<Uint8Array>> {
	const now = await findRun(actor, runId, 'run.read');
	const text = new TextEncoder();
	let leave = () => {};

	return new ReadableStream<Uint8Array>({
		start(controller) {
			let last = '';
			let open = true;
			const write = (line: string) => controller.enqueue(text.encode(line));
			const end = () => {
				leave();
				controller.close();
			};
			const tell = (event: RunEvent) => {
				if (!open) return;
				const { status, progress, stage } = event;
				const data = JSON.stringify({ status, progress, stage });
				// A comment keeps the line open through proxies while nothing changes.
				write(data === last ? ': still here\n\n' : `data: ${data}\n\n`);
				last = data;
				if (hasEnded(event)) end();
			};
			const stopListening = listenToRun(runId, tell);
			const looks = setInterval(() => {
				findRun(actor, runId, 'run.read').then(
					(row) => {
						if (row.status !== 'working' || isNews(last, row)) tell(row);
						else if (open) write(': still here\n\n');
					},
					(error: unknown) => {
						logger.info({ error, runId }, 'a run that was followed is gone');
						if (open) end();
					}
				);
			}, LOOK_EVERY_MS);
			leave = () => {
				open = false;
				clearInterval(looks);
				stopListening();
			};
			tell(now);
		},
		cancel() {
			leave();
		}
	});
}

/** The database lags behind what this process tells: only what is further counts. */
function isNews(last: string, row: RunEvent): boolean {
	if (last === '') return true;
	const told = JSON.parse(last) as RunEvent;
	return told.status !== row.status || row.progress > told.progress;
}
