import { equinoxDate, longestDate, shortestDate, sunDay, sunPosition, type Place } from '$lib/core';
import { formatClock, isoDateAt, standardOffsetMinutes, timeAtSite } from '$lib/i18n';

const fiveMinutesMs = 300_000;
/** A time further than this from the noon of the date belongs to another date; the hour more than half a day is for summer time. */
const withinDayMs = 13 * 3_600_000;

/** The moment that is looked at: a date of the site, a time, and the sun then. */
export class Moment {
	#place: () => Place;
	#date = $state('');
	#timeMs = $state(0);

	/** The site's standard time, by which results are sorted into days. */
	readonly utcOffsetMinutes = $derived.by(() =>
		standardOffsetMinutes(Number(this.#date.slice(0, 4)), this.#place().timeZone)
	);

	/** Apparent direction of the sun. */
	readonly sun = $derived.by(() => {
		const { latitudeDeg, longitudeDeg } = this.#place();
		const position = sunPosition(this.#timeMs, latitudeDeg, longitudeDeg);
		return { azimuthDeg: position.azimuthDeg, elevationDeg: position.apparentElevationDeg };
	});

	/** Dates worth a jump in the year that is looked at. */
	readonly jumps = $derived.by(() => {
		const year = Number(this.#date.slice(0, 4));
		const { latitudeDeg } = this.#place();
		return {
			shortest: shortestDate(latitudeDeg, year),
			longest: longestDate(latitudeDeg, year),
			equinox: equinoxDate(year)
		};
	});

	/** Starts on the shortest day of the present year, in its morning. */
	constructor(place: () => Place, nowMs: number) {
		this.#place = place;
		this.#date = shortestDate(place().latitudeDeg, new Date(nowMs).getUTCFullYear());
		this.#timeMs = this.#morning();
	}

	get date(): string {
		return this.#date;
	}

	/** Setting the date keeps the site's clock time. */
	set date(iso: string) {
		if (iso === this.#date) return;
		const { timeZone } = this.#place();
		const [hours, minutes] = formatClock(this.#timeMs, timeZone).split(':').map(Number);
		this.#timeMs = timeAtSite(iso, hours * 60 + minutes, timeZone);
		this.#date = iso;
	}

	/** UTC milliseconds. */
	get timeMs(): number {
		return this.#timeMs;
	}

	/** Setting a time of another day sets the date as well. */
	set timeMs(ms: number) {
		this.#timeMs = ms;
		const { timeZone } = this.#place();
		if (Math.abs(ms - timeAtSite(this.#date, 720, timeZone)) > withinDayMs)
			this.#date = isoDateAt(ms, timeZone);
	}

	/** A telling moment: when the sun has climbed to a third of its noon height, to five minutes. */
	#morning(): number {
		const place = this.#place();
		const day = sunDay(this.#date, place, this.utcOffsetMinutes);
		const noonMs = day.transitMs ?? timeAtSite(this.#date, 720, place.timeZone);
		if (day.riseMs === null) return noonMs;
		const heightDeg = (ms: number): number =>
			sunPosition(ms, place.latitudeDeg, place.longitudeDeg).apparentElevationDeg;
		const goalDeg = heightDeg(noonMs) / 3;
		let ms = day.riseMs;
		while (ms < noonMs && heightDeg(ms) < goalDeg) ms += fiveMinutesMs;
		return Math.round(ms / fiveMinutesMs) * fiveMinutesMs;
	}
}
