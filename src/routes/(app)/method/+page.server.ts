import { measuredReport } from '$lib/method/measured';
import { requireUser } from '$lib/server/guard';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = (event) => {
	requireUser(event);
	return { report: measuredReport };
};
