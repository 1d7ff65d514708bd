import { eq } from 'drizzle-orm';
import type { SignInForm } from '$lib/schema/sign-forms';
import type { Actor } from './actor';
import { db } from '../db';
import { users } from '../db/schema';
import { isRefusedDemo } from '../env';
import { AppError } from '../errors';
import { countAttempt, forgetAttempt, forgiveAttempts } from './attempts';
import { passwordFits } from './password';

/**
 * Who signs in with this address and password. The answer is the same for a wrong password and an unknown address.
 * @param host where the request came from
 */
export async function signIn(form: SignInForm, host: string): Promise<Actor> {
	const tryOfHost = await countAttempt('sign-in-host', host);
	await countAttempt('sign-in', `${form.email} ${host}`);
	const [user] = await db.select().from(users).where(eq(users.email, form.email));
	const passwordHash = user && !isRefusedDemo(user.email) ? user.passwordHash : null;
	if (!(await passwordFits(passwordHash, form.password)))
		throw new AppError('invalid', 'This address and password do not belong together.', {
			errors: [
				{
					path: 'password',
					message: 'This address and password do not belong together. Check both, or set a new password.'
				}
			]
		});
	await forgiveAttempts('sign-in', `${form.email} ${host}`);
	// Only this one: who has an account must not buy new tries at other people's with it.
	await forgetAttempt(tryOfHost);
	return { userId: user.id };
}
