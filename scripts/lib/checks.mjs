import { spawn } from 'node:child_process';
import { existsSync, readFileSync, rmSync } from 'node:fs';
import { root } from './paths.mjs';
import { say, secondsSince } from './say.mjs';

/** @typedef {{ name: string, passed: number, failed: number, skipped: number, output: string }} Outcome */

/** Programs that run now, so that a signal can end them. */
const running = new Set();

/** Ends every program that a check started, with all that it started. */
export function endChecks() {
	for (const child of running) {
		try {
			process.kill(-child.pid, 'SIGTERM');
		} catch (error) {
			// It ended by itself in between.
			if (/** @type {NodeJS.ErrnoException} */ (error).code !== 'ESRCH') throw error;
		}
	}
}

/**
 * Runs a program in a process group of its own, with a limit of time.
 * @param {string} program path under node_modules/.bin, or an absolute path
 * @param {string[]} args
 * @param {NodeJS.ProcessEnv} env
 * @param {number} limitMs
 * @returns {Promise<{ code: number | null, output: string }>}
 */
function run(program, args, env, limitMs) {
	return new Promise((resolve) => {
		const child = spawn(program, args, {
			cwd: root,
			detached: true,
			stdio: ['ignore', 'pipe', 'pipe'],
			env: { ...process.env, FORCE_COLOR: '0', ...env }
		});
		running.add(child);
		let output = '';
		child.stdout.on('data', (chunk) => (output += chunk));
		child.stderr.on('data', (chunk) => (output += chunk));
		const end = (/** @type {NodeJS.Signals} */ signal) => {
			if (child.exitCode === null && child.pid) process.kill(-child.pid, signal);
		};
		let late = false;
		const timer = setTimeout(() => {
			late = true;
			end('SIGTERM');
			setTimeout(() => end('SIGKILL'), 15_000).unref();
		}, limitMs);
		child.once('error', (error) => (output += String(error)));
		child.once('close', (code) => {
			clearTimeout(timer);
			running.delete(child);
			if (late) output += `\nStopped: it took longer than ${limitMs / 1000} s.`;
			resolve({ code: late ? null : code, output });
		});
	});
}

function report(/** @type {Outcome} */ outcome, /** @type {number} */ since) {
	const { name, passed, failed, skipped, output } = outcome;
	const counts = `${passed} passed, ${failed} failed${skipped > 0 ? `, ${skipped} skipped` : ''}`;
	say(`${failed > 0 ? '✗' : '✓'} ${name}: ${counts} (${secondsSince(since)} s)`);
	if (failed > 0) say(`${output.trim().slice(-12_000)}\n`);
	return outcome;
}

/**
 * A check that passes or fails as one.
 * @param {string} name
 * @param {string} program
 * @param {string[]} args
 * @returns {Promise<Outcome>}
 */
export async function check(name, program, args) {
	const since = performance.now();
	const { code, output } = await run(program, args, {}, 300_000);
	return report({ name, passed: code === 0 ? 1 : 0, failed: code === 0 ? 0 : 1, skipped: 0, output }, since);
}

/**
 * A test runner that leaves a JSON report.
 * @param {{ name: string, program: string, args: string[], env?: NodeJS.ProcessEnv, reportFile: string, limitMs: number,
 *   count: (report: any) => { passed: number, failed: number, skipped: number } }} options
 * @returns {Promise<Outcome>}
 */
export async function suite({ name, program, args, env = {}, reportFile, limitMs, count }) {
	const since = performance.now();
	rmSync(reportFile, { force: true });
	const { code, output } = await run(program, args, env, limitMs);
	const counted = existsSync(reportFile)
		? count(JSON.parse(readFileSync(reportFile, 'utf8')))
		: { passed: 0, failed: 0, skipped: 0 };
	// A runner that failed outside of any test, or ran none, has failed too.
	if (counted.failed === 0 && (code !== 0 || counted.passed === 0)) counted.failed = 1;
	return report({ name, ...counted, output }, since);
}

/** vitest's JSON: a file that could not be loaded has no tests and counts as one failure. */
export function countVitest(/** @type {any} */ report) {
	const unloaded = report.testResults.filter(
		(/** @type {any} */ file) => file.status === 'failed' && file.assertionResults.length === 0
	).length;
	return {
		passed: report.numPassedTests,
		failed: report.numFailedTests + unloaded,
		skipped: report.numPendingTests + report.numTodoTests
	};
}

/** Playwright's JSON. */
export function countPlaywright(/** @type {any} */ report) {
	const { expected, unexpected, flaky, skipped } = report.stats;
	return { passed: expected, failed: unexpected + flaky + report.errors.length, skipped };
}
