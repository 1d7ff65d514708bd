import { ensureBuild } from './lib/build.mjs';
import { openTestDatabase } from './lib/test-database.mjs';
import { superviseChild } from './lib/process.mjs';
import { runMain } from './lib/say.mjs';
import { serveBuild } from './lib/serve.mjs';
import { appEnvironment } from './lib/settings.mjs';

/** The built application for browser tests: a fresh database with the demo in it. Started by Playwright. */
runMain(async () => {
	const port = Number(process.env.E2E_PORT ?? 4173);
	await ensureBuild();
	const database = await openTestDatabase('tiltyard_e2e');
	try {
		const origin = `http://127.0.0.1:${port}`;
		const env = { LOG_LEVEL: 'warn', ...appEnvironment({ url: database.url, ownDatabase: true, origin }) };
		const child = await serveBuild({ host: '127.0.0.1', port, env });
		superviseChild(child, database.stop);
	} catch (error) {
		await database.stop();
		throw error;
	}
});
