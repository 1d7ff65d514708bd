import { changeName } from '$lib/server/auth/change-name';
import { changePassword } from '$lib/server/auth/change-password';
import { openSession } from '$lib/server/auth/session';
import { createToken, listTokens, revokeToken } from '$lib/server/auth/tokens';
import { requireUser } from '$lib/server/guard';
import { answerForm } from '$lib/server/http/read-form';
import { nameFormSchema, passwordFormSchema, tokenFormSchema, tokenIdSchema } from './account-forms';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => ({ tokens: await listTokens(requireUser(event)) });

export const actions: Actions = {
	name: (event) => answerForm(event, nameFormSchema, ({ name }) => changeName(requireUser(event), name)),
	password: (event) =>
		answerForm(event, passwordFormSchema, async ({ current, password }) => {
			const actor = requireUser(event);
			await changePassword(actor, current, password, event.getClientAddress());
			await openSession(actor.userId, event.cookies);
		}),
	token: async (event) => {
		const actor = requireUser(event);
		let made: string | null = null;
		const answer = await answerForm(event, tokenFormSchema, async (form) => {
			made = (await createToken(actor, { ...form, scopes: [...form.scopes] })).token;
		});
		return made ? { madeToken: made as string } : answer;
	},
	revoke: (event) =>
		answerForm(event, tokenIdSchema, ({ tokenId }) => revokeToken(requireUser(event), tokenId))
};
