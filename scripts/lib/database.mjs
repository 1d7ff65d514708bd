import { openMariadb } from './mariadb.mjs';
import { migrateDatabase } from './migrate.mjs';
import { Refusal } from './say.mjs';

/**
 * The migrated database that a command works on: the operator's when DATABASE_URL is set, else the checkout's own.
 * @param {{ name?: string, database?: string }} [own] folder under `.data` and database name of an own server
 * @returns {Promise<{ url: string, own: boolean, stop: () => Promise<void> }>}
 */
export async function openDatabase({ name, database } = {}) {
	const outside = process.env.DATABASE_URL;
	if (outside) {
		try {
			await migrateDatabase(outside);
		} catch (error) {
			const reason = error instanceof Error ? error.message || /** @type {any} */ (error).code : error;
			throw new Refusal(`The database of DATABASE_URL can't be used: ${reason}`);
		}
		return { url: outside, own: false, stop: async () => {} };
	}
	const server = await openMariadb(name, database);
	try {
		await migrateDatabase(server.url);
	} catch (error) {
		await server.stop();
		throw error;
	}
	return { url: server.url, own: true, stop: server.stop };
}
