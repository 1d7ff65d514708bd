import { createHash } from 'node:crypto';
import { existsSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Piscina } from 'piscina';
import { logger } from '../log';
import { THREADS } from './threads';
import workerSource from './worker-entry.ts?worker-source';

/** Calculations that may wait for a thread before the server says that it is busy. */
const MAX_WAITING = 64;

interface RunningPool {
	pool: Piscina;
	filename: string;
	sourceHash: string;
}

/** Kept across module reloads of the development server, which would otherwise leave threads behind. */
const holder = globalThis as typeof globalThis & { tiltyardPool?: RunningPool };

/** The pool of worker threads, started at first use. */
export function computePool(): Piscina {
	const sourceHash = createHash('sha256').update(workerSource).digest('hex');
	const running = holder.tiltyardPool;
	// The source changes under development; the file goes when somebody tidies the temporary folder.
	if (running && (running.sourceHash !== sourceHash || !existsSync(running.filename))) void stopPool();
	if (!holder.tiltyardPool) {
		const folder = mkdtempSync(join(tmpdir(), 'tiltyard-worker-'));
		const filename = join(folder, 'worker.mjs');
		writeFileSync(filename, workerSource);
		const pool = new Piscina({
			filename,
			minThreads: 1,
			maxThreads: THREADS,
			idleTimeout: 60_000,
			maxQueue: MAX_WAITING
		});
		pool.on('error', (error: unknown) => logger.error({ error }, 'a worker thread ended'));
		// Kept until the process ends: a thread that is just starting still reads it.
		process.once('exit', () => rmSync(folder, { recursive: true, force: true }));
		holder.tiltyardPool = { pool, filename, sourceHash };
	}
	return holder.tiltyardPool.pool;
}

/** Stops every thread at once. */
export async function stopPool(): Promise<void> {
	const running = holder.tiltyardPool;
	if (!running) return;
	holder.tiltyardPool = undefined;
	await running.pool.destroy();
}
