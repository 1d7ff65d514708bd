import { z } from 'zod';
import type { Layout, Plot, TrackerModel } from '../core/document';
import { layoutSchema } from './layout';
import { newPlaceSchema, placeSchema } from './place';
import { plotSchema } from './plot';
import { idSchema, label } from './quantity';
import type { PlanSummary } from './plan';
import type { Run } from './run';
import { winterRuleSchema } from './winter-rule';

export const projectNameSchema = label(120, 'name');
export const notesSchema = z
	.string({ error: 'Give the notes as text.' })
	.max(4000, { error: 'Keep the notes within 4000 characters.' });

export const newProjectSchema = z.strictObject({
	name: projectNameSchema,
	place: newPlaceSchema,
	teamId: idSchema.optional(),
	winterRule: winterRuleSchema.optional(),
	notes: notesSchema.optional()
});
export type NewProject = z.input<typeof newProjectSchema>;

export const projectChangeSchema = z
	.strictObject({
		name: projectNameSchema.optional(),
		place: placeSchema.optional(),
		winterRule: winterRuleSchema.optional(),
		notes: notesSchema.optional()
	})
	.refine((change) => Object.keys(change).length > 0, {
		error: 'Give at least one of name, place, winterRule, notes.'
	});
export type ProjectChange = z.input<typeof projectChangeSchema>;

const moment = z.iso.datetime({ offset: true });

export const roleSchema = z.enum(['owner', 'designer', 'crew', 'client']);

export const projectSchema = z.strictObject({
	id: idSchema,
	name: z.string(),
	notes: z.string(),
	place: placeSchema,
	winterRule: winterRuleSchema,
	teamId: idSchema,
	role: roleSchema,
	createdAt: moment,
	updatedAt: moment
});
export type Project = z.infer<typeof projectSchema>;

/** A line of the project list. */
export const projectSummarySchema = z.strictObject({
	id: idSchema,
	name: z.string(),
	place: placeSchema,
	teamId: idSchema,
	teamName: z.string(),
	role: roleSchema,
	trackerCount: z.number().int(),
	updatedAt: moment
});
export type ProjectSummary = z.infer<typeof projectSummarySchema>;

export const plotAnswerSchema = z.strictObject({
	document: plotSchema,
	revision: z.number().int(),
	updatedAt: moment
});

export const plotSaveSchema = z.strictObject({ document: plotSchema });

export const newLayoutSchema = z.strictObject({
	name: label(80, 'name'),
	document: layoutSchema.optional(),
	copyOf: idSchema.optional()
});
export type NewLayout = z.input<typeof newLayoutSchema>;

export const layoutSaveSchema = z.strictObject({ document: layoutSchema });
export const layoutNameSchema = z.strictObject({ name: label(80, 'name') });

export const layoutSummarySchema = z.strictObject({
	id: idSchema,
	projectId: idSchema,
	name: z.string(),
	revision: z.number().int(),
	trackerCount: z.number().int(),
	updatedAt: moment
});
export type LayoutSummary = z.infer<typeof layoutSummarySchema>;

export const layoutAnswerSchema = z.strictObject({
	id: idSchema,
	projectId: idSchema,
	name: z.string(),
	revision: z.number().int(),
	document: layoutSchema,
	updatedAt: moment
});
export type LayoutAnswer = z.infer<typeof layoutAnswerSchema>;

export const layoutRevisionSchema = z.strictObject({
	revision: z.number().int(),
	trackerCount: z.number().int(),
	savedBy: z.string().nullable(),
	/** Whether whoever asks saved it. */
	savedByYou: z.boolean(),
	savedAt: moment
});
export type LayoutRevision = z.infer<typeof layoutRevisionSchema>;

/** Everything that the pages of a project open with. */
export interface OpenProject {
	project: Project;
	plot: { document: Plot; revision: number };
	layouts: LayoutSummary[];
	layout: { id: string; name: string; revision: number; document: Layout };
	/** The library and the team's own. */
	models: TrackerModel[];
	/** Latest of the layout, null while none was asked for. */
	runs: { shade: Run | null; mounts: Run | null; answers: Run | null };
	plans: PlanSummary[];
}
