import { AppError } from '../errors';

/** The revision in an `If-Match` header, as `ETag` gave it: `"12"`. */
export function readIfMatch(header: string | null): number {
	if (header === null || header.trim() === '') {
		throw new AppError(
			'precondition_required',
			'Say which revision this changes, so that nobody’s work is lost.',
			{
				errors: [{ path: 'If-Match', message: 'Send the ETag that you read, such as If-Match: "12".' }]
			}
		);
	}
	const found = /^\s*(?:W\/)?"?(\d{1,9})"?\s*$/.exec(header);
	if (!found) {
		throw new AppError('malformed', 'The header If-Match names no revision.', {
			errors: [{ path: 'If-Match', message: 'Send the ETag that you read, such as If-Match: "12".' }]
		});
	}
	return Number(found[1]);
}

export const etagOf = (revision: number): string => `"${revision}"`;
