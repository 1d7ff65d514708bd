import { execFile } from 'node:child_process';
import { join, resolve } from 'node:path';
import { promisify } from 'node:util';
import { describe, expect, it } from 'vitest';
import { figureLine } from '../../scripts/lib/bench-lines.mjs';

const run = promisify(execFile);
const root = resolve(import.meta.dirname, '../..');
const bench = (...args: string[]) =>
	run(process.execPath, [join(root, 'scripts/bench.mjs'), ...args], { cwd: root });

describe('the bench', () => {
	it('ends with one JSON object of the figures that were asked for', async () => {
		const { stdout } = await bench('--quick', '--forget', '--only', 'sun.');
		const lines = stdout.trimEnd().split('\n');
		const { figures } = JSON.parse(lines[lines.length - 1]) as { figures: Record<string, number> };
		expect(Object.keys(figures)).toEqual(['sun.any.1000.ms']);
		expect(figures['sun.any.1000.ms']).toBeGreaterThan(0);
		expect(lines.some((line) => line.startsWith(`sun.any.1000.ms ${figures['sun.any.1000.ms']} ms`))).toBe(
			true
		);
	}, 60000);

	it('records whole runs only', async () => {
		await expect(bench('--record', '--quick')).rejects.toMatchObject({ code: 2 });
	});
});

describe('a line of the bench', () => {
	it('says what the figure was before, and how far it has come', () => {
		const line = figureLine({
			name: 'alike.regular.100.tableSunsPerS',
			value: 3e6,
			note: '',
			last: 2e6,
			recorded: 4e6
		});
		expect(line).toBe(
			'alike.regular.100.tableSunsPerS 3000000 tables x suns/s (last 2000000, +50 %; recorded 4000000, -25 %)'
		);
	});

	it('stands alone where there is nothing to compare with', () => {
		expect(figureLine({ name: 'year.regular.1000.oneThreadMs', value: 12, note: '[note]' })).toBe(
			'year.regular.1000.oneThreadMs 12 ms [note]'
		);
	});

	it('compares no rounding errors', () => {
		const line = figureLine({
			name: 'unionPolygons.sloped.100.meanErrorPercent',
			value: 2e-14,
			note: '',
			last: 5e-15
		});
		expect(line).toBe(
			'unionPolygons.sloped.100.meanErrorPercent 2e-14 % of the table, mean error (last 5e-15)'
		);
	});
});
