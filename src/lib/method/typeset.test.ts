import { expect, it } from 'vitest';
import { typeset } from './typeset';

it('keeps units with their numbers and prints times and minus', () => {
	expect(typeset('0.3 m at 25 m, 1 % of it')).toBe('0.3\u00a0m at 25\u00a0m, 1\u00a0% of it');
	expect(typeset('48 x 48 rays, at -23.4 degrees')).toBe('48 × 48 rays, at −23.4 degrees');
	expect(typeset('global - (diffuse + beam cos z)')).toBe('global − (diffuse + beam cos z)');
	expect(typeset('mid-day 2-axis, 14 x, tables')).toBe('mid-day 2-axis, 14 x, tables');
});
