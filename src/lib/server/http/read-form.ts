import { fail, type ActionFailure, type RequestEvent } from '@sveltejs/kit';
import type { z } from 'zod';
import { fieldErrors } from '$lib/schema/problem';
import { AppError, orPageError } from '../errors';
import { FORM_BYTES } from './body-limit';

/** What a refused form gives back to its page: the sentences by field, and what was typed, secrets left out. */
export interface RefusedForm {
	message: string;
	errors: Record<string, string>;
	typed: Record<string, string>;
}

const secrets = ['password', 'repeat', 'current'];

/** The fields of a form's body. A body that is no form, is broken off or too long is the sender's mistake. */
async function readFields(request: Request): Promise<FormData> {
	const type = request.headers.get('content-type') ?? '';
	if (!/^(multipart\/form-data|application\/x-www-form-urlencoded)\s*(;|$)/i.test(type))
		throw new AppError('unsupported', 'A form is sent as multipart/form-data or URL-encoded.');
	const body = await readAtMost(request, FORM_BYTES);
	try {
		return await new Response(body, { headers: { 'content-type': type } }).formData();
	} catch (thrown) {
		if (!(thrown instanceof TypeError)) throw thrown;
		throw new AppError('malformed', 'The form could not be read: load its page again and send it once more.');
	}
}

/** Reads the body and stops when more comes, whatever the header said. */
async function readAtMost(request: Request, mostBytes: number): Promise<Uint8Array<ArrayBuffer>> {
	const chunks: Uint8Array[] = [];
	let bytes = 0;
	const reader = request.body?.getReader();
	for (let part = await reader?.read(); part && !part.done; part = await reader?.read()) {
		bytes += part.value.byteLength;
		if (bytes > mostBytes)
			throw new AppError('too_large', `A form takes at most ${mostBytes / 1024 / 1024} MB: send less.`);
		chunks.push(part.value);
	}
	return new Uint8Array(Buffer.concat(chunks));
}

/**
 * A form action: reads and checks the fields, then does the work. Bad fields and the work's own refusals come
 * back to the page with what was typed; a redirect or an unexpected error goes on its way.
 */
export async function answerForm<Shape extends z.ZodType>(
	event: RequestEvent,
	shape: Shape,
	work: (form: z.output<Shape>) => Promise<void>
): Promise<ActionFailure<RefusedForm> | { done: true }> {
	const fields = Object.fromEntries(await orPageError(readFields(event.request)));
	const typed: Record<string, string> = {};
	for (const [name, value] of Object.entries(fields))
		if (typeof value === 'string' && !secrets.includes(name)) typed[name] = value;

	const read = shape.safeParse(fields);
	if (!read.success)
		return fail(422, {
			message: 'Something in the form needs another look.',
			errors: Object.fromEntries(
				fieldErrors(read.error)
					.reverse()
					.map(({ path, message }) => [path, message])
			),
			typed
		});
	try {
		await work(read.data);
		return { done: true };
	} catch (thrown) {
		if (!(thrown instanceof AppError)) throw thrown;
		const { retryAfterSeconds, errors } = thrown.details;
		if (retryAfterSeconds !== undefined) event.setHeaders({ 'retry-after': String(retryAfterSeconds) });
		return fail(thrown.status, {
			message: thrown.message,
			errors: Object.fromEntries((errors ?? []).map(({ path, message }) => [path, message])),
			typed
		});
	}
}
