import { execFile } from 'node:child_process';
import { join } from 'node:path';
import { promisify } from 'node:util';
import type { Bench } from './bench';

const run = promisify(execFile);

/** Compiles a C++ source that stands under tests/bench; null, and a line that says why, where that fails. */
export async function buildNative(
	bench: Bench,
	source: string,
	libraries: readonly string[] = []
): Promise<string | null> {
	const { folder, sources, say } = bench.options;
	const program = join(folder, source.replace(/\W+/g, '-'));
	try {
		await run('g++', ['-O2', '-std=c++17', join(sources, source), '-o', program, ...libraries]);
		return program;
	} catch (error) {
		const told = error instanceof Error ? error.message : String(error);
		const reason = told.split('\n').find((line) => line.includes('error:')) ?? told.split('\n')[0];
		say(`Figures of ${source} are left out, it was not built: ${reason}`);
		return null;
	}
}

/** Figures that a program prints as one JSON object. */
export async function runNative(program: string, args: readonly string[]): Promise<Record<string, number>> {
	const { stdout } = await run(program, [...args]);
	return JSON.parse(stdout) as Record<string, number>;
}
