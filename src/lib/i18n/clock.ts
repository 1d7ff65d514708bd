const formatters = new Map<string, Intl.DateTimeFormat>();

/** Clock fields of an instant in a zone; building a formatter is slow, so each zone keeps one. */
function clockParts(timeMs: number, timeZone: string): Record<string, number> {
	let formatter = formatters.get(timeZone);
	if (!formatter) {
		formatter = new Intl.DateTimeFormat('en-GB', {
			timeZone,
			hourCycle: 'h23',
			year: 'numeric',
			month: '2-digit',
			day: '2-digit',
			hour: '2-digit',
			minute: '2-digit',
			second: '2-digit'
		});
		formatters.set(timeZone, formatter);
	}
	return Object.fromEntries(formatter.formatToParts(timeMs).map((part) => [part.type, Number(part.value)]));
}

/** Minutes that a zone's clock stands ahead of UTC at an instant, summer time included. */
export function utcOffsetMinutes(timeMs: number, timeZone: string): number {
	const { year, month, day, hour, minute, second } = clockParts(timeMs, timeZone);
	const asUtc = Date.UTC(year, month - 1, day, hour, minute, second);
	return Math.round((asUtc - Math.floor(timeMs / 1000) * 1000) / 60_000);
}

/**
 * The zone's standard time in a year, by which runs and pages alike sort steps into days and hours: the smaller of its
 * January and July offsets, since summer time adds in either hemisphere. A month that goes back for itself (Ramadan in
 * Morocco) does not make a standard time.
 */
export function standardOffsetMinutes(year: number, timeZone: string): number {
	return Math.min(
		utcOffsetMinutes(Date.UTC(year, 0, 1, 12), timeZone),
		utcOffsetMinutes(Date.UTC(year, 6, 1, 12), timeZone)
	);
}

/** `UTC+1`, `UTC−3:30`, `UTC`. */
export function formatUtcOffset(minutes: number): string {
	if (minutes === 0) return 'UTC';
	const size = Math.abs(minutes);
	const rest = size % 60 ? `:${String(size % 60).padStart(2, '0')}` : '';
	return `UTC${minutes < 0 ? '\u2212' : '+'}${Math.floor(size / 60)}${rest}`;
}

/** Clock time in a zone, `08:52`, rounded to the minute. */
export function formatClock(timeMs: number, timeZone: string): string {
	const { hour, minute } = clockParts(Math.round(timeMs / 60_000) * 60_000, timeZone);
	return `${String(hour).padStart(2, '0')}:${String(minute).padStart(2, '0')}`;
}

/** Hours 0..24 as a clock, `11:57`; used for solar time. */
export function formatHours(hours: number): string {
	const minutes = Math.round((((hours % 24) + 24) % 24) * 60) % 1440;
	return `${String(Math.floor(minutes / 60)).padStart(2, '0')}:${String(minutes % 60).padStart(2, '0')}`;
}

/** The calendar day of an instant in a zone, `2026-12-21`. */
export function isoDateAt(timeMs: number, timeZone: string): string {
	const { year, month, day } = clockParts(timeMs, timeZone);
	return `${String(year).padStart(4, '0')}-${String(month).padStart(2, '0')}-${String(day).padStart(2, '0')}`;
}

/** The instant at which a zone's clock shows this day and minute (0..1440); in a skipped hour, the instant after the skip. */
export function timeAtSite(dateIso: string, minuteOfDay: number, timeZone: string): number {
	const wanted = Date.parse(`${dateIso}T00:00:00Z`) + minuteOfDay * 60_000;
	const first = wanted - utcOffsetMinutes(wanted, timeZone) * 60_000;
	return wanted - utcOffsetMinutes(first, timeZone) * 60_000;
}

/** A calendar day some days later, `2026-12-21` + 1 = `2026-12-22`. */
export function addDays(dateIso: string, days: number): string {
	return new Date(Date.parse(`${dateIso}T00:00:00Z`) + days * 86_400_000).toISOString().slice(0, 10);
}

const dayFormat = new Intl.DateTimeFormat('en-GB', { timeZone: 'UTC', day: 'numeric', month: 'long' });
const dayYearFormat = new Intl.DateTimeFormat('en-GB', {
	timeZone: 'UTC',
	day: 'numeric',
	month: 'long',
	year: 'numeric'
});

/** `21 December`, with the year if asked. */
export function formatDay(dateIso: string, withYear = false): string {
	const timeMs = Date.parse(`${dateIso.slice(0, 10)}T00:00:00Z`);
	if (Number.isNaN(timeMs)) return '–';
	return (withYear ? dayYearFormat : dayFormat).format(timeMs);
}

/** Day and clock of an instant, `21 December 2026, 08:52`. */
export function formatMoment(timeMs: number, timeZone: string): string {
	return `${formatDay(isoDateAt(timeMs, timeZone), true)}, ${formatClock(timeMs, timeZone)}`;
}
