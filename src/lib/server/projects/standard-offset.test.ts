import { describe, expect, it } from 'vitest';
import { standardOffsetMinutes } from './standard-offset';

/** Offsets as the IANA time zone database has them; from memory, not re-read. */
describe('standard time', () => {
	it.each([
		['Europe/Rome', 60],
		['Europe/Dublin', 0],
		['America/New_York', -300],
		['Australia/Adelaide', 570],
		['Asia/Kathmandu', 345],
		['UTC', 0]
	])('of %s is %d minutes', (zone, minutes) => {
		expect(standardOffsetMinutes(zone, 2026)).toBe(minutes);
	});
});
