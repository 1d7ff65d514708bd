// Speed of the computing core: seeded fields, medians of processor time, one JSON object on the last line.
//   npm run bench                      everything, some minutes
//   npm run bench -- --quick           the shorter ones on fewer suns, under a minute
//   npm run bench -- --only alike.     only figures whose name begins so
//   npm run bench -- --record          writes tests/bench/recorded.json as well
// Each figure is shown beside the last run on this machine (.data/bench.json) and beside the recorded one.
import { mkdir, readFile, writeFile } from 'node:fs/promises';
import { availableParallelism, cpus, totalmem } from 'node:os';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { parseArgs } from 'node:util';
import { build } from 'vite';

const root = fileURLToPath(new URL('..', import.meta.url));
const bundleDir = `${root}.data/bench`;
const lastFile = `${root}.data/bench.json`;
const recordedFile = `${root}tests/bench/recorded.json`;

const { values: options } = parseArgs({
	options: {
		quick: { type: 'boolean', default: false },
		record: { type: 'boolean', default: false },
		only: { type: 'string', default: '' }
	}
});
if (options.record && (options.quick || options.only)) {
	console.error('--record takes a whole run: leave --quick and --only away.');
	process.exit(2);
}

const began = performance.now();
await mkdir(bundleDir, { recursive: true });
// Bundled first: module wrappers of a development server would be measured otherwise.
await build({
	configFile: false,
	root,
	logLevel: 'warn',
	build: {
		outDir: bundleDir,
		emptyOutDir: true,
		target: 'node20',
		minify: false,
		lib: {
			entry: { run: `${root}tests/bench/run.ts`, child: `${root}tests/bench/child.ts` },
			formats: ['es']
		},
		rolldownOptions: {
			external: [/^node:/, 'three', 'three-mesh-bvh', 'polyclip-ts'],
			output: { entryFileNames: '[name].mjs', chunkFileNames: '[name].mjs' }
		}
	}
});

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

/** @type {Record<string, string>} */
const UNITS = {
	ms: 'ms',
	tableSunsPerS: 'tables x suns/s',
	mb: 'MB',
	meanErrorPercent: '% of the table, mean error',
	maxErrorPercent: '% of the table, largest error',
	timesSlower: 'times slower than the core',
	ofNative: 'of the native twin',
	threadGain: 'times faster on two threads'
};

/** @param {string} name */
function unitOf(name) {
	const last = name.slice(name.lastIndexOf('.') + 1);
	return UNITS[last] ?? (last.endsWith('Ms') ? 'ms' : last);
}

/** @param {number | undefined} before @param {number} now @param {string} word */
function beside(before, now, word) {
	if (before === undefined) return null;
	const change =
		before === 0 ? '' : `, ${now >= before ? '+' : ''}${((100 * now) / before - 100).toFixed(0)} %`;
	return `${word} ${before}${change}`;
}

const last = await figuresOf(lastFile);
const recorded = await figuresOf(recordedFile);
const { measure } = await import(`${pathToFileURL(`${bundleDir}/run.mjs`).href}?${Date.now()}`);
let group = '';
const figures = await measure({
	quick: options.quick,
	only: options.only,
	folder: bundleDir,
	sources: `${root}tests/bench`,
	say: (/** @type {string} */ line) => console.log(line),
	figure: (/** @type {string} */ name, /** @type {number} */ value, /** @type {string} */ note) => {
		const effect = name.slice(0, name.indexOf('.'));
		if (effect !== group) console.log(`\n${effect}`);
		group = effect;
		const compared = [beside(last[name], value, 'last'), beside(recorded[name], value, 'recorded')]
			.filter((part) => part !== null)
			.join('; ');
		console.log(
			`${name} ${value} ${unitOf(name)}${compared ? ` (${compared})` : ''}${note ? ` ${note}` : ''}`
		);
	}
});

const machine = {
	processor: cpus()[0]?.model ?? 'unknown',
	cores: availableParallelism(),
	memoryGb: Math.round(totalmem() / 2 ** 30),
	node: process.version
};
// Figures that this run did not take keep their last value.
await writeFile(lastFile, `${JSON.stringify({ machine, figures: { ...last, ...figures } }, null, '\t')}\n`);
if (options.record) await writeFile(recordedFile, `${JSON.stringify({ machine, figures }, null, '\t')}\n`);
console.log(
	`\n${Object.keys(figures).length} figures in ${((performance.now() - began) / 1000).toFixed(0)} s on ${machine.cores} cores, Node ${machine.node}`
);
console.log(JSON.stringify({ figures }));
