import type { z } from 'zod';
import type { Scope } from '$lib/schema/account';

export type Method = 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';

/** Biggest body that a call may carry unless its line says otherwise, bytes. */
export const SMALL_BODY = 256 * 1024;
/** For calls that carry a whole document or a scene. */
export const LARGE_BODY = 16 * 1024 * 1024;

/** One call of the API: what validates it and what describes it. */
export interface CallSpec<
	Body extends z.ZodType | undefined = z.ZodType | undefined,
	Query extends z.ZodType | undefined = z.ZodType | undefined
> {
	method: Method;
	/** As in OpenAPI: `/api/v1/projects/{projectId}`. */
	path: string;
	summary: string;
	tag: string;
	/** What a token must be allowed to do; null for calls that need no sign-in. */
	scope: Scope | null;
	body: Body;
	query: Query;
	maxBytes: number;
	/** The call needs `If-Match` with the revision that the change was made on. */
	ifMatch: boolean;
	/** Tokens taken from the caller's allowance. */
	cost: number;
	answer: {
		status: number;
		description: string;
		schema?: z.ZodType;
		/** Other than JSON. */
		mediaType?: string;
		/** Carries the revision in `ETag`. */
		etag?: boolean;
	};
}

type Given<B extends z.ZodType | undefined, Q extends z.ZodType | undefined> = Pick<
	CallSpec,
	'method' | 'path' | 'summary' | 'tag' | 'answer'
> &
	Partial<Pick<CallSpec, 'scope' | 'maxBytes' | 'ifMatch' | 'cost'>> & { body?: B; query?: Q };

/** Fills in what most calls share: reading needs `read`, changing needs `write`, small bodies. */
export function call<
	B extends z.ZodType | undefined = undefined,
	Q extends z.ZodType | undefined = undefined
>(given: Given<B, Q>): CallSpec<B, Q> {
	return {
		scope: given.method === 'GET' ? 'read' : 'write',
		maxBytes: SMALL_BODY,
		ifMatch: false,
		cost: 1,
		...given,
		body: given.body as B,
		query: given.query as Q
	};
}
