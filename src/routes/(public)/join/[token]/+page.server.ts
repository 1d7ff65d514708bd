import { fail, redirect } from '@sveltejs/kit';
import { AppError, orPageError } from '$lib/server/errors';
import { requireUser } from '$lib/server/guard';
import { acceptInvitation, readInvitation } from '$lib/server/teams/accept-invitation';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, params }) => ({
	offer: await orPageError(readInvitation(params.token)),
	signedInAs: locals.user?.email ?? null
});

export const actions: Actions = {
	default: async (event) => {
		const actor = requireUser(event);
		let joined: { projectId: string | null };
		try {
			joined = await acceptInvitation(actor, event.params.token);
		} catch (thrown) {
			if (!(thrown instanceof AppError)) throw thrown;
			return fail(thrown.status, { message: thrown.message });
		}
		redirect(303, joined.projectId ? `/projects/${joined.projectId}` : '/projects');
	}
};
