import { solarHour, sunDay, sunPosition, type Place, type SunDay } from '$lib/core';
import { formatClock, isoDateAt, timeAtSite, utcOffsetMinutes } from '$lib/i18n';

const MINUTE_MS = 60_000;
const HOUR_MS = 3_600_000;

/** Light kept to both sides of rise and set, so that the hill stands on some ground. */
const MARGIN_MS = 20 * MINUTE_MS;

export interface BandDay {
	sun: SunDay;
	/** What the band spans, UTC milliseconds. */
	fromMs: number;
	toMs: number;
	/** The hill: apparent sun height, every few minutes from edge to edge; below the horizon negative. */
	hill: { timeMs: number; elevationDeg: number }[];
	/** Highest sun of the day. */
	noonDeg: number;
}

/** The day as the band draws it: first to last light, or the whole day where the sun does not rise or does not set. */
export function bandDay(dateIso: string, place: Place, stepMinutes = 4): BandDay {
	const noonMs = timeAtSite(dateIso, 720, place.timeZone);
	const sun = sunDay(dateIso, place, utcOffsetMinutes(noonMs, place.timeZone));
	const fromMs = sun.riseMs === null ? sun.transitMs - 12 * HOUR_MS : sun.riseMs - MARGIN_MS;
	const toMs = sun.setMs === null ? sun.transitMs + 12 * HOUR_MS : sun.setMs + MARGIN_MS;
	const steps = Math.max(2, Math.ceil((toMs - fromMs) / (stepMinutes * MINUTE_MS)));
	const hill = Array.from({ length: steps + 1 }, (_, index) => {
		const timeMs = fromMs + ((toMs - fromMs) * index) / steps;
		return { timeMs, elevationDeg: heightDeg(timeMs, place) };
	});
	return { sun, fromMs, toMs, hill, noonDeg: heightDeg(sun.transitMs, place) };
}

/** Apparent height of the sun, degrees. */
export function heightDeg(timeMs: number, place: Place): number {
	return sunPosition(timeMs, place.latitudeDeg, place.longitudeDeg).apparentElevationDeg;
}

export interface Tick {
	timeMs: number;
	label: string;
}

/** Whole clock hours of the site inside the band, every `everyHours`. */
export function clockTicks(day: BandDay, timeZone: string, everyHours: number): Tick[] {
	const ticks: Tick[] = [];
	const firstDate = isoDateAt(day.fromMs, timeZone);
	for (let hour = 0; hour <= 48; hour += everyHours) {
		const timeMs = timeAtSite(firstDate, hour * 60, timeZone);
		if (timeMs >= day.fromMs && timeMs <= day.toMs)
			ticks.push({ timeMs, label: formatClock(timeMs, timeZone) });
	}
	return ticks;
}

/** Whole hours of apparent solar time inside the band. */
export function solarTicks(day: BandDay, longitudeDeg: number, everyHours: number): Tick[] {
	const ticks: Tick[] = [];
	for (let hour = 0; hour <= 24; hour += everyHours) {
		let timeMs = day.sun.transitMs + (hour - 12) * HOUR_MS;
		// The equation of time drifts by at most 30 s a day: one correction leaves less than a second.
		let offHours = solarHour(timeMs, longitudeDeg) - (hour % 24);
		if (offHours > 12) offHours -= 24;
		if (offHours < -12) offHours += 24;
		timeMs -= offHours * HOUR_MS;
		if (timeMs >= day.fromMs && timeMs <= day.toMs) {
			ticks.push({ timeMs, label: `${String(hour % 24).padStart(2, '0')}:00` });
		}
	}
	return ticks;
}

/** Hours between labels so that each has at least `roomPx`. */
export function hoursPerTick(day: BandDay, widthPx: number, roomPx = 56): number {
	const hourPx = widthPx / ((day.toMs - day.fromMs) / HOUR_MS);
	return [1, 2, 3, 4, 6].find((hours) => hours * hourPx >= roomPx) ?? 12;
}

/** Top of the height scale: the noon sun with air above it, never so low that the rule falls off. */
export function topOfScaleDeg(noonDeg: number, ruleDeg: number | null): number {
	return Math.max(noonDeg * 1.12, (ruleDeg ?? 0) * 1.25, 5);
}

/** Spans of time, joined where they touch and cut to the band. */
export function cutSpans(
	spans: readonly { fromMs: number; toMs: number }[],
	fromMs: number,
	toMs: number
): { fromMs: number; toMs: number }[] {
	const joined: { fromMs: number; toMs: number }[] = [];
	for (const span of [...spans].sort((a, b) => a.fromMs - b.fromMs)) {
		const cut = { fromMs: Math.max(span.fromMs, fromMs), toMs: Math.min(span.toMs, toMs) };
		if (cut.toMs <= cut.fromMs) continue;
		const last = joined.at(-1);
		if (last && cut.fromMs <= last.toMs) last.toMs = Math.max(last.toMs, cut.toMs);
		else joined.push(cut);
	}
	return joined;
}

/** Mean shaded share of the field at a moment, between the day's computed times; null outside them. */
export function shareAt(day: { timesMs: number[]; fieldShare: number[] }, timeMs: number): number | null {
	const { timesMs, fieldShare } = day;
	const after = timesMs.findIndex((time) => time >= timeMs);
	if (after < 0) return null;
	if (timesMs[after] === timeMs) return fieldShare[after];
	if (after === 0) return null;
	const part = (timeMs - timesMs[after - 1]) / (timesMs[after] - timesMs[after - 1]);
	return fieldShare[after - 1] + (fieldShare[after] - fieldShare[after - 1]) * part;
}

interface SkylineRun {
	hidden: boolean;
	points: { timeMs: number; share: number }[];
}

/** The day's times in runs, the sun in front of the skyline or behind it; a hidden run reaches to its neighbours. */
export function skylineRuns(day: {
	timesMs: number[];
	fieldShare: number[];
	sunHidden: boolean[];
}): SkylineRun[] {
	const runs: SkylineRun[] = [];
	day.timesMs.forEach((timeMs, index) => {
		const hidden = day.sunHidden[index];
		const point = { timeMs, share: day.fieldShare[index] };
		const last = runs.at(-1);
		if (last && last.hidden === hidden) last.points.push(point);
		else {
			const before = last?.points.at(-1);
			if (last?.hidden) last.points.push(point);
			runs.push({ hidden, points: hidden && before ? [before, point] : [point] });
		}
	});
	return runs;
}
