/** Coded errors of the server, and the one map that turns them into HTTP. */
import { error as pageError, isHttpError, isRedirect } from '@sveltejs/kit';
import type { FieldError, Problem } from '$lib/schema/problem';

const statuses = {
	malformed: [400, 'The request could not be read'],
	unauthorised: [401, 'Not signed in'],
	not_allowed: [403, 'Not allowed'],
	not_found: [404, 'Not found'],
	no_method: [405, 'Not a method that is taken here'],
	conflict: [409, 'In conflict with what is there'],
	stale: [412, 'Changed by somebody else meanwhile'],
	too_large: [413, 'Too large'],
	unsupported: [415, 'Not a type that is read here'],
	invalid: [422, 'Something in it is not right'],
	precondition_required: [428, 'If-Match is missing'],
	too_many: [429, 'Too many tries'],
	internal: [500, 'Something failed on the server'],
	unavailable: [503, 'Not available at the moment']
} as const satisfies Record<string, readonly [status: number, title: string]>;

export type ErrorCode = keyof typeof statuses;

interface Details {
	/** Which fields, and what to do about each. */
	errors?: FieldError[];
	/** For `stale`: the revision that stands. */
	currentRevision?: number;
	/** For `too_many` and `unavailable`. */
	retryAfterSeconds?: number;
}

/** What a use case throws when it refuses: the message is read by the person who asked. */
export class AppError extends Error {
	readonly status: number;

	constructor(
		readonly code: ErrorCode,
		message: string,
		readonly details: Details = {}
	) {
		super(message);
		this.name = 'AppError';
		this.status = statuses[code][0];
	}
}

/** The same words for what is not there and for what the asker may not know of. */
export const notFound = (): AppError =>
	new AppError('not_found', 'There is nothing at this address, or it is not yours to see.');

const codeOfStatus = (status: number): ErrorCode =>
	(Object.keys(statuses) as ErrorCode[]).find((code) => statuses[code][0] === status) ??
	(status < 500 ? 'malformed' : 'internal');

/** For a refusal that only has a status and a sentence. */
export const errorOfStatus = (status: number, message: string): AppError =>
	new AppError(codeOfStatus(status), message);

/** A thrown thing as an AppError; null when it was not thrown on purpose. */
export function asAppError(thrown: unknown): AppError | null {
	if (thrown instanceof AppError) return thrown;
	if (isHttpError(thrown)) return errorOfStatus(thrown.status, thrown.body.message);
	return null;
}

/**
 * A refusal as `application/problem+json` (RFC 9457).
 * @param reference request id, told as `instance` so that a log line can be found
 */
export function problemResponse(error: AppError, reference?: string): Response {
	const problem: Problem = {
		type: `urn:tiltyard:problem:${error.code.replaceAll('_', '-')}`,
		title: statuses[error.code][1],
		status: error.status,
		detail: error.message
	};
	if (reference) problem.instance = `urn:tiltyard:request:${reference}`;
	if (error.details.errors) problem.errors = error.details.errors;
	if (error.details.currentRevision !== undefined) problem.currentRevision = error.details.currentRevision;
	const headers = new Headers({ 'content-type': 'application/problem+json', 'cache-control': 'no-store' });
	if (error.details.retryAfterSeconds !== undefined)
		headers.set('retry-after', String(Math.ceil(error.details.retryAfterSeconds)));
	if (error.code === 'unauthorised') headers.set('www-authenticate', 'Bearer');
	return new Response(JSON.stringify(problem), { status: error.status, headers });
}

/** For page loads: a use case's refusal becomes the error page with the same status and sentence. */
export async function orPageError<T>(work: Promise<T> | (() => Promise<T>)): Promise<T> {
	try {
		return await (typeof work === 'function' ? work() : work);
	} catch (thrown) {
		if (isRedirect(thrown)) throw thrown;
		if (thrown instanceof AppError) pageError(thrown.status, { message: thrown.message });
		throw thrown;
	}
}
