import type { RequestHandler } from '@sveltejs/kit';
import { notFound, problemResponse } from '$lib/server/errors';

/** Addresses under /api that are none of ours are answered like the others: as problem details. */
export const fallback: RequestHandler = ({ locals }) => problemResponse(notFound(), locals.requestId);
