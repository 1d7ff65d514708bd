/** A failure that a person can act on: printed as one sentence, without a stack. */
export class Refusal extends Error {}

export function say(/** @type {string} */ text) {
	process.stdout.write(`${text}\n`);
}

/** Runs a command's main function; a Refusal ends it with status 1 and its sentence. */
export async function runMain(/** @type {() => Promise<void>} */ main) {
	try {
		await main();
	} catch (error) {
		process.stderr.write(
			error instanceof Refusal
				? `\n${error.message}\n`
				: `\n${error instanceof Error ? error.stack : error}\n`
		);
		process.exit(1);
	}
}

/** Whole and tenths of seconds since `since` (performance.now()), for progress lines. */
export function secondsSince(/** @type {number} */ since) {
	return ((performance.now() - since) / 1000).toFixed(1);
}
