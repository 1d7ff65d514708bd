import { spawn } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, readFileSync, readdirSync, writeFileSync } from 'node:fs';
import { join, relative } from 'node:path';
import { root } from './paths.mjs';
import { Refusal, say, secondsSince } from './say.mjs';

/** What the build is made from. */
const sources = [
	'src',
	'static',
	'package-lock.json',
	'svelte.config.js',
	'vite.config.ts',
	'tsconfig.json',
	'scripts/measured-checks-plugin.js',
	'scripts/worker-source-plugin.js',
	// Reference values that the build measures the core against.
	'tests/fixtures'
];
const stamp = join(root, 'build', '.source-hash');

/** @returns {string[]} */
function filesOf(/** @type {string} */ path) {
	if (!existsSync(path)) return [];
	const entries = readdirSync(path, { withFileTypes: true });
	return entries.flatMap((entry) => {
		const full = join(path, entry.name);
		return entry.isDirectory() ? filesOf(full) : /\.test\.ts$/.test(entry.name) ? [] : [full];
	});
}

/** A hash of the names and contents of everything that goes into the build. */
export function sourceHash() {
	const hash = createHash('sha256');
	for (const source of sources) {
		const path = join(root, source);
		const files = /\.\w+$/.test(source) ? (existsSync(path) ? [path] : []) : filesOf(path);
		for (const file of files.sort()) {
			const content = readFileSync(file);
			hash.update(`${relative(root, file)}\0${content.length}\0`).update(content);
		}
	}
	return hash.digest('hex');
}

/**
 * Builds when the sources differ from those of the last build.
 * @param {(child: import('node:child_process').ChildProcess) => void} [started] is given the process that builds
 * @returns {Promise<boolean>} whether it had to build
 */
export async function ensureBuild(started) {
	const wanted = sourceHash();
	if (existsSync(stamp) && readFileSync(stamp, 'utf8') === wanted) return false;
	const since = performance.now();
	say('Building…');
	const output = await new Promise((/** @type {(text: string | null) => void} */ resolve) => {
		const vite = spawn(process.execPath, [join(root, 'node_modules/vite/bin/vite.js'), 'build'], {
			cwd: root,
			stdio: ['ignore', 'pipe', 'pipe'],
			env: { ...process.env, NODE_ENV: 'production' }
		});
		started?.(vite);
		let text = '';
		vite.stdout.on('data', (chunk) => (text += chunk));
		vite.stderr.on('data', (chunk) => (text += chunk));
		vite.once('close', (code) => resolve(code === 0 ? null : text));
	});
	if (output !== null) throw new Refusal(`The build failed:\n${output.slice(-4000)}`);
	writeFileSync(stamp, wanted);
	say(`Built in ${secondsSince(since)} s`);
	return true;
}
