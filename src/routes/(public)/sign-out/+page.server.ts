import { redirect } from '@sveltejs/kit';
import { closeSession } from '$lib/server/auth/session';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = ({ locals }) => {
	if (!locals.user) redirect(303, '/sign-in');
	return { email: locals.user.email };
};

export const actions: Actions = {
	default: async ({ locals, cookies }) => {
		if (locals.sessionId) await closeSession(locals.sessionId, cookies);
		redirect(303, '/sign-in');
	}
};
