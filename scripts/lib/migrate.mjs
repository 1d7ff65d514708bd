import { join } from 'node:path';
import { root } from './paths.mjs';

/**
 * Brings a database to the newest shape. A named lock keeps two processes from migrating at once.
 * @param {string} url
 */
export async function migrateDatabase(url) {
	const [{ createConnection }, { drizzle }, { migrate }] = await Promise.all([
		import('mysql2/promise'),
		import('drizzle-orm/mysql2'),
		import('drizzle-orm/mysql2/migrator')
	]);
	const connection = await createConnection({ uri: url });
	try {
		const [rows] = await connection.query("SELECT GET_LOCK('tiltyard-migrate', 60) AS got");
		const [{ got }] = /** @type {{ got: number | null }[]} */ (rows);
		if (got !== 1)
			throw new Error(
				'Another process has been migrating this database for a minute. Try again when it is done.'
			);
		await migrate(drizzle({ client: connection }), { migrationsFolder: join(root, 'drizzle') });
	} finally {
		await connection.end();
	}
}
