import { z } from 'zod';
import type { Layout, Posture, Tracker } from '../core/document';
import { mountChoiceSchema } from './mount';
import { MAX_REACH_M } from './plot';
import { idSchema, label, quantity } from './quantity';
import { trackerModelSchema } from './tracker-model';

export const MAX_TRACKERS = 10_000;
export const MAX_MODELS_OF_LAYOUT = 50;

export const postureSchema = z.discriminatedUnion(
	'kind',
	[
		z.strictObject({ kind: z.literal('following') }),
		z.strictObject({ kind: z.literal('flat') }),
		z.strictObject({ kind: z.literal('night') }),
		z.strictObject({ kind: z.literal('wind') }),
		z.strictObject({
			kind: z.literal('standing'),
			azimuthDeg: quantity(0, 360, 'degrees clockwise from true north'),
			tiltDeg: quantity(0, 90, 'degrees')
		})
	],
	{ error: 'Give the posture as following, flat, night, wind or standing.' }
) satisfies z.ZodType<Posture>;

export const trackerSchema = z.strictObject({
	id: idSchema,
	tag: label(16, 'tag'),
	modelId: idSchema,
	eastM: quantity(-MAX_REACH_M, MAX_REACH_M, 'm east'),
	northM: quantity(-MAX_REACH_M, MAX_REACH_M, 'm north'),
	axisHeightM: quantity(0.2, 20, 'm').nullable(),
	posture: postureSchema
}) satisfies z.ZodType<Tracker>;

export const layoutSchema = z
	.strictObject({
		version: z.literal(1, { error: 'Give version 1.' }),
		models: z
			.array(trackerModelSchema)
			.max(MAX_MODELS_OF_LAYOUT, { error: `Keep a layout within ${MAX_MODELS_OF_LAYOUT} tracker models.` }),
		trackers: z
			.array(trackerSchema)
			.max(MAX_TRACKERS, { error: `Keep a layout within ${MAX_TRACKERS} trackers.` }),
		mounts: mountChoiceSchema
	})
	.superRefine((layout, context) => {
		const models = new Set<string>();
		layout.models.forEach((model, index) => {
			if (models.has(model.id)) {
				context.addIssue({
					code: 'custom',
					path: ['models', index, 'id'],
					message: 'This id is used twice.'
				});
			}
			models.add(model.id);
		});
		const trackers = new Set<string>();
		layout.trackers.forEach((tracker, index) => {
			if (trackers.has(tracker.id)) {
				context.addIssue({
					code: 'custom',
					path: ['trackers', index, 'id'],
					message: 'This id is used twice.'
				});
			}
			trackers.add(tracker.id);
			if (!models.has(tracker.modelId)) {
				context.addIssue({
					code: 'custom',
					path: ['trackers', index, 'modelId'],
					message: 'The layout holds no tracker model of this id: add the model to "models".'
				});
			}
		});
	}) satisfies z.ZodType<Layout>;

/** A layout with no tracker; models are added as trackers are placed. */
export function emptyLayout(): Layout {
	return { version: 1, models: [], trackers: [], mounts: { common: null, exceptions: {}, fromRunId: null } };
}
