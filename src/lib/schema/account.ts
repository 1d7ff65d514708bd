import { z } from 'zod';
import { idSchema, label, wholeNumber } from './quantity';
import { roleSchema } from './project';

const moment = z.iso.datetime({ offset: true });

export const emailSchema = z
	.string({ error: 'Give an e-mail address.' })
	.trim()
	.toLowerCase()
	.max(254, { error: 'Keep the e-mail address within 254 characters.' })
	.pipe(z.email({ error: 'Give an e-mail address such as name@example.org.' }));

/** What a token may do: `read` everything that its person may read, `write` also changes. */
export const scopeSchema = z.enum(['read', 'write'], { error: 'Give scopes as "read" or "write".' });
export type Scope = z.infer<typeof scopeSchema>;

export const newTokenSchema = z.strictObject({
	name: label(80, 'name'),
	scopes: z
		.array(scopeSchema)
		.min(1, { error: 'Give at least one scope.' })
		.max(2, { error: 'Give each scope once.' })
		.default(['read', 'write']),
	expiresInDays: wholeNumber(1, 730).default(365)
});
export type NewToken = z.input<typeof newTokenSchema>;

export const tokenSchema = z.strictObject({
	id: idSchema,
	name: z.string(),
	scopes: z.array(scopeSchema),
	createdAt: moment,
	expiresAt: moment.nullable(),
	lastUsedAt: moment.nullable()
});
export type TokenInfo = z.infer<typeof tokenSchema>;

/** A token just made: the only time that its text is told. */
export const madeTokenSchema = tokenSchema.extend({ token: z.string() });
export type MadeToken = z.infer<typeof madeTokenSchema>;

export const meSchema = z.strictObject({
	id: idSchema,
	name: z.string(),
	email: z.string(),
	teams: z.array(z.strictObject({ id: idSchema, name: z.string(), role: roleSchema }))
});
export type Me = z.infer<typeof meSchema>;

export const invitationRequestSchema = z.strictObject({
	email: emailSchema,
	role: roleSchema,
	projectId: idSchema.optional()
});

export const memberSchema = z.strictObject({
	userId: idSchema,
	name: z.string(),
	email: z.string(),
	role: roleSchema,
	/** null for a member of the whole team. */
	projectId: idSchema.nullable(),
	projectName: z.string().nullable()
});
export type Member = z.infer<typeof memberSchema>;

export const invitationSchema = z.strictObject({
	id: idSchema,
	email: z.string(),
	role: roleSchema,
	projectId: idSchema.nullable(),
	createdAt: moment,
	expiresAt: moment
});
export type Invitation = z.infer<typeof invitationSchema>;
