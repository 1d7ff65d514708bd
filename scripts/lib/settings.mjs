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

/**
 * The environment of the application's process.
 * TILTYARD_LOCAL=1: mail goes to the local catcher, /mailbox can be read.
 * TILTYARD_SEED_DEMO=1: the application seeds the demo when it starts and the demo is not there.
 * @param {{ url: string, ownDatabase: boolean, origin: string }} options
 */
export function appEnvironment({ url, ownDatabase, origin }) {
	if (process.env.DEMO_PASSWORD !== undefined && process.env.DEMO_PASSWORD.length < 8)
		throw new Refusal('DEMO_PASSWORD needs at least 8 characters.');
	const demo = demoAllowed(ownDatabase);
	const env = { ...process.env, DATABASE_URL: url, ORIGIN: origin, DEMO_PASSWORD: demoPassword };
	return {
		...env,
		TILTYARD_LOCAL: demo ? '1' : '0',
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
