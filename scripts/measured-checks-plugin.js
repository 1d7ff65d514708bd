import { execFile } from 'node:child_process';
import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { promisify } from 'node:util';
import { build } from 'vite';

const NAME = 'virtual:measured-checks';
const RESOLVED = `\0${NAME}`;
const ENTRY = 'src/lib/method/measure/build-entry.ts';

/** One measurement for each process: client and server build, and every reload of the development server, share it. */
const kept = /** @type {{ tiltyardMeasured?: Promise<string> }} */ (globalThis);

/**
 * `import report from 'virtual:measured-checks'` gives what the checks of `src/lib/method` measured, as data. They are
 * bundled and run in a process of their own, so that neither their packages nor their reference values go to a page.
 * @returns {import('vite').Plugin}
 */
export function measuredChecks() {
	let root = process.cwd();
	return {
		name: 'measured-checks',
		configResolved(config) {
			root = config.root;
		},
		resolveId(id) {
			return id === NAME ? RESOLVED : null;
		},
		async load(id) {
			if (id !== RESOLVED) return null;
			kept.tiltyardMeasured ??= measure(root);
			return { code: `export default ${await kept.tiltyardMeasured};`, moduleType: 'js', map: null };
		}
	};
}

/** @param {string} root */
async function measure(root) {
	const built = await build({
		configFile: false,
		root,
		logLevel: 'error',
		build: {
			write: false,
			ssr: join(root, ENTRY),
			target: 'node20',
			minify: false,
			rolldownOptions: { output: { format: 'es', codeSplitting: false } }
		},
		resolve: { alias: { $lib: join(root, 'src/lib') } },
		ssr: { noExternal: true }
	});
	const output = [built].flat().flatMap((one) => ('output' in one ? one.output : []));
	const chunks = output.filter((one) => one.type === 'chunk');
	if (chunks.length !== 1) throw new Error(`${ENTRY} must bundle to one module, not ${chunks.length}`);
	const folder = await mkdtemp(join(tmpdir(), 'tiltyard-checks-'));
	try {
		const file = join(folder, 'checks.mjs');
		await writeFile(file, chunks[0].code);
		const { stdout } = await promisify(execFile)(process.execPath, [file], {
			cwd: root,
			maxBuffer: 16 * 1024 * 1024
		});
		/** @type {{ checks: { id: string, passes: boolean, worst: number, worstAt: string }[] }} */
		const report = JSON.parse(stdout);
		const failed = report.checks.filter(({ passes }) => !passes);
		for (const { id, worst, worstAt } of failed)
			console.warn(`Check ${id} is outside its tolerance: ${worst} at ${worstAt}`);
		return JSON.stringify(report);
	} finally {
		await rm(folder, { recursive: true, force: true });
	}
}
