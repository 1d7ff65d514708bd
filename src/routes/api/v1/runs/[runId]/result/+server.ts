import { endpoint } from '$lib/server/api/endpoint';
import { apiCalls } from '$lib/server/api/table';
import { getPackedResult, unpackResult } from '$lib/server/runs/get-run-result';

export const GET = endpoint(apiCalls.getRunResult, async ({ actor, params, event }) => {
	const { gzip, etag } = await getPackedResult(actor, params.runId);
	const headers = new Headers({
		'content-type': 'application/json',
		// A result never changes, but who may read it can.
		'cache-control': 'private, no-cache',
		vary: 'accept-encoding',
		etag: `"${etag}"`
	});
	if (event.request.headers.get('if-none-match') === `"${etag}"`) {
		return new Response(null, { status: 304, headers });
	}
	if (!/\bgzip\b/.test(event.request.headers.get('accept-encoding') ?? '')) {
		return new Response(await unpackResult(gzip), { headers });
	}
	headers.set('content-encoding', 'gzip');
	return new Response(new Uint8Array(gzip), { headers });
});
