import { endpoint, noContent } from '$lib/server/api/endpoint';
import { apiCalls } from '$lib/server/api/table';
import { revokeToken } from '$lib/server/auth/tokens';

export const DELETE = endpoint(apiCalls.deleteToken, async ({ actor, params }) => {
	await revokeToken(actor, params.tokenId);
	return noContent();
});
