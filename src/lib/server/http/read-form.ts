import { fail, type ActionFailure, type RequestEvent } from '@sveltejs/kit';
import type { z } from 'zod';
import { fieldErrors } from '$lib/schema/problem';
import { AppError } from '../errors';

/** What a refused form gives back to its page: the sentences by field, and what was typed, secrets left out. */
export interface RefusedForm {
	message: string;
	errors: Record<string, string>;
	typed: Record<string, string>;
}

const secrets = ['password', 'repeat', 'current'];

/**
 * A form action: reads and checks the fields, then does the work. Bad fields and the work's own refusals come
 * back to the page with what was typed; a redirect or an unexpected error goes on its way.
 */
export async function answerForm<Shape extends z.ZodType>(
	event: RequestEvent,
	shape: Shape,
	work: (form: z.output<Shape>) => Promise<void>
): Promise<ActionFailure<RefusedForm> | { done: true }> {
	const fields = Object.fromEntries(await event.request.formData());
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
