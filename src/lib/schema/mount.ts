import { z } from 'zod';
import type { Mount, MountChoice } from '../core/document';
import { idSchema, quantity } from './quantity';

export const mountSchema = z.strictObject({
	edge: z.enum(['top', 'bottom', 'left', 'right'], { error: 'Give the edge as top, bottom, left or right.' }),
	alongM: quantity(-25, 25, 'm from the middle of the edge'),
	outM: quantity(-5, 5, 'm beyond the glass edge'),
	forwardM: quantity(-1, 5, 'm in front of the glass')
}) satisfies z.ZodType<Mount>;

export const mountChoiceSchema = z.strictObject({
	common: mountSchema.nullable(),
	exceptions: z.record(idSchema, mountSchema),
	fromRunId: idSchema.nullable()
}) satisfies z.ZodType<MountChoice>;
