import { ensureBuild } from './lib/build.mjs';
import { openTestDatabase } from './lib/test-database.mjs';
import { isRunning, superviseChild } from './lib/process.mjs';
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
		endWithOwner(Number(process.env.E2E_OWNER ?? 0));
	} catch (error) {
		await database.stop();
		throw error;
	}
});

/** A test runner that was killed can't stop its server: the server looks after it. */
function endWithOwner(/** @type {number} */ owner) {
	if (owner === 0) return;
	setInterval(() => {
		if (!isRunning(owner)) process.kill(process.pid, 'SIGTERM');
	}, 2000).unref();
}
