import type { RequestEvent } from '@sveltejs/kit';
import type { z } from 'zod';
import { fieldErrors } from '$lib/schema/problem';
import type { Actor } from '../auth/actor';
import { AppError, asAppError, problemResponse } from '../errors';
import { requireUser } from '../guard';
import { etagOf, readIfMatch } from './if-match';
import { takeAllowance } from './rate-limit';
import { readBody } from './read-body';
import type { CallSpec } from './spec';

type OutputOf<Shape> = Shape extends z.ZodType ? z.output<Shape> : undefined;

/** What a call is given once who asks, how often, and what was sent have been checked. */
export interface Asked<Body, Query> {
	actor: Actor;
	params: Record<string, string>;
	body: Body;
	query: Query;
	/** From `If-Match`; 0 for calls that take none. */
	revision: number;
	event: RequestEvent;
}

/** A request handler from a line of the API table and the work that the call does. */
export function endpoint<B extends z.ZodType | undefined, Q extends z.ZodType | undefined>(
	spec: CallSpec<B, Q>,
	work: (asked: Asked<OutputOf<B>, OutputOf<Q>>) => Promise<Response> | Response
) {
	return async (event: RequestEvent): Promise<Response> => {
		try {
			const actor = spec.scope === null ? { userId: '' } : requireUser(event);
			if (spec.scope !== null) takeAllowance(event.locals.token?.id ?? actor.userId, spec.cost);
			return await work({
				actor,
				params: event.params as Record<string, string>,
				query: (spec.query ? readQuery(event.url, spec.query) : undefined) as OutputOf<Q>,
				revision: spec.ifMatch ? readIfMatch(event.request.headers.get('if-match')) : 0,
				body: (spec.body ? await readBody(event.request, spec, spec.body) : undefined) as OutputOf<B>,
				event
			});
		} catch (thrown) {
			const refused = asAppError(thrown);
			if (!refused) throw thrown;
			return problemResponse(refused, event.locals.requestId);
		}
	};
}

function readQuery<Q extends z.ZodType>(url: URL, shape: Q): z.output<Q> {
	const read = shape.safeParse(Object.fromEntries(url.searchParams));
	if (!read.success) {
		throw new AppError('invalid', 'The address asks for something that is not right.', {
			errors: fieldErrors(read.error)
		});
	}
	return read.data;
}

/** A JSON answer; with a revision it carries the `ETag` that a later change needs. */
export function answer(
	value: unknown,
	options: { status?: number; revision?: number; location?: string } = {}
): Response {
	const headers = new Headers({ 'content-type': 'application/json', 'cache-control': 'no-store' });
	if (options.revision !== undefined) headers.set('etag', etagOf(options.revision));
	if (options.location) headers.set('location', options.location);
	return new Response(JSON.stringify(value), { status: options.status ?? 200, headers });
}

/** Done, with nothing to tell. */
export const noContent = (): Response => new Response(null, { status: 204 });
