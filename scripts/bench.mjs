// Speed of the computing core: seeded fields, medians of processor time, one JSON object on the last line.
//   npm run bench                      everything, some minutes
//   npm run bench -- --quick           the shorter ones, and rates on fewer suns: under a minute
//   npm run bench -- --only alike.     only figures whose name begins so
//   npm run bench -- --record          writes tests/bench/recorded.json as well
//   npm run bench -- --forget          leaves .data/bench.json, the last run on this machine, as it is
// Each figure is shown beside the last run on this machine and beside the recorded one.
import { rmSync } from 'node:fs';
import { mkdir, mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import { availableParallelism, cpus, totalmem } from 'node:os';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { parseArgs } from 'node:util';
import { build } from 'vite';
import { figureLine } from './lib/bench-lines.mjs';

const root = fileURLToPath(new URL('..', import.meta.url));
const dataDir = `${root}.data`;
const lastFile = `${dataDir}/bench.json`;
const recordedFile = `${root}tests/bench/recorded.json`;

const { values: options } = parseArgs({
	options: {
		quick: { type: 'boolean', default: false },
		record: { type: 'boolean', default: false },
		forget: { type: 'boolean', default: false },
		only: { type: 'string', default: '' }
	}
});
if (options.record && (options.quick || options.only)) {
	console.error('--record takes a whole run: leave --quick and --only away.');
	process.exit(2);
}

/** @param {string} file @returns {Promise<Record<string, number>>} */
async function figuresOf(file) {
	try {
		return JSON.parse(await readFile(file, 'utf8')).figures ?? {};
	} catch (error) {
		if (/** @type {NodeJS.ErrnoException} */ (error).code !== 'ENOENT')
			console.log(
				`${file} cannot be read (${/** @type {Error} */ (error).message}): nothing to compare with.`
			);
		return {};
	}
}

const began = performance.now();
await mkdir(dataDir, { recursive: true });
const folder = await mkdtemp(`${dataDir}/bench-`);
for (const signal of ['SIGINT', 'SIGTERM']) {
	process.once(signal, () => {
		rmSync(folder, { recursive: true, force: true });
		process.exit(1);
	});
}
try {
	const last = await figuresOf(lastFile);
	const recorded = await figuresOf(recordedFile);
	// Bundled first: module wrappers of a development server would be measured otherwise.
	await build({
		configFile: false,
		root,
		logLevel: 'warn',
		build: {
			outDir: folder,
			target: 'node20',
			minify: false,
			lib: {
				entry: Object.fromEntries(
					['run', 'child', 'part-worker'].map((name) => [name, `${root}tests/bench/${name}.ts`])
				),
				formats: ['es']
			},
			rolldownOptions: {
				external: [/^node:/, 'three', 'three-mesh-bvh', 'polyclip-ts'],
				output: { entryFileNames: '[name].mjs', chunkFileNames: '[name].mjs' }
			}
		}
	});
	const { measure } = await import(pathToFileURL(`${folder}/run.mjs`).href);
	let group = '';
	const figures = await measure({
		quick: options.quick,
		only: options.only,
		folder,
		sources: `${root}tests/bench`,
		say: (/** @type {string} */ line) => console.log(line),
		figure: (/** @type {string} */ name, /** @type {number} */ value, /** @type {string} */ note) => {
			const effect = name.slice(0, name.indexOf('.'));
			if (effect !== group) console.log(`\n${effect}`);
			group = effect;
			console.log(figureLine({ name, value, note, last: last[name], recorded: recorded[name] }));
		}
	});
	const machine = {
		processor: cpus()[0]?.model ?? 'unknown',
		cores: availableParallelism(),
		memoryGb: Math.round(totalmem() / 2 ** 30),
		node: process.version
	};
	// Figures that this run did not take keep their last value.
	const kept = { machine, figures: { ...last, ...figures } };
	if (!options.forget) await writeFile(lastFile, `${JSON.stringify(kept, null, '\t')}\n`);
	if (options.record) await writeFile(recordedFile, `${JSON.stringify({ machine, figures }, null, '\t')}\n`);
	const seconds = Math.round((performance.now() - began) / 1000);
	const count = Object.keys(figures).length;
	console.log(`\n${count} figures in ${seconds} s on ${machine.cores} cores, Node ${machine.node}`);
	console.log(JSON.stringify({ figures }));
} finally {
	await rm(folder, { recursive: true, force: true });
}
