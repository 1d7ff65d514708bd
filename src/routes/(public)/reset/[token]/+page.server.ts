import { redirect } from '@sveltejs/kit';
import { resetSchema } from '$lib/schema/sign-forms';
import { resetHolds, setPassword } from '$lib/server/auth/set-password';
import { answerForm } from '$lib/server/http/read-form';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ params, setHeaders }) => {
	// The address is a secret: it must not travel on to other pages' logs.
	setHeaders({ 'referrer-policy': 'no-referrer' });
	return { holds: await resetHolds(params.token) };
};

export const actions: Actions = {
	default: (event) =>
		answerForm(event, resetSchema, async ({ password }) => {
			await setPassword(event.params.token, password);
			redirect(303, '/sign-in?password-set');
		})
};
