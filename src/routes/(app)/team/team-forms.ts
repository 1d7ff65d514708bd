import { z } from 'zod';
import { emailSchema, idSchema, roleSchema } from '$lib/schema';

/** An invitation into the whole team, or into one project when that is given. */
export const inviteFormSchema = z
	.object({
		teamId: idSchema,
		email: emailSchema,
		role: roleSchema,
		projectId: z.union([z.literal(''), idSchema])
	})
	.transform(({ projectId, ...form }) => (projectId ? { ...form, projectId } : form));

export const invitationFormSchema = z.object({ invitationId: idSchema });

export const memberFormSchema = z.object({
	teamId: idSchema,
	userId: idSchema,
	projectId: z.union([z.literal(''), idSchema])
});

export const modelFormSchema = z.object({ modelId: idSchema });
