import { z } from 'zod';
import { idSchema, label, scopeSchema } from '$lib/schema';
import { passwordLimits } from '$lib/schema/sign-forms';

export const nameFormSchema = z.object({ name: label(120, 'name') });

export const passwordFormSchema = z
	.object({
		current: z
			.string({ error: 'Give your present password.' })
			.min(1, { error: 'Give your present password.' })
			.max(1000),
		password: z
			.string({ error: 'Give a new password.' })
			.min(passwordLimits.min, {
				error: `Use at least ${passwordLimits.min} characters; a few plain words do well.`
			})
			.max(passwordLimits.max, { error: `Keep the password within ${passwordLimits.max} characters.` }),
		repeat: z.string({ error: 'Repeat the new password.' })
	})
	.refine((form) => form.password === form.repeat, {
		path: ['repeat'],
		error: 'The two differ: type the same password twice.'
	});

/** What a token may do, as one choice; `days` empty never expires. */
export const tokenFormSchema = z
	.object({
		tokenName: label(80, 'name'),
		may: z.enum(['read', 'write'], { error: 'Choose what the token may do.' }),
		days: z.enum(['30', '90', '365', '730'], { error: 'Choose how long the token holds.' })
	})
	.transform(({ tokenName, may, days }) => ({
		name: tokenName,
		scopes: may === 'write' ? scopeSchema.options : (['read'] as const),
		expiresInDays: Number(days)
	}));

export const tokenIdSchema = z.object({ tokenId: idSchema });
