import { z } from 'zod';
import type { RunInput } from '../core/results';
import { energyRequestSchema, energySettingsSchema, runEnergySchema } from './energy';
import { layoutSchema } from './layout';
import { placeSchema } from './place';
import { plotSchema } from './plot';
import { pageQuerySchema } from './page';
import { idSchema, quantity, wholeNumber } from './quantity';
import { winterRuleSchema } from './winter-rule';

export const runKindSchema = z.enum(['shade', 'mounts', 'answers'], {
	error: 'Give the kind as "shade", "mounts" or "answers".'
});
export type RunKind = z.infer<typeof runKindSchema>;

export const runStatusSchema = z.enum(['queued', 'working', 'done', 'failed', 'cancelled']);
export type RunStatus = z.infer<typeof runStatusSchema>;

const year = wholeNumber(1950, 2100);
const stepMinutes = wholeNumber(1, 20);
const treeYears = quantity(0, 100, 'years');

export const runInputSchema = z.strictObject({
	place: placeSchema,
	plot: plotSchema,
	layout: layoutSchema,
	winterRule: winterRuleSchema,
	year,
	stepMinutes,
	utcOffsetMinutes: quantity(-16 * 60, 16 * 60, 'minutes'),
	treeYears,
	energy: energySettingsSchema.optional()
}) satisfies z.ZodType<RunInput>;

/** A run as it is asked for. */
export const runRequestSchema = z
	.strictObject({
		kind: runKindSchema,
		layoutId: idSchema,
		year: year.optional(),
		stepMinutes: stepMinutes.default(10),
		treeYears: treeYears.default(0),
		energy: energyRequestSchema.optional()
	})
	.refine(({ kind, energy }) => kind === 'shade' || energy === undefined, {
		path: ['energy'],
		error: 'Energy belongs to a shade run: leave it out here, or ask for the kind "shade".'
	});
export type RunRequest = z.input<typeof runRequestSchema>;

/** A run as it is shown: times are ISO 8601 with offset. */
export const runSchema = z.strictObject({
	id: idSchema,
	projectId: idSchema,
	kind: runKindSchema,
	status: runStatusSchema,
	progress: z.number().min(0).max(1),
	stage: z.string(),
	layoutId: idSchema,
	layoutRevision: z.number().int(),
	plotRevision: z.number().int(),
	year: z.number().int(),
	stepMinutes: z.number().int(),
	treeYears: z.number(),
	energy: runEnergySchema.nullable(),
	inputHash: z.string(),
	coreVersion: z.string(),
	createdAt: z.iso.datetime({ offset: true }),
	startedAt: z.iso.datetime({ offset: true }).nullable(),
	finishedAt: z.iso.datetime({ offset: true }).nullable(),
	computeMs: z.number().nullable(),
	error: z.string().nullable(),
	outOfDate: z.boolean()
});
export type Run = z.infer<typeof runSchema>;

/** What the events of a run carry. */
export const runEventSchema = z.strictObject({
	status: runStatusSchema,
	progress: z.number().min(0).max(1),
	stage: z.string()
});
export type RunEvent = z.infer<typeof runEventSchema>;

export const runListQuerySchema = pageQuerySchema.extend({
	layoutId: idSchema.optional(),
	kind: runKindSchema.optional()
});
export type RunListQuery = z.output<typeof runListQuerySchema>;
