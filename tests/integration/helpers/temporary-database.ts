/**
 * For a test file that works on real MariaDB: a database of its own for the file, migrated, dropped afterwards.
 * Call `useTemporaryDatabase()` once at the top of the file; `db` of `$lib/server/db` then works on it.
 */
import { randomBytes } from 'node:crypto';
import { afterAll, beforeAll } from 'vitest';
import { openTestDatabase } from '../../../scripts/lib/test-database.mjs';
import { closeDatabase } from '$lib/server/db';

export function useTemporaryDatabase(): void {
	let stop: (() => Promise<void>) | undefined;

	beforeAll(async () => {
		const opened = await openTestDatabase(`tiltyard_test_${randomBytes(5).toString('hex')}`);
		stop = opened.stop;
		process.env.DATABASE_URL = opened.url;
		process.env.TILTYARD_LOCAL = '1';
		process.env.LOG_LEVEL = 'silent';
	}, 120_000);

	afterAll(async () => {
		await closeDatabase();
		await stop?.();
	}, 60_000);
}
