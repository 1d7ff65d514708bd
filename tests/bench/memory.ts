import { execFile } from 'node:child_process';
import { join } from 'node:path';
import { promisify } from 'node:util';
import type { Bench } from './bench';

/** Peak resident memory of a year, in a process of its own: nothing else of the bench counts then. */
export async function memoryFigures(bench: Bench): Promise<void> {
	for (const count of bench.options.quick ? [1000] : [1000, 10000]) {
		const name = `memory.regular.${count}.mb`;
		const cold = `year.regular.${count}.coldMs`;
		if (!bench.wants(name) && !bench.wants(cold)) continue;
		const { stdout } = await promisify(execFile)(process.execPath, [
			join(bench.options.folder, 'child.mjs'),
			String(count)
		]);
		const { clockMs, peakMb } = JSON.parse(stdout) as { clockMs: number; peakMb: number };
		bench.note(name, peakMb);
		bench.note(cold, clockMs, 'by the clock, its process just started');
	}
}
