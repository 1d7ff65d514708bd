import { ensureBuild } from './lib/build.mjs';
import { openDatabase } from './lib/database.mjs';
import { ensurePackages } from './lib/packages.mjs';
import { endChild, endOnSignal, superviseChild, whyNoListener } from './lib/process.mjs';
import { Refusal, runMain, say, secondsSince } from './lib/say.mjs';
import { serveBuild } from './lib/serve.mjs';
import { appEnvironment, demoAllowed, demoLines, isAtHome } from './lib/settings.mjs';

/** `npm start`: from a bare checkout to a served application; see README. */
runMain(async () => {
	const since = performance.now();
	const host = process.env.HOST ?? '127.0.0.1';
	const port = Number(process.env.PORT ?? 3000);
	if (!Number.isInteger(port) || port < 1 || port > 65535)
		throw new Refusal(`PORT is "${process.env.PORT}": give a whole number from 1 to 65535.`);
	const origin =
		process.env.ORIGIN ?? `http://${host === '0.0.0.0' || host === '::' ? '127.0.0.1' : host}:${port}`;
	const refused = await whyNoListener(host, port);
	if (refused) throw new Refusal(refused);

	ensurePackages();
	const signals = endOnSignal();
	const endSoon = (/** @type {import('node:child_process').ChildProcess} */ child) =>
		signals.add(() => endChild(child));
	const building = ensureBuild(endSoon);
	// Awaited below; a failure must not count as unhandled while the database starts.
	building.catch(() => undefined);
	const opening = openDatabase();
	// When it can't be opened, the reason is told below.
	signals.add(() =>
		opening.then(
			(opened) => opened.stop(),
			() => undefined
		)
	);
	/** @type {boolean} */
	let own;
	try {
		const database = await signals.during(opening);
		own = database.own;
		await signals.during(building);
		const env = appEnvironment({ url: database.url, ownDatabase: own, host, origin });
		const child = await signals.during(serveBuild({ host, port, env, started: endSoon }));
		signals.release();
		superviseChild(child, database.stop);
	} catch (error) {
		await signals.endAll();
		throw error;
	}
	say(`\nTiltyard is ready after ${secondsSince(since)} s: ${origin}\n`);
	if (demoAllowed(own)) say(`${demoLines().join('\n')}\n`);
	else
		say(
			'NODE_ENV=production with a database of your own: the demo is not put in, its accounts are refused.\n'
		);
	if (demoAllowed(own) && !isAtHome(host, origin))
		say(
			'This address can be reached from other machines: the mailbox is shut (set SMTP_URL to send letters), and the demo sign-ins above are open to whoever knows them.\n'
		);
	say('Ctrl-C stops it.');
});
