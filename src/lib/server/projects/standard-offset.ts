/** Offset of a time zone from UTC at a moment, minutes, east positive. */
function offsetAt(timeZone: string, timeMs: number): number {
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
	const value = (type: Intl.DateTimeFormatPartTypes) =>
		Number(parts.find((part) => part.type === type)?.value);
	const local = Date.UTC(
		value('year'),
		value('month') - 1,
		value('day'),
		value('hour'),
		value('minute'),
		value('second')
	);
	return Math.round((local - timeMs) / 60_000);
}

/**
 * Standard-time offset of a time zone in a year, minutes east of UTC: the least of the offsets at the first of each
 * month, since summer time only ever adds. A zone that writes its winter time as the exception (Europe/Dublin) comes
 * out as its winter time too.
 */
export function standardOffsetMinutes(timeZone: string, year: number): number {
	let least = Infinity;
	for (let month = 0; month < 12; month += 1) {
		least = Math.min(least, offsetAt(timeZone, Date.UTC(year, month, 1, 12)));
	}
	return least;
}
