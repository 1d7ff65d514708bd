import { createServer } from 'node:net';
import { setTimeout as pause } from 'node:timers/promises';

/** Whether a process with this id runs (also when it belongs to somebody else). */
export function isRunning(/** @type {number} */ pid) {
	try {
		process.kill(pid, 0);
		return true;
	} catch (error) {
		return /** @type {NodeJS.ErrnoException} */ (error).code === 'EPERM';
	}
}

/** A port on loopback that nobody listens on at this moment. */
export function freePort() {
	return new Promise((/** @type {(port: number) => void} */ resolve, reject) => {
		const probe = createServer();
		probe.once('error', reject);
		probe.listen(0, '127.0.0.1', () => {
			const { port } = /** @type {import('node:net').AddressInfo} */ (probe.address());
			probe.close(() => resolve(port));
		});
	});
}

/**
 * Whether a listener could take this address now.
 * @returns {Promise<string | null>} null when it could, else why not and what to do
 */
export function whyNoListener(/** @type {string} */ host, /** @type {number} */ port) {
	return new Promise((resolve) => {
		const probe = createServer();
		probe.once('error', (/** @type {NodeJS.ErrnoException} */ { code }) => {
			if (code === 'EADDRINUSE')
				resolve(
					`Port ${port} on ${host} is taken: stop what listens there, or choose another one with PORT=${port + 1}.`
				);
			else if (code === 'EACCES')
				resolve(`This user may not listen on port ${port}: choose one above 1023, such as PORT=3000.`);
			else
				resolve(
					`HOST is "${host}" and this machine can't listen there (${code}): leave HOST out for 127.0.0.1.`
				);
		});
		probe.listen(port, host, () => probe.close(() => resolve(null)));
	});
}

/**
 * Asks a child to end and waits for it; kills it when it has not ended in time.
 * @param {import('node:child_process').ChildProcess} child
 */
export async function endChild(child, /** @type {number} */ graceMs = 8000) {
	if (child.exitCode !== null || child.signalCode !== null) return;
	const ended = new Promise((resolve) => child.once('exit', resolve));
	child.kill('SIGTERM');
	const timer = setTimeout(() => child.kill('SIGKILL'), graceMs);
	await ended;
	clearTimeout(timer);
}

/**
 * Repeats `attempt` until it answers true.
 * @param {() => Promise<boolean> | boolean} attempt
 * @returns {Promise<boolean>} false when the time ran out
 */
export async function waitUntil(
	attempt,
	/** @type {number} */ timeoutMs,
	/** @type {number} */ everyMs = 100
) {
	const end = Date.now() + timeoutMs;
	for (;;) {
		if (await attempt()) return true;
		if (Date.now() > end) return false;
		await pause(everyMs);
	}
}

const endSignals = /** @type {NodeJS.Signals[]} */ (['SIGINT', 'SIGTERM', 'SIGHUP']);

/**
 * For the time before a command has its child under supervision: Ctrl-C, SIGTERM or hang-up end what was added, the
 * last first, and then this process. Nothing that was half started stays behind.
 */
export function endOnSignal() {
	/** @type {Array<() => Promise<unknown>>} */
	const ends = [];
	let asked = false;
	const endAll = async () => {
		for (let end = ends.pop(); end; end = ends.pop()) await end();
	};
	const onSignal = () => {
		if (asked) return;
		asked = true;
		endAll().then(
			() => process.exit(0),
			(error) => {
				process.stderr.write(`${error?.stack ?? error}\n`);
				process.exit(1);
			}
		);
	};
	for (const signal of endSignals) process.on(signal, onSignal);
	return {
		add(/** @type {() => Promise<unknown>} */ end) {
			ends.push(end);
		},
		/**
		 * What the promise gives. Once a signal has come it settles no more: the command is on its way out.
		 * @template T
		 * @param {Promise<T>} promise
		 * @returns {Promise<T>}
		 */
		async during(promise) {
			try {
				const value = await promise;
				if (!asked) return value;
			} catch (error) {
				if (!asked) throw error;
			}
			return new Promise(() => undefined);
		},
		/** Ends what was added, as after a failure. */
		endAll,
		/** Hands the signals on to whoever supervises from here. */
		release() {
			for (const signal of endSignals) process.off(signal, onSignal);
		}
	};
}

/**
 * Ties this command to its child: Ctrl-C, SIGTERM or hang-up end the child, then `cleanUp` runs, then this process
 * ends. A child that ends by itself takes the command with it, with the child's status.
 * @param {import('node:child_process').ChildProcess} child
 * @param {() => Promise<void>} cleanUp
 */
export function superviseChild(child, cleanUp) {
	let asked = false;
	for (const signal of endSignals)
		process.on(signal, () => {
			if (asked) return;
			asked = true;
			void endChild(child);
		});
	child.once('exit', (code) => {
		cleanUp().then(
			() => process.exit(asked ? 0 : (code ?? 1)),
			(error) => {
				process.stderr.write(`${error?.stack ?? error}\n`);
				process.exit(1);
			}
		);
	});
}
