import { forgotSchema } from '$lib/schema/sign-forms';
import { requestReset } from '$lib/server/auth/request-reset';
import { isLocal, origin, smtpUrl } from '$lib/server/env';
import { answerForm } from '$lib/server/http/read-form';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = () => ({ mailboxHere: isLocal() && smtpUrl() === null });

export const actions: Actions = {
	default: (event) =>
		answerForm(event, forgotSchema, ({ email }) =>
			requestReset(email, event.getClientAddress(), origin() ?? event.url.origin)
		)
};
