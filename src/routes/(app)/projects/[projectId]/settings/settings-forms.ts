import { z } from 'zod';
import { idSchema, label } from '$lib/schema';

export const layoutFormSchema = z.object({ layoutId: idSchema, layoutName: label(80, 'name') });

export const deleteFormSchema = z.object({
	typedName: z.string({ error: 'Write the name of the project.' })
});
