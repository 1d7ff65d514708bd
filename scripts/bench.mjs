// Speed of the computing core: seeded fields, mean processor time, one JSON object on the last line.
// The last run is kept in .data/bench.json and each figure is shown beside it.
import { mkdir, readFile, writeFile } from 'node:fs/promises';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { build } from 'vite';

const root = fileURLToPath(new URL('..', import.meta.url));
const dataDir = `${root}.data`;
const bundleDir = `${dataDir}/bench`;
const lastFile = `${dataDir}/bench.json`;

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
		lib: { entry: `${root}tests/bench/run.ts`, formats: ['es'], fileName: () => 'run.mjs' }
	}
});

async function lastFigures() {
	try {
		const { figures } = JSON.parse(await readFile(lastFile, 'utf8'));
		return figures ?? {};
	} catch (error) {
		if (error.code !== 'ENOENT')
			console.log(`The last run cannot be read (${error.message}); nothing to compare with.`);
		return {};
	}
}

const last = await lastFigures();
const { measure } = await import(pathToFileURL(`${bundleDir}/run.mjs`).href);
const figures = measure((line) => {
	const [name, value] = line.split(' ');
	const before = last[name];
	const change = before > 0 ? ` (last ${before}, ${((100 * value) / before - 100).toFixed(0)} %)` : '';
	console.log(`${line}${change}`);
});
await writeFile(lastFile, `${JSON.stringify({ figures }, null, '\t')}\n`);
console.log(JSON.stringify({ figures }));
