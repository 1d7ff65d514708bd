import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { modelLibrary, newTrackerModelSchema, trackerModelShape } from '$lib/schema';
import { groups } from './model-fields';

const { id: _id, ...model } = modelLibrary[1];
const fields = groups.flatMap((group) => group.fields);

describe('the form of a tracker model', () => {
	it('has a field for every number that a model holds', () => {
		const numbers = Object.entries(model)
			.filter(([key, value]) => typeof value === 'number' && key !== 'windTiltDeg')
			.map(([key]) => key);
		const asked = fields.filter((field) => !field.optional).map((field) => field.key);
		expect(asked.sort()).toEqual(numbers.sort());
	});

	it('lets exactly those numbers stand empty that the schema lets out', () => {
		const leftOut = Object.entries(trackerModelShape)
			.filter(([, shape]) => shape instanceof z.ZodOptional && shape.unwrap() instanceof z.ZodNumber)
			.map(([key]) => key);
		expect(fields.filter((field) => field.optional).map((field) => field.key)).toEqual(
			expect.arrayContaining(leftOut)
		);
		expect(leftOut.length).toBe(fields.filter((field) => field.optional).length);
	});

	it.each(fields)('shows the range that the schema holds for $label', ({ key, min, max }) => {
		const messageFor = (value: number) => {
			const read = newTrackerModelSchema.safeParse({ ...model, [key]: value });
			return read.success ? '' : (read.error.issues.find((issue) => issue.path[0] === key)?.message ?? '');
		};
		expect(messageFor(max + 1)).toContain(`${min} to ${max}`);
		expect(messageFor(min - 1)).toContain(`${min} to ${max}`);
	});
});
