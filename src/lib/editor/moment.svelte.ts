import { equinoxDate, longestDate, shortestDate, sunDay, sunPosition, type Place } from '$lib/core';
import { sameClockOn, siteDate, standardOffsetMinutes } from './site-time';

const fiveMinutesMs = 300_000;

/** The moment that is looked at: a date of the site, a time, and the sun then. */
export class Moment {
	#place: () => Place;
	#date = $state('');
	#timeMs = $state(0);

	readonly utcOffsetMinutes = $derived.by(() => {
		const { timeZone, longitudeDeg } = this.#place();
		return standardOffsetMinutes(timeZone, Number(this.#date.slice(0, 4)), longitudeDeg);
	});

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

	/** Setting the date keeps the clock time. */
	set date(iso: string) {
		if (iso === this.#date) return;
		this.#timeMs = sameClockOn(iso, this.#timeMs, this.utcOffsetMinutes);
		this.#date = iso;
	}

	/** UTC milliseconds. */
	get timeMs(): number {
		return this.#timeMs;
	}

	set timeMs(ms: number) {
		this.#timeMs = ms;
		this.#date = siteDate(ms, this.utcOffsetMinutes);
	}

	/** A telling moment: when the sun has climbed to a third of its noon height, to five minutes. */
	#morning(): number {
		const place = this.#place();
		const day = sunDay(this.#date, place, this.utcOffsetMinutes);
		const noonMs = day.transitMs ?? Date.parse(`${this.#date}T12:00:00Z`) - this.utcOffsetMinutes * 60_000;
		if (day.riseMs === null) return noonMs;
		const heightDeg = (ms: number): number =>
			sunPosition(ms, place.latitudeDeg, place.longitudeDeg).apparentElevationDeg;
		const goalDeg = heightDeg(noonMs) / 3;
		let ms = day.riseMs;
		while (ms < noonMs && heightDeg(ms) < goalDeg) ms += fiveMinutesMs;
		return Math.round(ms / fiveMinutesMs) * fiveMinutesMs;
	}
}
