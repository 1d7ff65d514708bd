import { redirect } from '@sveltejs/kit';
import { signInSchema } from '$lib/schema/sign-forms';
import { openSession } from '$lib/server/auth/session';
import { signIn } from '$lib/server/auth/sign-in';
import { isLocal, seedsDemo } from '$lib/server/env';
import { nextPath } from '$lib/server/http/next-path';
import { answerForm } from '$lib/server/http/read-form';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = ({ locals, url }) => {
	if (locals.actor) redirect(303, nextPath(url));
	return {
		query: url.search,
		onTheWay: url.searchParams.has('next'),
		passwordSet: url.searchParams.has('password-set'),
		demo: seedsDemo() && isLocal()
	};
};

export const actions: Actions = {
	default: (event) =>
		answerForm(event, signInSchema, async (form) => {
			const actor = await signIn(form, event.getClientAddress());
			await openSession(actor.userId, event.cookies);
			redirect(303, nextPath(event.url));
		})
};
