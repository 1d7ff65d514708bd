import { ensureBuild } from './lib/build.mjs';
import { openDatabase } from './lib/database.mjs';
import { ensurePackages } from './lib/packages.mjs';
import { isPortFree, superviseChild } from './lib/process.mjs';
import { Refusal, runMain, say, secondsSince } from './lib/say.mjs';
import { serveBuild } from './lib/serve.mjs';
import { appEnvironment, demoAllowed, demoLines } from './lib/settings.mjs';

/** `npm start`: from a bare checkout to a served application; see README. */
runMain(async () => {
	const since = performance.now();
	const host = process.env.HOST ?? '127.0.0.1';
	const port = Number(process.env.PORT ?? 3000);
	if (!Number.isInteger(port) || port < 1 || port > 65535)
		throw new Refusal(`PORT is "${process.env.PORT}": give a whole number from 1 to 65535.`);
	const origin =
		process.env.ORIGIN ?? `http://${host === '0.0.0.0' || host === '::' ? '127.0.0.1' : host}:${port}`;
	if (!(await isPortFree(host, port)))
		throw new Refusal(
			`Port ${port} on ${host} is taken: stop what listens there, or choose another one, for example "PORT=${port + 1} npm start".`
		);

	ensurePackages();
	const building = ensureBuild();
	// Awaited below; a failure must not count as unhandled while the database starts.
	building.catch(() => undefined);
	const database = await openDatabase();
	// A signal before the application runs still stops the database.
	const early = () => void database.stop().then(() => process.exit(0));
	process.on('SIGINT', early).on('SIGTERM', early);
	try {
		await building;
		const env = appEnvironment({ url: database.url, ownDatabase: database.own, origin });
		const child = await serveBuild({ host, port, env });
		process.off('SIGINT', early).off('SIGTERM', early);
		superviseChild(child, database.stop);
	} catch (error) {
		await database.stop();
		throw error;
	}
	say(`\nTiltyard is ready after ${secondsSince(since)} s: ${origin}\n`);
	if (demoAllowed(database.own)) say(`${demoLines().join('\n')}\n`);
	else
		say(
			'NODE_ENV=production with a database of your own: the demo is not put in, its accounts are refused.\n'
		);
	say('Ctrl-C stops it.');
});
