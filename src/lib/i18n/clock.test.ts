import { describe, expect, it } from 'vitest';
import {
	addDays,
	formatClock,
	formatDay,
	formatHours,
	formatUtcOffset,
	isoDateAt,
	standardOffsetMinutes,
	timeAtSite,
	utcOffsetMinutes
} from './clock';

// Offsets: IANA time zone database, from memory, not re-read (Rome UTC+1, summer +2; St. John's UTC-3:30; Kathmandu UTC+5:45 all year).
describe('the clock at the site', () => {
	it('knows the offset with and without summer time', () => {
		expect(utcOffsetMinutes(Date.UTC(2026, 11, 21, 8), 'Europe/Rome')).toBe(60);
		expect(utcOffsetMinutes(Date.UTC(2026, 5, 21, 8), 'Europe/Rome')).toBe(120);
		expect(utcOffsetMinutes(Date.UTC(2026, 0, 5), 'America/St_Johns')).toBe(-210);
	});

	it.each([
		['Europe/Rome', 60],
		['Australia/Sydney', 600],
		['Europe/Dublin', 0],
		['America/New_York', -300],
		['Australia/Adelaide', 570],
		['Australia/Lord_Howe', 630],
		['Asia/Kathmandu', 345],
		['Africa/Casablanca', 60],
		['UTC', 0]
	])('finds the standard time of %s: %d minutes', (zone, minutes) => {
		expect(standardOffsetMinutes(2026, zone)).toBe(minutes);
	});

	it('writes offsets in words', () => {
		expect([60, 0, -210, 345].map(formatUtcOffset)).toEqual(['UTC+1', 'UTC', 'UTC\u22123:30', 'UTC+5:45']);
	});

	it('shows the hour and the day of the site', () => {
		expect(formatClock(Date.UTC(2026, 11, 21, 7, 52), 'Europe/Rome')).toBe('08:52');
		expect(isoDateAt(Date.UTC(2026, 11, 31, 23, 30), 'Europe/Rome')).toBe('2027-01-01');
		expect(formatDay('2026-12-21')).toBe('21 December');
		expect(formatDay('2026-12-21', true)).toBe('21 December 2026');
		expect(formatHours(11.95)).toBe('11:57');
	});

	it('finds the instant of a clock reading, on days when the clock changes too', () => {
		for (const [date, minute] of [
			['2026-12-21', 532],
			['2026-03-29', 60],
			['2026-03-29', 240],
			['2026-10-25', 60],
			['2026-10-25', 300]
		] as const) {
			const timeMs = timeAtSite(date, minute, 'Europe/Rome');
			expect(isoDateAt(timeMs, 'Europe/Rome')).toBe(date);
			expect(formatClock(timeMs, 'Europe/Rome')).toBe(formatHours(minute / 60));
		}
	});

	it('steps over the end of a year and through a leap day', () => {
		expect(addDays('2026-12-31', 1)).toBe('2027-01-01');
		expect(addDays('2028-02-28', 1)).toBe('2028-02-29');
	});
});
