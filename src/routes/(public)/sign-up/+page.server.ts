import { redirect } from '@sveltejs/kit';
import { signUpSchema } from '$lib/schema/sign-forms';
import { openSession } from '$lib/server/auth/session';
import { signUp } from '$lib/server/auth/sign-up';
import { nextPath } from '$lib/server/http/next-path';
import { answerForm } from '$lib/server/http/read-form';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = ({ locals, url }) => {
	if (locals.actor) redirect(303, nextPath(url));
	return { query: url.search };
};

export const actions: Actions = {
	default: (event) =>
		answerForm(event, signUpSchema, async (form) => {
			const actor = await signUp(form, event.getClientAddress());
			await openSession(actor.userId, event.cookies);
			redirect(303, nextPath(event.url));
		})
};
