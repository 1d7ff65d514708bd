/**
 * The demo. Seeded by the application itself when it starts with TILTYARD_SEED_DEMO=1 (hooks.server.ts, init):
 * the seed uses the same use cases as the pages, which live in this bundle and not in the start command.
 * Every part looks for what is there first, so that a second start adds nothing.
 */
import { sql } from 'drizzle-orm';
import { db } from '../db';
import { logger } from '../log';
import { seedPeople } from './people';
import { seedProject } from './project';

/** Longest that the demo's computations keep the application from answering, milliseconds; they go on behind it. */
const LONGEST_WAIT_MS = 8_000;

/** Longest wait for another server that puts the demo in, seconds. */
const LOCK_PATIENCE_S = 90;

export async function seedDemo(): Promise<void> {
	const seeded = oneAtATime(async () => {
		await seedProject(await seedPeople());
	}).catch((error: unknown) =>
		logger.error({ error }, 'the demo could not be put in; the next start tries again')
	);
	await Promise.race([seeded, new Promise((resume) => setTimeout(resume, LONGEST_WAIT_MS).unref())]);
}

/** Two servers that start on the same empty database must not both put the demo in: the second finds it done. */
function oneAtATime(work: () => Promise<void>): Promise<void> {
	const name = sql`CONCAT('tiltyard-demo-', DATABASE())`;
	// The lock is its connection's, which the transaction keeps; the work itself goes over others.
	return db.transaction(async (tx) => {
		await tx.execute(sql`SELECT GET_LOCK(${name}, ${LOCK_PATIENCE_S})`);
		try {
			await work();
		} finally {
			await tx.execute(sql`SELECT RELEASE_LOCK(${name})`);
		}
	});
}
