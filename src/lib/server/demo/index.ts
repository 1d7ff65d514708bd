/**
 * The demo. Seeded by the application itself when it starts with TILTYARD_SEED_DEMO=1 (hooks.server.ts, init):
 * the seed uses the same use cases as the pages, which live in this bundle and not in the start command.
 * Every part looks for what is there first, so that a second start adds nothing.
 */
import { seedPeople } from './people';

export async function seedDemo(): Promise<void> {
	await seedPeople();
}
