import { spawn } from 'node:child_process';
import { join } from 'node:path';
import { openDatabase } from './lib/database.mjs';
import { ensurePackages } from './lib/packages.mjs';
import { root } from './lib/paths.mjs';
import { endOnSignal, superviseChild, whyNoListener } from './lib/process.mjs';
import { Refusal, runMain, say } from './lib/say.mjs';
import { appEnvironment, demoLines } from './lib/settings.mjs';

/** `npm run dev`: the database, the newest migration, and vite with reloading. */
runMain(async () => {
	const host = process.env.HOST ?? '127.0.0.1';
	const port = Number(process.env.PORT ?? 5173);
	const refused = await whyNoListener(host, port);
	if (refused) throw new Refusal(refused);
	ensurePackages();
	const signals = endOnSignal();
	const opening = openDatabase();
	signals.add(() => opening.then((opened) => opened.stop()));
	const database = await signals.during(opening);
	const vite = spawn(
		process.execPath,
		[
			join(root, 'node_modules/vite/bin/vite.js'),
			'dev',
			'--host',
			host,
			'--port',
			String(port),
			'--strictPort'
		],
		{
			cwd: root,
			stdio: ['ignore', 'inherit', 'inherit'],
			env: appEnvironment({
				url: database.url,
				ownDatabase: database.own,
				host,
				origin: `http://${host}:${port}`
			})
		}
	);
	signals.release();
	superviseChild(vite, database.stop);
	say(`\nTiltyard for work: http://${host}:${port}\n${demoLines().join('\n')}\n`);
});
