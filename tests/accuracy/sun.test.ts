import { describe, expect, it } from 'vitest';
import { equinoxDate, longestDate, shortestDate } from '../../src/lib/core';

describe('days of the year', () => {
	// Public almanac: 2026 Mar 20 14:46, Jun 21 08:24, Dec 21 20:50 UTC; 2027 Dec 22 02:42 UTC.
	it('finds solstices and equinox of 2026 and 2027', () => {
		expect(equinoxDate(2026)).toBe('2026-03-20');
		expect(shortestDate(45, 2026)).toBe('2026-12-21');
		expect(longestDate(45, 2026)).toBe('2026-06-21');
		expect(shortestDate(-35, 2026)).toBe('2026-06-21');
		expect(shortestDate(45, 2027)).toBe('2027-12-22');
	});
});
