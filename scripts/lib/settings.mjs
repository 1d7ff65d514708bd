import { Refusal } from './say.mjs';

export const demoPeople = [
	'owner@tiltyard.test',
	'designer@tiltyard.test',
	'crew@tiltyard.test',
	'client@tiltyard.test'
];

export const demoPassword = process.env.DEMO_PASSWORD ?? 'tiltyard-demo';

/**
 * Whether the demo may be put into the database. An operator who runs with NODE_ENV=production on a server of
 * their own never gets accounts with a known password.
 */
export function demoAllowed(/** @type {boolean} */ ownDatabase) {
	return ownDatabase || process.env.NODE_ENV !== 'production';
}

const loopback = /^(127(\.\d{1,3}){3}|localhost|\[?::1\]?)$/i;

/**
 * Whether only this machine can reach the application: it listens on loopback and is known by a loopback address.
 * A name of its own means that something in front hands on what others send.
 */
export function isAtHome(/** @type {string} */ host, /** @type {string} */ origin) {
	return loopback.test(host) && URL.canParse(origin) && loopback.test(new URL(origin).hostname);
}

/**
 * The environment of the application's process.
 * TILTYARD_LOCAL=1: mail goes to the local catcher, and /mailbox can be read. Letters hold links that set passwords,
 * so this is never on where other machines can reach the application.
 * TILTYARD_SEED_DEMO=1: the application seeds the demo when it starts and the demo is not there.
 * @param {{ url: string, ownDatabase: boolean, host: string, origin: string }} options
 */
export function appEnvironment({ url, ownDatabase, host, origin }) {
	if (process.env.DEMO_PASSWORD !== undefined && process.env.DEMO_PASSWORD.length < 8)
		throw new Refusal('DEMO_PASSWORD needs at least 8 characters.');
	const demo = demoAllowed(ownDatabase);
	const env = { ...process.env, DATABASE_URL: url, ORIGIN: origin, DEMO_PASSWORD: demoPassword };
	return {
		...env,
		TILTYARD_LOCAL: demo && isAtHome(host, origin) ? '1' : '0',
		TILTYARD_SEED_DEMO: demo ? '1' : '0'
	};
}

export function demoLines() {
	const width = Math.max(...demoPeople.map((email) => email.length));
	return [
		`Demo sign-ins, all with the password ${demoPassword}`,
		...demoPeople.map((email) => `  ${email.padEnd(width)}`.trimEnd())
	];
}
