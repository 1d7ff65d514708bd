import { z } from 'zod';
import type { WinterRule } from '../core/document';
import { quantity } from './quantity';

export const winterRuleSchema = z
	.discriminatedUnion(
		'kind',
		[
			z.strictObject({ kind: z.literal('clear-above'), elevationDeg: quantity(0, 90, 'degrees') }),
			z.strictObject({
				kind: z.literal('clear-window'),
				fromSolarHour: quantity(0, 24, 'solar hours'),
				toSolarHour: quantity(0, 24, 'solar hours')
			})
		],
		{ error: 'Give the winter rule as "clear-above" or "clear-window".' }
	)
	.superRefine((rule, context) => {
		if (rule.kind === 'clear-window' && rule.toSolarHour <= rule.fromSolarHour) {
			context.addIssue({
				code: 'custom',
				path: ['toSolarHour'],
				message: 'The window must end after it begins.'
			});
		}
	}) satisfies z.ZodType<WinterRule>;

/** What a project starts with: no shade while the sun is above 12 degrees on the shortest day. A proposal, to be edited. */
export const defaultWinterRule: WinterRule = { kind: 'clear-above', elevationDeg: 12 };
