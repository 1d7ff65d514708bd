import { answer, endpoint } from '$lib/server/api/endpoint';
import { apiCalls } from '$lib/server/api/table';
import { createToken, listTokens } from '$lib/server/auth/tokens';

export const GET = endpoint(apiCalls.listTokens, async ({ actor }) =>
	answer({ items: await listTokens(actor), nextCursor: null })
);

export const POST = endpoint(apiCalls.createToken, async ({ actor, body, event }) =>
	answer(await createToken(actor, body, event.locals.token?.expiresAt), { status: 201 })
);
