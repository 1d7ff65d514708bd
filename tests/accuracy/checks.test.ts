/** Every check of src/lib/method against its own tolerance: the same definitions that the page "Method and checks" shows. */
import { describe, expect, it, vi } from 'vitest';
import { passes } from '../../src/lib/method/check';
import { effects } from '../../src/lib/method/effects';
import { checks } from '../../src/lib/method/measure';

// Long only on a machine that is busy with other things.
vi.setConfig({ testTimeout: 900_000 });

describe('the list of checks', () => {
	it('names every check once, gives each a source, and leaves no effect without one', () => {
		const ids = checks.map(({ id }) => id);
		expect(new Set(ids).size).toBe(ids.length);
		expect(checks.filter(({ source }) => source.length < 5)).toEqual([]);
		const bare = effects.filter(({ id }) => !checks.some(({ effect }) => effect === id));
		expect(bare.map(({ id }) => id)).toEqual([]);
	});

	it('fails what is off in the worst, off in the mean, no number, or not measured', () => {
		const check = { tolerance: { worst: 1, mean: 0.5 } };
		const measured = { worst: 1, mean: 0.5, count: 2, worstAt: 'here' };
		expect(passes(check, measured)).toBe(true);
		expect(passes(check, { ...measured, worst: 1.01 })).toBe(false);
		expect(passes(check, { ...measured, mean: 0.51 })).toBe(false);
		expect(passes(check, { ...measured, worst: Number.NaN })).toBe(false);
		expect(passes(check, { ...measured, count: 0 })).toBe(false);
	});
});

for (const effect of effects) {
	describe(effect.title, () => {
		for (const check of checks.filter((one) => one.effect === effect.id)) {
			it(`${check.title}, against ${check.against} (${check.source})`, () => {
				const measured = check.measure('whole');
				if (process.env.SHOW) {
					const digits = (value: number) => value.toPrecision(3);
					process.stdout.write(
						`${check.id}: worst ${digits(measured.worst)}, mean ${digits(measured.mean)} of ${digits(check.tolerance.worst)} ${check.unit}, ${measured.count} values, worst at ${measured.worstAt}\n`
					);
				}
				const words = `${check.id}: worst ${measured.worst} ${check.unit} at ${measured.worstAt}, mean ${measured.mean}, ${measured.count} values`;
				expect(passes(check, measured), words).toBe(true);
			});
		}
	});
}
