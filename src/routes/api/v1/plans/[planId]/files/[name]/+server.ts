import { endpoint } from '$lib/server/api/endpoint';
import { apiCalls } from '$lib/server/api/table';
import { getPlanFile } from '$lib/server/plans/get-plan-file';

export const GET = endpoint(apiCalls.getPlanFile, async ({ actor, params, event }) => {
	const file = await getPlanFile(actor, params.planId, params.name);
	const etag = `"${file.sha256}"`;
	const headers = new Headers({
		'content-type': file.mediaType,
		'content-disposition': `attachment; filename="${encodeURIComponent(file.name)}"`,
		'cache-control': 'private, no-cache',
		etag
	});
	if (event.request.headers.get('if-none-match') === etag)
		return new Response(null, { status: 304, headers });
	headers.set('content-length', String(file.bytes.byteLength));
	return new Response(new Uint8Array(file.bytes), { headers });
});
