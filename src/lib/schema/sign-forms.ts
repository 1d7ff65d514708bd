/** The forms of sign-up, sign-in and a forgotten password. */
import { z } from 'zod';
import { emailSchema } from './account';
import { label } from './quantity';

/** Long enough to resist guessing; no rules on what it is made of (NIST SP 800-63B). */
export const passwordLimits = { min: 10, max: 200 };

const newPassword = z
	.string({ error: 'Give a password.' })
	.min(passwordLimits.min, {
		error: `Use at least ${passwordLimits.min} characters; a few plain words do well.`
	})
	.max(passwordLimits.max, { error: `Keep the password within ${passwordLimits.max} characters.` });

const anyPassword = z
	.string({ error: 'Give your password.' })
	.min(1, { error: 'Give your password.' })
	.max(passwordLimits.max, { error: 'This is longer than any password here: check what was pasted.' });

export const signUpSchema = z.object({
	name: label(120, 'name'),
	teamName: label(120, 'team name'),
	email: emailSchema,
	password: newPassword
});
export type SignUpForm = z.infer<typeof signUpSchema>;

export const signInSchema = z.object({ email: emailSchema, password: anyPassword });
export type SignInForm = z.infer<typeof signInSchema>;

export const forgotSchema = z.object({ email: emailSchema });

export const resetSchema = z
	.object({ password: newPassword, repeat: z.string({ error: 'Repeat the password.' }) })
	.refine((form) => form.password === form.repeat, {
		path: ['repeat'],
		error: 'The two differ: type the same password twice.'
	});
