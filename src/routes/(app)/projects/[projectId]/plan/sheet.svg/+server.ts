import { AppError, orPageError } from '$lib/server/errors';
import { requireUser } from '$lib/server/guard';
import { draftSheetSvg } from '$lib/server/plans/draft-plan';
import type { RequestHandler } from './$types';

/** One sheet of the draft plan: `?layout=…&number=1`. */
export const GET: RequestHandler = async (event) => {
	const actor = requireUser(event);
	const { searchParams } = event.url;
	const number = Number(searchParams.get('number'));
	const svg = await orPageError(async () => {
		if (!Number.isInteger(number) || number < 1) {
			throw new AppError('invalid', 'Give the sheet as number=1 or more.');
		}
		return draftSheetSvg(actor, event.params.projectId, searchParams.get('layout') ?? '', number);
	});
	return new Response(svg, {
		headers: { 'content-type': 'image/svg+xml; charset=utf-8', 'cache-control': 'private, no-store' }
	});
};
