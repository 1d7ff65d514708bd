import { describe, expect, it } from 'vitest';
import {
	emptyLayout,
	emptyPlot,
	fieldErrors,
	layoutSchema,
	migrate,
	modelLibrary,
	plotSchema,
	readLayout,
	readPlot,
	ringProblem,
	trackerModelSchema,
	turnedRing,
	winterRuleSchema
} from './index';

describe('documents', () => {
	it('accepts what a new project starts with', () => {
		expect(readPlot(emptyPlot())).toEqual(emptyPlot());
		expect(readLayout(emptyLayout())).toEqual(emptyLayout());
	});

	it('accepts every model of the library and finds no id twice', () => {
		for (const model of modelLibrary) expect(trackerModelSchema.parse(model)).toEqual(model);
		expect(new Set(modelLibrary.map((model) => model.id)).size).toBe(modelLibrary.length);
	});

	it('keeps every library table at least 0.5 m above level ground at its steepest', () => {
		for (const model of modelLibrary) {
			const halfM = model.heightM / 2 + model.frameMarginM;
			const steepest = (model.maxTiltDeg * Math.PI) / 180;
			const lowestM =
				model.axisHeightM +
				model.tableOffsetM * Math.cos(steepest) -
				(halfM - model.centreShiftM) * Math.sin(steepest);
			expect(lowestM, model.name).toBeGreaterThan(0.5);
		}
	});

	it.each([Number.NaN, Infinity, -Infinity, '3', null])(
		'refuses %s as a set-back and names the field',
		(value) => {
			const answer = plotSchema.safeParse({ ...emptyPlot(), setBackM: value });
			expect(answer.success).toBe(false);
			if (!answer.success) {
				expect(fieldErrors(answer.error)).toEqual([
					{ path: 'setBackM', message: 'Give a number from 0 to 500 m.' }
				]);
			}
		}
	);

	it('refuses a field that it does not know instead of losing it', () => {
		const answer = plotSchema.safeParse({ ...emptyPlot(), setBack: 3 });
		expect(answer.success).toBe(false);
		if (!answer.success) expect(fieldErrors(answer.error)[0].path).toBe('setBack');
	});

	it('refuses a tracker whose model the layout does not hold', () => {
		const answer = layoutSchema.safeParse({
			...emptyLayout(),
			trackers: [
				{
					id: 'a',
					tag: 'A01',
					modelId: 'none',
					eastM: 0,
					northM: 0,
					axisHeightM: null,
					posture: { kind: 'following' }
				}
			]
		});
		expect(answer.success).toBe(false);
		if (!answer.success) expect(fieldErrors(answer.error)[0].path).toBe('trackers.0.modelId');
	});

	it('refuses a winter window that ends before it begins', () => {
		expect(
			winterRuleSchema.safeParse({ kind: 'clear-window', fromSolarHour: 14, toSolarHour: 10 }).success
		).toBe(false);
	});
});

describe('rings', () => {
	it('refuses a boundary that crosses itself and names the ring', () => {
		const bowTie: [number, number][] = [
			[0, 0],
			[12, 9],
			[10, 0],
			[0, 10]
		];
		expect(ringProblem(bowTie)).toMatch(/crosses itself/);
		const answer = plotSchema.safeParse({ ...emptyPlot(), boundary: [{ outer: bowTie, holes: [] }] });
		expect(answer.success).toBe(false);
		if (!answer.success) expect(fieldErrors(answer.error)[0].path).toBe('boundary.0.outer');
	});

	it('accepts a concave ring and turns it either way', () => {
		const ring: [number, number][] = [
			[0, 0],
			[10, 0],
			[10, 10],
			[5, 2],
			[0, 10]
		];
		expect(ringProblem(ring)).toBeNull();
		expect(turnedRing(ring, true)).toEqual(ring);
		expect(turnedRing(turnedRing(ring, false), true)).toEqual(ring);
	});

	it('names a corner that is drawn twice and a ring with no area', () => {
		expect(
			ringProblem([
				[0, 0],
				[0, 0],
				[5, 5]
			])
		).toMatch(/corners 1 and 2/);
		expect(
			ringProblem([
				[0, 0],
				[5, 5],
				[10, 10]
			])
		).toMatch(/no area|touches/);
	});
});

describe('refusals', () => {
	it('say what to give for a field that is missing or of another type', () => {
		const refused = plotSchema.safeParse({ ...emptyPlot(), boundary: null, obstacles: undefined });
		expect(fieldErrors(refused.error!)).toEqual([
			{ path: 'boundary', message: 'Give a list.' },
			{ path: 'obstacles', message: 'This is missing: give a list.' }
		]);
		expect(fieldErrors(plotSchema.safeParse('x').error!)).toEqual([
			{ path: '', message: 'Give an object with its fields.' }
		]);
	});
});

describe('names of obstacles', () => {
	it('keep no control characters', () => {
		const box = { id: 'b', kind: 'box', eastM: 0, northM: 0, sizeXM: 1, sizeYM: 1, heightM: 1, turnDeg: 0 };
		const named = (name: string) =>
			plotSchema.parse({ ...emptyPlot(), obstacles: [{ ...box, name }] }).obstacles[0].name;
		expect(named(' old\u0000barn\n')).toBe('old barn');
		expect(named('')).toBe('');
		expect(() => named('x'.repeat(81))).toThrow('Keep the name within 80 characters.');
	});
});

describe('versions', () => {
	it('runs the steps that an older document needs, in order', () => {
		const steps = [
			{ from: 2, upgrade: (d: Record<string, unknown>) => ({ ...d, second: d.first }) },
			{ from: 1, upgrade: (d: Record<string, unknown>) => ({ ...d, first: 'x' }) }
		];
		expect(migrate({ version: 1 }, steps)).toEqual({ version: 3, first: 'x', second: 'x' });
		expect(migrate({ version: 3 }, steps)).toEqual({ version: 3 });
		expect(migrate('nonsense', steps)).toBe('nonsense');
	});
});
