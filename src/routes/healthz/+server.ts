import { json } from '@sveltejs/kit';
import { pingDatabase } from '$lib/server/db';
import { logger } from '$lib/server/log';
import type { RequestHandler } from './$types';

/** 200 when the application and its database answer, else 503. */
export const GET: RequestHandler = async () => {
	const headers = { 'cache-control': 'no-store' };
	try {
		await pingDatabase();
		return json({ status: 'ready' }, { headers });
	} catch (error) {
		logger.error({ error }, 'health check: the database does not answer');
		return json({ status: 'no database' }, { status: 503, headers });
	}
};
