import { spawn } from 'node:child_process';
import { join } from 'node:path';
import { root } from './paths.mjs';
import { waitUntil } from './process.mjs';
import { Refusal } from './say.mjs';

/**
 * Starts the built application and waits until it is ready.
 * @param {{ host: string, port: number, env: NodeJS.ProcessEnv,
 *   started?: (child: import('node:child_process').ChildProcess) => void }} options `env` as `appEnvironment` makes it;
 *   `started` is given the child before it is ready
 * @returns the child, already answering on /healthz
 */
export async function serveBuild({ host, port, env, started }) {
	const child = spawn(process.execPath, [join(root, 'build', 'index.js')], {
		cwd: root,
		stdio: ['ignore', 'inherit', 'inherit'],
		env: {
			...env,
			NODE_ENV: 'production',
			HOST: host,
			PORT: String(port),
			// The last resort for bodies that do not say how long they are; lib/server/http/body-limit.ts refuses sooner.
			BODY_SIZE_LIMIT: process.env.BODY_SIZE_LIMIT ?? '64M',
			// Open event streams do not hold up a stop.
			SHUTDOWN_TIMEOUT: process.env.SHUTDOWN_TIMEOUT ?? '2'
		}
	});
	started?.(child);
	const reach = host === '0.0.0.0' || host === '::' ? '127.0.0.1' : host;
	const address = `http://${reach.includes(':') ? `[${reach}]` : reach}:${port}/healthz`;
	let ready = false;
	await waitUntil(async () => {
		if (child.exitCode !== null || child.signalCode !== null) return true;
		ready = await fetch(address).then(
			(response) => response.ok,
			() => false
		);
		return ready;
	}, 120_000);
	if (ready) return child;
	child.kill('SIGKILL');
	throw new Refusal(`The application did not become ready on ${address}: its reasons are printed above.`);
}
