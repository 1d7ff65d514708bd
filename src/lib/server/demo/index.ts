/**
 * The demo. Seeded by the application itself when it starts with TILTYARD_SEED_DEMO=1 (hooks.server.ts, init):
 * the seed uses the same use cases as the pages, which live in this bundle and not in the start command.
 * Every part looks for what is there first, so that a second start adds nothing.
 */
import { logger } from '../log';
import { seedPeople } from './people';
import { seedProject } from './project';

/** Longest that the demo's computations keep the application from answering, milliseconds; they go on behind it. */
const LONGEST_WAIT_MS = 8_000;

export async function seedDemo(): Promise<void> {
	const people = await seedPeople();
	const project = seedProject(people).catch((error: unknown) =>
		logger.error({ error }, 'the demo project could not be put in; the next start tries again')
	);
	await Promise.race([project, new Promise((resume) => setTimeout(resume, LONGEST_WAIT_MS).unref())]);
}
