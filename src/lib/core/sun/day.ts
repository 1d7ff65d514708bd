import { RADIANS_PER_DEGREE } from '../conventions';
import type { Place } from '../document';
import { sunPlace } from './ephemeris';
import { positionFromPlace, solarHour } from './position';

export interface SunDay {
	/** Polar day: the sun stays up; polar night: it stays down. */
	kind: 'normal' | 'polar-day' | 'polar-night';
	/** Upper limb on a flat horizon with 34 arcmin of refraction; null when there is no such moment. */
	riseMs: number | null;
	/** The sun crosses the meridian. */
	transitMs: number;
	setMs: number | null;
}

const HOUR_MS = 3600000;
const DAY_MS = 86400000;

/** UTC milliseconds of local midnight that begins an ISO date at a fixed offset from UTC. */
export function dayStartMs(dateIso: string, utcOffsetMinutes: number): number {
	return Date.parse(`${dateIso}T00:00:00Z`) - utcOffsetMinutes * 60000;
}

/** Height of the upper limb above the horizon as it is seen at the horizon, degrees. */
function limbHeightDeg(timeMs: number, place: { latitudeDeg: number; longitudeDeg: number }): number {
	const sun = sunPlace(timeMs);
	const centre = positionFromPlace(sun, place.latitudeDeg, place.longitudeDeg).elevationDeg;
	// 34 arcmin is the almanacs' refraction at the horizon; 959.63 arcsec the sun's semi-diameter at 1 au.
	return centre + 34 / 60 + 959.63 / 3600 / sun.distanceAu;
}

function crossingMs(
	lowMs: number,
	highMs: number,
	place: Pick<Place, 'latitudeDeg' | 'longitudeDeg'>
): number {
	let down = lowMs;
	let up = highMs;
	for (let k = 0; k < 28; k++) {
		const mid = (down + up) / 2;
		if (limbHeightDeg(mid, place) > 0) up = mid;
		else down = mid;
	}
	return Math.round((down + up) / 2);
}

/**
 * Rise, transit and set of one site day. `dateIso` is the site's date, `utcOffsetMinutes` its offset from UTC
 * (east positive). Within 30 s of the reference almanac; polar day and night have no rise and no set.
 */
export function sunDay(
	dateIso: string,
	place: Pick<Place, 'latitudeDeg' | 'longitudeDeg'>,
	utcOffsetMinutes: number
): SunDay {
	const noonMs = dayStartMs(dateIso, utcOffsetMinutes) + DAY_MS / 2;
	let transitMs = noonMs;
	for (let k = 0; k < 3; k++) {
		let aheadH = 12 - solarHour(transitMs, place.longitudeDeg);
		if (aheadH > 12) aheadH -= 24;
		if (aheadH < -12) aheadH += 24;
		// The sun's hour angle gains on the clock by at most 30 s a day: three rounds leave nothing.
		transitMs += aheadH * HOUR_MS;
	}
	transitMs = Math.round(transitMs);
	if (limbHeightDeg(transitMs, place) <= 0) {
		return { kind: 'polar-night', riseMs: null, transitMs, setMs: null };
	}
	const before = transitMs - DAY_MS / 2;
	const after = transitMs + DAY_MS / 2;
	const riseMs = limbHeightDeg(before, place) > 0 ? null : crossingMs(before, transitMs, place);
	const setMs = limbHeightDeg(after, place) > 0 ? null : crossingMs(after, transitMs, place);
	return { kind: riseMs === null && setMs === null ? 'polar-day' : 'normal', riseMs, transitMs, setMs };
}

const declinationDegAt = (timeMs: number): number => sunPlace(timeMs).declination / RADIANS_PER_DEGREE;
const isoDate = (timeMs: number): string => new Date(timeMs).toISOString().slice(0, 10);

/** UTC date of the greatest (sign 1) or least (sign -1) declination near a solstice month. */
function solsticeDate(year: number, month: number, sign: 1 | -1): string {
	let low = Date.UTC(year, month, 15);
	let high = Date.UTC(year, month, 28);
	for (let k = 0; k < 60; k++) {
		const a = low + (high - low) / 3;
		const b = high - (high - low) / 3;
		if (declinationDegAt(a) * sign < declinationDegAt(b) * sign) low = a;
		else high = b;
	}
	return isoDate((low + high) / 2);
}

/** Date of the shortest day (UTC date of the winter solstice of the hemisphere; the equator counts as north). */
export function shortestDate(latitudeDeg: number, year: number): string {
	return latitudeDeg >= 0 ? solsticeDate(year, 11, -1) : solsticeDate(year, 5, 1);
}

/** Date of the longest day (UTC date of the summer solstice of the hemisphere). */
export function longestDate(latitudeDeg: number, year: number): string {
	return latitudeDeg >= 0 ? solsticeDate(year, 5, 1) : solsticeDate(year, 11, -1);
}

/** UTC date of the March equinox. */
export function equinoxDate(year: number): string {
	let low = Date.UTC(year, 2, 15);
	let high = Date.UTC(year, 2, 26);
	for (let k = 0; k < 40; k++) {
		const mid = (low + high) / 2;
		if (declinationDegAt(mid) < 0) low = mid;
		else high = mid;
	}
	return isoDate((low + high) / 2);
}
