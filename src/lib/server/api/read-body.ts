import type { z } from 'zod';
import { fieldErrors } from '$lib/schema/problem';
import { AppError } from '../errors';
import type { CallSpec } from './spec';

/** The body of a call, checked against its shape. */
export async function readBody<Body extends z.ZodType>(
	request: Request,
	spec: CallSpec,
	shape: Body
): Promise<z.output<Body>> {
	const type = request.headers.get('content-type') ?? '';
	if (!/^application\/(?:json|[\w.-]+\+json)\s*(?:;|$)/i.test(type)) {
		throw new AppError(
			'unsupported',
			type ? `A body of type ${type.slice(0, 80)} is not read here.` : 'The body has no type.',
			{ errors: [{ path: '', message: 'Send JSON with the header "content-type: application/json".' }] }
		);
	}
	const read = shape.safeParse(parseJson(await readText(request, spec.maxBytes)));
	if (!read.success) {
		throw new AppError('invalid', 'Some fields are not right; nothing was changed.', {
			errors: fieldErrors(read.error)
		});
	}
	return read.data;
}

/** Reads at most `maxBytes` of UTF-8, and stops reading when more comes, whatever the header said. */
async function readText(request: Request, maxBytes: number): Promise<string> {
	const declared = Number(request.headers.get('content-length') ?? 0);
	if (declared > maxBytes) throw tooLarge(maxBytes);
	if (!request.body) return '';
	const decoder = new TextDecoder('utf-8', { fatal: true });
	const reader = request.body.getReader();
	let text = '';
	let bytes = 0;
	try {
		for (;;) {
			const { done, value } = await reader.read();
			if (done) return text + decoder.decode();
			bytes += value.byteLength;
			// Left unread and not cancelled: that would cut the line before the answer is out.
			if (bytes > maxBytes) throw tooLarge(maxBytes);
			text += decoder.decode(value, { stream: true });
		}
	} catch (error) {
		if (error instanceof TypeError) {
			throw new AppError('malformed', 'The body is not UTF-8 text.', {
				errors: [{ path: '', message: 'Save or send it as UTF-8.' }]
			});
		}
		if (isServerLimit(error)) throw tooLarge(maxBytes);
		throw error;
	}
}

/** The server in front has a limit of its own, which ends the stream with this status. */
function isServerLimit(error: unknown): boolean {
	return typeof error === 'object' && error !== null && 'status' in error && error.status === 413;
}

function tooLarge(maxBytes: number): AppError {
	const most = maxBytes >= 1024 * 1024 ? `${maxBytes / 1024 / 1024} MB` : `${maxBytes / 1024} kB`;
	return new AppError('too_large', `At most ${most} are taken here: send less, or in parts.`);
}

function parseJson(text: string): unknown {
	try {
		return JSON.parse(text);
	} catch (error) {
		if (!(error instanceof SyntaxError)) throw error;
		throw new AppError('malformed', 'The body is not JSON.', {
			errors: [
				{
					path: '',
					message: `${error.message.slice(0, 200)}. Numbers are written plainly: NaN and Infinity are not JSON.`
				}
			]
		});
	}
}
