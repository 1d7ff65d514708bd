import { AppError } from '../errors';

/** The end of the year 9999, the last that the database keeps, Unix milliseconds. */
const LAST_MS = 253_402_300_799_999;

/** Where a page ended, as an opaque text for the next call. */
export function writeCursor(parts: (string | number)[]): string {
	return Buffer.from(JSON.stringify(parts)).toString('base64url');
}

/** The parts of a cursor; anything that we did not write is refused. */
export function readCursor(text: string, kinds: ('string' | 'number')[]): (string | number)[] {
	const parts = parsed(text);
	const fits =
		Array.isArray(parts) &&
		parts.length === kinds.length &&
		parts.every((part, index) => typeof part === kinds[index] && isInRange(part));
	if (!fits) {
		throw new AppError('invalid', 'This cursor is not one of ours.', {
			errors: [{ path: 'cursor', message: 'Start from the first page and follow nextCursor.' }]
		});
	}
	return parts as (string | number)[];
}

/** Our numbers are places in a list and moments: whole, not negative, and what a date can hold. */
const isInRange = (part: string | number): boolean =>
	typeof part === 'string' || (Number.isInteger(part) && part >= 0 && part <= LAST_MS);

function parsed(text: string): unknown {
	try {
		return JSON.parse(Buffer.from(text, 'base64url').toString('utf8'));
	} catch (error) {
		if (error instanceof SyntaxError) return null;
		throw error;
	}
}
