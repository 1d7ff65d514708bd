import { spawn, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { describe, expect, it } from 'vitest';
import { isRunning } from '../../scripts/lib/process.mjs';

/** A command that has started a child and waits for it to become ready, which it never does. */
const command = `
import { spawn } from 'node:child_process';
import { endChild, endOnSignal } from './scripts/lib/process.mjs';
const signals = endOnSignal();
const child = spawn(process.execPath, ['-e', 'setInterval(() => undefined, 1000)'], { stdio: 'ignore' });
signals.add(async () => process.stdout.write('database stopped\\n'));
signals.add(() => endChild(child));
process.stdout.write(child.pid + '\\n');
await signals.during(new Promise((resolve, reject) => child.once('exit', () => reject(new Error('not ready')))));
process.stdout.write('went on\\n');
`;

async function firstLine(child: ChildProcess): Promise<string> {
	const [chunk] = (await once(child.stdout!, 'data')) as [Buffer];
	return chunk.toString().trim();
}

describe('a command that is asked to end before it serves', () => {
	it.each(['SIGTERM', 'SIGINT', 'SIGHUP'] as const)(
		'ends on %s what it started, the last first, and goes no further',
		async (signal) => {
			const started = spawn(process.execPath, ['--input-type=module', '-e', command], {
				stdio: ['ignore', 'pipe', 'inherit']
			});
			const pid = Number(await firstLine(started));
			expect(isRunning(pid)).toBe(true);
			let said = '';
			started.stdout.on('data', (chunk) => (said += chunk));
			started.kill(signal);
			const [code] = await once(started, 'close');
			expect(code).toBe(0);
			expect(isRunning(pid)).toBe(false);
			expect(said).toBe('database stopped\n');
		},
		30_000
	);
});
