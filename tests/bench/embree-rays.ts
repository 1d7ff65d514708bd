import { existsSync } from 'node:fs';
import { writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import type { Bench } from './bench';
import { buildNative, runNative } from './native';
import { coreTiming, LEAST_ASKED_COSINE, type posedScenes } from './posed';

/** Where Debian's libembree-dev puts its header. */
const HEADER = '/usr/include/embree3/rtcore.h';
const DOUBLES_A_TABLE = 19;

/** Suns and tables as plain doubles, in the order in which embree/shade.cpp reads them. */
function packed({ field, scenes }: ReturnType<typeof posedScenes>): Float64Array {
	const count = field.engine.count;
	const out = new Float64Array(3 + scenes.length * (3 + count * DOUBLES_A_TABLE));
	let at = 0;
	const put = (...values: readonly number[]): void => values.forEach((value) => (out[at++] = value));
	put(scenes.length, count, LEAST_ASKED_COSINE);
	for (const { s, tables, shares } of scenes) {
		put(...s);
		tables.forEach((table, i) => {
			put(...table.centre, ...table.u, ...table.v, ...table.n, table.halfWidth, table.halfHeight);
			put(table.steelHalfWidth, table.steelHalfHeight, table.halfGap, table.cosine, shares[i]);
		});
	}
	return out;
}

/** Embree on the same scenes, one thread, when its Debian package is installed. */
export async function embreeRays(
	bench: Bench,
	posed: ReturnType<typeof posedScenes>,
	place: string,
	sides: readonly number[]
): Promise<void> {
	const wanted = sides.filter((across) => bench.wants(`raysEmbree${across}.${place}`));
	if (wanted.length === 0) return;
	if (!existsSync(HEADER)) {
		bench.options.say('Embree is left out: Debian package libembree-dev is not installed.');
		return;
	}
	const program = await buildNative(bench, 'embree/shade.cpp', ['-lembree3']);
	if (program === null) return;
	const file = join(bench.options.folder, 'scenes.bin');
	await writeFile(file, packed(posed));
	const core = coreTiming(bench, posed);
	const tableSuns = posed.scenes.length * posed.field.engine.count;
	for (const across of wanted) {
		const stem = `raysEmbree${across}.${place}`;
		const answer = await runNative(program, [file, String(across)]);
		bench.note(
			`${stem}.tableSunsPerS`,
			(1000 * tableSuns) / answer.processorMs,
			`${across} x ${across} rays a table`
		);
		bench.note(
			`${stem}.meanErrorPercent`,
			answer.meanErrorPercent,
			`over ${answer.partly} partly shaded tables`
		);
		bench.note(`${stem}.maxErrorPercent`, answer.maxErrorPercent);
		bench.note(`${stem}.timesSlower`, answer.processorMs / core.processorMs);
	}
}
