import { ensureBuild } from './lib/build.mjs';
import { openTestDatabase } from './lib/test-database.mjs';
import { endChild, endOnSignal, isRunning, superviseChild } from './lib/process.mjs';
import { runMain } from './lib/say.mjs';
import { serveBuild } from './lib/serve.mjs';
import { appEnvironment } from './lib/settings.mjs';

/** The built application for browser tests: a fresh database with the demo in it. Started by Playwright. */
runMain(async () => {
	const port = Number(process.env.E2E_PORT ?? 4173);
	await ensureBuild();
	const signals = endOnSignal();
	const opening = openTestDatabase('tiltyard_e2e');
	signals.add(() => opening.then((opened) => opened.stop()));
	const database = await signals.during(opening);
	try {
		const host = '127.0.0.1';
		const origin = `http://${host}:${port}`;
		const env = {
			LOG_LEVEL: 'warn',
			...appEnvironment({ url: database.url, ownDatabase: true, host, origin })
		};
		const started = (/** @type {import('node:child_process').ChildProcess} */ server) =>
			signals.add(() => endChild(server));
		const child = await signals.during(serveBuild({ host, port, env, started }));
		signals.release();
		superviseChild(child, database.stop);
		endWithOwner(Number(process.env.E2E_OWNER ?? 0));
	} catch (error) {
		await signals.endAll();
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
