import { AppError } from '../errors';

const megabyte = 1024 * 1024;

/** Largest body of a page's form. */
export const FORM_BYTES = 1 * megabyte;

/** Largest body by the beginning of the path; documents with 100,000 corners fit into the API's. */
const limits: [prefix: string, bytes: number][] = [
	['/api/', 16 * megabyte],
	['/', FORM_BYTES]
];

/** Refuses a body that says it is too long, before any of it is read. The server's own limit stops unannounced ones. */
export function refuseLongBody(path: string, contentLength: string | null): void {
	const length = Number(contentLength ?? 0);
	const [, most] = limits.find(([prefix]) => path.startsWith(prefix))!;
	if (!(length > most)) return;
	throw new AppError(
		'too_large',
		`This is ${(length / megabyte).toFixed(1)} MB and at most ${most / megabyte} MB are taken here: send less, or in parts.`
	);
}
