import { createHash } from 'node:crypto';
import { existsSync, mkdirSync } from 'node:fs';
import { tmpdir, userInfo } from 'node:os';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';

/** The checkout. */
export const root = join(dirname(fileURLToPath(import.meta.url)), '..', '..');

/** Everything that the commands keep between runs; git-ignored. */
export const dataRoot = join(root, '.data');

/** A file or folder under `.data`, whose parent exists afterwards. */
export function dataPath(/** @type {string[]} */ ...parts) {
	const path = join(dataRoot, ...parts);
	mkdirSync(dirname(path), { recursive: true });
	return path;
}

/**
 * A folder for a Unix socket. The kernel allows 107 bytes for the whole path, so a checkout deep down
 * in the file system gets a short folder under the system's temporary directory instead.
 */
export function socketDirectory(/** @type {string} */ preferred) {
	if (Buffer.byteLength(join(preferred, 'mariadb.sock')) <= 100) return preferred;
	const short = createHash('sha256').update(preferred).digest('hex').slice(0, 10);
	const directory = join(tmpdir(), `tiltyard-${userInfo().uid}-${short}`);
	mkdirSync(directory, { recursive: true, mode: 0o700 });
	return directory;
}

/** The first of the named programs that exists in PATH or in the system's sbin folders (often missing from a user's PATH). */
export function findProgram(/** @type {string[]} */ ...names) {
	const folders = [
		...(process.env.PATH ?? '').split(':'),
		'/usr/local/sbin',
		'/usr/sbin',
		'/sbin',
		'/usr/bin'
	];
	for (const name of names)
		for (const folder of folders) {
			const path = folder && join(folder, name);
			if (path && existsSync(path)) return path;
		}
	return null;
}
