import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { root } from './paths.mjs';
import { Refusal, say, secondsSince } from './say.mjs';

const stamp = join(root, 'node_modules', '.tiltyard-lock-hash');

function lockHash() {
	return createHash('sha256')
		.update(readFileSync(join(root, 'package-lock.json')))
		.digest('hex');
}

/** Whether what npm noted at its last install is as new as the lock file: an install that somebody made by hand. */
function installedByHand() {
	const installed = join(root, 'node_modules', '.package-lock.json');
	if (!existsSync(installed)) return false;
	const wanted = JSON.parse(readFileSync(join(root, 'package-lock.json'), 'utf8')).packages;
	const present = JSON.parse(readFileSync(installed, 'utf8')).packages;
	return (
		Object.entries(present).every(([path, entry]) => wanted[path]?.version === entry.version) &&
		Object.entries(wanted).every(
			([path, entry]) =>
				path === '' || entry.optional || entry.peer || present[path]?.version === entry.version
		)
	);
}

/** `npm ci` when packages are missing or belong to another lock file. */
export function ensurePackages() {
	const wanted = lockHash();
	if (existsSync(stamp) && readFileSync(stamp, 'utf8') === wanted) return;
	if (!installedByHand()) {
		const since = performance.now();
		say('Installing packages from the lock file…');
		const result = spawnSync('npm', ['ci', '--no-audit', '--no-fund', '--loglevel=error'], {
			cwd: root,
			stdio: ['ignore', 'inherit', 'inherit'],
			// An operator's NODE_ENV=production would leave out what the build needs.
			env: { ...process.env, NODE_ENV: '' }
		});
		if (result.status !== 0)
			throw new Refusal('npm ci failed: see its messages above; is the package registry reachable?');
		say(`Packages installed in ${secondsSince(since)} s`);
	}
	writeFileSync(stamp, wanted);
}
