import { spawnSync } from 'node:child_process';
import { userInfo } from 'node:os';
import { findProgram } from './paths.mjs';
import { Refusal, say } from './say.mjs';

/**
 * Installs Debian packages when that is possible without asking; otherwise refuses with one sentence
 * that says what to type.
 * @param {string[]} packages
 * @param {string} why what they are needed for, to end the sentence "... is needed to"
 */
export function installDebianPackages(packages, why) {
	const list = packages.join(' ');
	const apt = findProgram('apt-get');
	const asRoot = userInfo().uid === 0;
	const sudo = asRoot ? null : findProgram('sudo');
	const maySudo = sudo !== null && spawnSync(sudo, ['-n', 'true'], { stdio: 'ignore' }).status === 0;
	if (!apt || (!asRoot && !maySudo))
		throw new Refusal(
			`${list} is needed to ${why}, and this user may not install it: run "sudo apt-get install ${list}" once, then repeat this command.`
		);
	say(`Installing ${list} (needed to ${why})…`);
	// RUNLEVEL=1 keeps the package from starting a system-wide service: the checkout runs its own process.
	const settings = ['DEBIAN_FRONTEND=noninteractive', 'RUNLEVEL=1'];
	const runApt = (/** @type {string[]} */ args) =>
		spawnSync(
			asRoot ? 'env' : /** @type {string} */ (sudo),
			[...(asRoot ? [] : ['-n', 'env']), ...settings, apt, '-qq', '-o=Dpkg::Use-Pty=0', ...args],
			{ stdio: ['ignore', 'ignore', 'inherit'] }
		).status;
	const install = ['install', '-y', '--no-install-recommends', ...packages];
	// The package lists of a fresh machine are empty or old: fetch them, but try what is there if that fails.
	runApt(['update']);
	if (runApt(install) !== 0)
		throw new Refusal(
			`${list} is needed to ${why}, and apt-get could not install it: see its messages above, run "apt-get install ${list}" yourself, then repeat this command.`
		);
}
