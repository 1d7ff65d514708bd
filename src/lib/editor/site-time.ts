/**
 * Offset of a time zone's standard time from UTC, minutes, in one year: the smaller of the offsets in January and in July.
 * Results are sorted into days and hours by it, so that a day never has 23 or 25 hours.
 * An unknown zone name falls back to the whole-hour offset of the longitude.
 */
export function standardOffsetMinutes(timeZone: string, year: number, longitudeDeg: number): number {
	try {
		const january = offsetMinutes(Date.UTC(year, 0, 15), timeZone);
		const july = offsetMinutes(Date.UTC(year, 6, 15), timeZone);
		return Math.min(january, july);
	} catch (error) {
		// Intl answers an unknown zone with a RangeError; anything else is our own mistake.
		if (!(error instanceof RangeError)) throw error;
		return Math.round(longitudeDeg / 15) * 60;
	}
}

function offsetMinutes(timeMs: number, timeZone: string): number {
	const parts = new Intl.DateTimeFormat('en-US', {
		timeZone,
		hourCycle: 'h23',
		year: 'numeric',
		month: 'numeric',
		day: 'numeric',
		hour: 'numeric',
		minute: 'numeric',
		second: 'numeric'
	}).formatToParts(timeMs);
	const part = (type: string): number => Number(parts.find((p) => p.type === type)?.value);
	const wall = Date.UTC(
		part('year'),
		part('month') - 1,
		part('day'),
		part('hour'),
		part('minute'),
		part('second')
	);
	return Math.round((wall - timeMs) / 60_000);
}

const dayMs = 86_400_000;

/** UTC time of the start of a site day, milliseconds. */
export function dayStartMs(dateIso: string, utcOffsetMinutes: number): number {
	return Date.parse(`${dateIso}T00:00:00Z`) - utcOffsetMinutes * 60_000;
}

/** The site date at a UTC time. */
export function siteDate(timeMs: number, utcOffsetMinutes: number): string {
	return new Date(timeMs + utcOffsetMinutes * 60_000).toISOString().slice(0, 10);
}

/** The same clock time (standard time) on another date. */
export function sameClockOn(dateIso: string, timeMs: number, utcOffsetMinutes: number): number {
	const wall = timeMs + utcOffsetMinutes * 60_000;
	return dayStartMs(dateIso, utcOffsetMinutes) + (((wall % dayMs) + dayMs) % dayMs);
}
