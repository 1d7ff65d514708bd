import { z } from 'zod';

/** RFC 9457 problem details, with the fields of bad input and, for a stale write, the revision that stands. */
export const problemSchema = z.object({
	type: z.string(),
	title: z.string(),
	status: z.number().int(),
	detail: z.string(),
	instance: z.string().optional(),
	errors: z.array(z.object({ path: z.string(), message: z.string() })).optional(),
	currentRevision: z.number().int().optional()
});
export type Problem = z.infer<typeof problemSchema>;

export interface FieldError {
	/** Dots between names and numbers, for example `trackers.3.eastM`; empty for the whole body. */
	path: string;
	message: string;
}

/** The validator's issues as fields and sentences; at most `limit`, the rest counted in the last line. */
export function fieldErrors(error: z.ZodError, limit = 50): FieldError[] {
	const found = error.issues.flatMap((issue): FieldError[] => {
		const path = issue.path.map(String).join('.');
		if (issue.code === 'unrecognized_keys') {
			return issue.keys.map((key) => ({
				path: path ? `${path}.${key}` : key,
				message: 'This field is not known here: take it out or correct its name.'
			}));
		}
		return [{ path, message: issue.message }];
	});
	if (found.length <= limit) return found;
	return [...found.slice(0, limit), { path: '', message: `and ${found.length - limit} more` }];
}
