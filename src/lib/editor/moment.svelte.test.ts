import { describe, expect, it } from 'vitest';
import { formatClock } from '$lib/i18n';
import { Moment } from './moment.svelte';

const place = {
	latitudeDeg: 41.2,
	longitudeDeg: 14.5,
	altitudeM: 300,
	timeZone: 'Europe/Rome',
	magneticDeclinationDeg: 4
};
const now = Date.UTC(2026, 5, 1);

describe('the moment', () => {
	it('begins in the morning of the shortest day of the year, with the sun a third as high as at noon', () => {
		const moment = new Moment(() => place, now);
		// December solstice 2026: 21 December 20:50 UT (US Naval Observatory, value from memory).
		expect(moment.date).toBe('2026-12-21');
		expect(moment.sun.azimuthDeg).toBeLessThan(180);
		// Noon height 90 - 41.2 - 23.44 = 25.4 degrees.
		expect(moment.sun.elevationDeg).toBeGreaterThan(25.4 / 3 - 1);
		expect(moment.sun.elevationDeg).toBeLessThan(25.4 / 3 + 1.5);
	});

	it('keeps the clock time over a change of date, summer time or not', () => {
		const moment = new Moment(() => place, now);
		const before = formatClock(moment.timeMs, place.timeZone);
		moment.date = '2026-06-21';
		expect(formatClock(moment.timeMs, place.timeZone)).toBe(before);
		expect(moment.utcOffsetMinutes).toBe(60);
	});

	it('changes the date when a time of another day is set', () => {
		const moment = new Moment(() => place, now);
		moment.timeMs = Date.UTC(2026, 2, 20, 9);
		expect(moment.date).toBe('2026-03-20');
	});

	it('begins in June south of the equator', () => {
		const south = new Moment(() => ({ ...place, latitudeDeg: -19.6, timeZone: 'Africa/Harare' }), now);
		expect(south.date.slice(0, 7)).toBe('2026-06');
	});
});
