import { z } from 'zod';
import { wholeNumber } from './quantity';

export const DEFAULT_PAGE_SIZE = 50;
export const MAX_PAGE_SIZE = 200;

/** Query of a list: how many, and where the page before ended. */
export const pageQuerySchema = z.object({
	limit: z
		.string()
		.regex(/^\d{1,6}$/, { error: `Give a whole number from 1 to ${MAX_PAGE_SIZE}.` })
		.transform(Number)
		.pipe(wholeNumber(1, MAX_PAGE_SIZE))
		.default(DEFAULT_PAGE_SIZE),
	cursor: z
		.string()
		.max(200, { error: 'This cursor is not one of ours: start from the first page.' })
		.optional()
});
export type PageQuery = z.output<typeof pageQuerySchema>;

export interface Page<T> {
	items: T[];
	/** Give it as `cursor` to go on; null on the last page. */
	nextCursor: string | null;
}

export function pageSchema<T extends z.ZodType>(item: T) {
	return z.strictObject({ items: z.array(item), nextCursor: z.string().nullable() });
}
