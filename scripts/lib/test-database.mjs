import { openMariadb } from './mariadb.mjs';
import { migrateDatabase } from './migrate.mjs';

/**
 * A database that holds nothing but the newest shape, on the tests' own server; dropped when it is stopped.
 * @param {string} name begins with `tiltyard`
 * @returns {Promise<{ url: string, stop: () => Promise<void> }>}
 */
export async function openTestDatabase(name) {
	const server = await openMariadb('test', name, { durable: false });
	const query = async (/** @type {string[]} */ ...statements) => {
		const { createConnection } = await import('mysql2/promise');
		const connection = await createConnection({ uri: server.url });
		try {
			for (const statement of statements) await connection.query(statement);
		} finally {
			await connection.end();
		}
	};
	try {
		await query(`DROP DATABASE \`${name}\``, `CREATE DATABASE \`${name}\``);
		await migrateDatabase(server.url);
	} catch (error) {
		await server.stop();
		throw error;
	}
	return {
		url: server.url,
		stop: async () => {
			await query(`DROP DATABASE IF EXISTS \`${name}\``);
			await server.stop();
		}
	};
}
