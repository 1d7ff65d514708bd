import { z } from 'zod';
import { idSchema, label } from './quantity';

/** A plan as it is asked for. */
export const planRequestSchema = z.strictObject({
	layoutId: idSchema,
	reason: label(300, 'reason'),
	title: label(120, 'title').optional()
});
export type PlanRequest = z.input<typeof planRequestSchema>;

export const planFileSchema = z.strictObject({
	name: z.string(),
	mediaType: z.string(),
	bytes: z.number().int(),
	sha256: z.string().regex(/^[0-9a-f]{64}$/)
});

/** A plan as lists show it. */
export const planSummarySchema = z.strictObject({
	id: idSchema,
	projectId: idSchema,
	/** null when the layout was deleted afterwards. */
	layoutId: idSchema.nullable(),
	layoutRevision: z.number().int(),
	plotRevision: z.number().int(),
	/** `A`, `B`, ... */
	revision: z.string(),
	title: z.string(),
	reason: z.string(),
	issuedAt: z.iso.datetime({ offset: true }),
	/** Name of the person; null when the account is gone. */
	issuedBy: z.string().nullable(),
	files: z.array(planFileSchema)
});
export type PlanSummary = z.infer<typeof planSummarySchema>;
