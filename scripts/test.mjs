import { join } from 'node:path';
import { installDebianPackages } from './lib/apt.mjs';
import { ensureBuild } from './lib/build.mjs';
import { check, countPlaywright, countVitest, endChecks, suite } from './lib/checks.mjs';
import { openMariadb } from './lib/mariadb.mjs';
import { ensurePackages } from './lib/packages.mjs';
import { dataPath, findProgram, root } from './lib/paths.mjs';
import { endOnSignal, freePort } from './lib/process.mjs';
import { runMain, say, secondsSince } from './lib/say.mjs';

/** `npm test`: brings what it needs, runs everything, ends with the line `N passed, N failed`. */
runMain(async () => {
	const since = performance.now();
	ensurePackages();
	const missing = [
		...(process.env.CHROMIUM || findProgram('chromium') ? [] : ['chromium']),
		...(findProgram('pdftotext') ? [] : ['poppler-utils'])
	];
	if (missing.length > 0) installDebianPackages(missing, 'run the browser tests');

	// The tests' own server, held open for the whole run; nothing of an operator's database is touched.
	delete process.env.DATABASE_URL;
	const signals = endOnSignal();
	const opening = openMariadb('test', 'tiltyard_hold', { durable: false });
	signals.add(() => opening.then((opened) => opened.stop()));
	const database = await signals.during(opening);
	signals.release();
	let interrupted = false;
	for (const signal of /** @type {NodeJS.Signals[]} */ (['SIGINT', 'SIGTERM', 'SIGHUP']))
		process.on(signal, () => {
			interrupted = true;
			endChecks();
		});

	const bin = (/** @type {string} */ name) => join(root, 'node_modules', '.bin', name);
	const outcomes = [];
	/** Two at a time: the machine that this was written on has two cores. */
	const together = async (
		/** @type {Array<() => Promise<import('./lib/checks.mjs').Outcome>>} */ ...checks
	) => {
		if (interrupted) return;
		outcomes.push(...(await Promise.all(checks.map((start) => start()))));
	};
	try {
		await check('framework files', bin('svelte-kit'), ['sync']).then((outcome) => outcomes.push(outcome));
		await together(
			async () =>
				check('type check', bin('svelte-check'), ['--tsconfig', './tsconfig.json', '--fail-on-warnings']),
			async () => check('lint', bin('eslint'), ['.', '--max-warnings', '0'])
		);
		await together(async () => check('format', bin('prettier'), ['--check', '.']));
		const vitestReport = dataPath('reports', 'vitest.json');
		await together(() =>
			suite({
				name: 'unit, accuracy and integration tests',
				program: bin('vitest'),
				args: ['run', '--reporter=default', '--reporter=json', `--outputFile.json=${vitestReport}`],
				reportFile: vitestReport,
				limitMs: 1_200_000,
				count: countVitest
			})
		);
		await together(buildCheck);
		const playwrightReport = dataPath('reports', 'playwright.json');
		const port = await freePort();
		await together(() =>
			suite({
				name: 'browser tests',
				program: bin('playwright'),
				args: ['test'],
				env: { E2E_PORT: String(port), PLAYWRIGHT_JSON_OUTPUT_NAME: playwrightReport },
				reportFile: playwrightReport,
				limitMs: 2_400_000,
				count: countPlaywright
			})
		);
	} finally {
		await database.stop();
	}

	const sum = (/** @type {'passed' | 'failed' | 'skipped'} */ key) =>
		outcomes.reduce((total, outcome) => total + outcome[key], 0);
	const failed = sum('failed') + (interrupted ? 1 : 0);
	say(`\n${interrupted ? 'Interrupted. ' : ''}${secondsSince(since)} s in all, ${sum('skipped')} skipped`);
	say(`${sum('passed')} passed, ${failed} failed`);
	process.exit(failed > 0 ? 1 : 0);
});

/** The production build, as one check; skipped work when the sources have not changed. */
async function buildCheck() {
	const since = performance.now();
	try {
		const built = await ensureBuild();
		say(`✓ build: ${built ? 'made' : 'up to date'} (${secondsSince(since)} s)`);
		return { name: 'build', passed: 1, failed: 0, skipped: 0, output: '' };
	} catch (error) {
		const output = error instanceof Error ? error.message : String(error);
		say(`✗ build\n${output}`);
		return { name: 'build', passed: 0, failed: 1, skipped: 0, output };
	}
}
