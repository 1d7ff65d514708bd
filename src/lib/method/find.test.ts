import { describe, expect, it } from 'vitest';
import type { Effect } from './effect';
import { findChecks } from './find';
import type { MeasuredCheck } from './report';

const effect: Effect = {
	id: 'strings',
	title: 'Electrical effect of shade',
	words: 'A little shade takes more power than light.',
	sources: ['Martinez-Moreno, Muñoz and Lorenzo 2010'],
	neglected: [{ what: 'The converter', howBig: 'unknown' }]
};
const check = (title: string, source: string): MeasuredCheck => ({
	...{ id: title, effect: 'strings', title, against: 'rows', source, provenance: 'formula', unit: '' },
	...{ tolerance: { worst: 1, mean: 1 }, worst: 0, mean: 0, count: 1, worstAt: '', passes: true }
});
const checks = [check('Six rows', 'eq. 6'), check('Limits', 'Algebra')];

describe('finding on the method page', () => {
	it('shows everything without words, and all checks when the effect itself is meant', () => {
		expect(findChecks(effect, checks, '  ')).toHaveLength(2);
		expect(findChecks(effect, checks, 'munoz 2010')).toHaveLength(2);
	});

	it('shows the checks that hold all words, and nothing when none does', () => {
		expect(findChecks(effect, checks, 'shade ALGEBRA')?.map(({ title }) => title)).toEqual(['Limits']);
		expect(findChecks(effect, checks, 'refraction')).toBeNull();
	});
});
