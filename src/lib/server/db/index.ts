/** The application's handle on MariaDB. Opened on first use, so that a build or a unit test needs no server. */
import { drizzle, type MySql2Database } from 'drizzle-orm/mysql2';
import { createPool, type Pool } from 'mysql2/promise';
import { databaseUrl } from '../env';

export type Database = MySql2Database;
/** What a use case takes when it may run inside a transaction. */
export type Executor = Pick<Database, 'select' | 'insert' | 'update' | 'delete' | 'execute'>;

interface Opened {
	url: string;
	pool: Pool;
	database: Database;
}

/** Kept on the process: a development reload evaluates this module again and must not open another pool. */
const shelf = globalThis as typeof globalThis & { tiltyardDatabase?: Opened };

function opened(): Opened {
	const url = databaseUrl();
	if (shelf.tiltyardDatabase?.url === url) return shelf.tiltyardDatabase;
	const pool = createPool({ uri: url, timezone: 'Z', connectionLimit: 10, charset: 'utf8mb4' });
	shelf.tiltyardDatabase = { url, pool, database: drizzle({ client: pool }) };
	return shelf.tiltyardDatabase;
}

export const db: Database = new Proxy({} as Database, {
	get(_target, key) {
		const { database } = opened();
		const value: unknown = Reflect.get(database, key, database);
		return typeof value === 'function' ? value.bind(database) : value;
	}
});

/** Whether the server answers; for the health check. */
export async function pingDatabase(): Promise<void> {
	await opened().pool.query('SELECT 1');
}

/** Ends the pool; for tests and for a tidy stop. */
export async function closeDatabase(): Promise<void> {
	const open = shelf.tiltyardDatabase;
	delete shelf.tiltyardDatabase;
	await open?.pool.end();
}
