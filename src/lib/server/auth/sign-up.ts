import type { SignUpForm } from '$lib/schema/sign-forms';
import type { Actor } from './actor';
import { db } from '../db';
import { isDuplicate } from '../db/duplicate';
import { newId } from '../db/ids';
import { users } from '../db/schema';
import { AppError } from '../errors';
import { insertTeam } from '../teams/create-team';
import { countAttempt } from './attempts';
import { hashPassword } from './password';

/** Makes a person and their team, which they own. */
export async function signUp(form: SignUpForm, host: string): Promise<Actor> {
	await countAttempt('sign-up', host);
	const passwordHash = await hashPassword(form.password);
	const userId = newId();
	try {
		await db.transaction(async (tx) => {
			const { email, name } = form;
			await tx.insert(users).values({ id: userId, email, name, passwordHash, createdAt: new Date() });
			await insertTeam(tx, userId, form.teamName);
		});
	} catch (error) {
		if (!isDuplicate(error)) throw error;
		const message = 'There is an account with this address already: sign in, or set a new password.';
		throw new AppError('conflict', message, { errors: [{ path: 'email', message }] });
	}
	return { userId };
}
