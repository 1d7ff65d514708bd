import type { WeatherRow, WeatherYear } from '$lib/core';
import { formatNumber } from '$lib/i18n';
import { refusal, type Refusal } from '../read-text';
import { NIGHT_OFFSET, readValue, type WeatherColumn, type WeatherLine } from './cells';

export interface WeatherReading extends WeatherYear {
	ok: true;
	format: 'EPW' | 'TMY3';
	/** True when every hour of a year is there, with or without a leap day. */
	wholeYear: boolean;
	warnings: string[];
	sentence: string;
}

export interface WeatherColumns {
	ghi: WeatherColumn;
	dni: WeatherColumn;
	dhi: WeatherColumn;
	tempC: WeatherColumn;
	windMs: WeatherColumn;
}

/** A calendar hour of local standard time; hour 0..23 in which it begins. */
export interface HourStamp {
	year: number;
	month: number;
	day: number;
	hour: number;
}

const HOUR_MS = 3600000;

/** Local clock of a stamp, counted as if it were UTC. */
export function stampMs({ year, month, day, hour }: HourStamp): number {
	return Date.UTC(year, month - 1, day, hour);
}

/** Days of a month 1..12 of a year. */
export function daysOf(year: number, month: number): number {
	return new Date(Date.UTC(year, month, 0)).getUTCDate();
}

/** The values of one line; small negative irradiances of the night become 0 and are counted. */
export function readRow(
	row: WeatherLine,
	columns: WeatherColumns,
	startMs: number,
	counts: { negative: number }
): { ok: true; row: WeatherRow } | Refusal {
	const values: Record<keyof WeatherColumns, number | null> = {
		ghi: null,
		dni: null,
		dhi: null,
		tempC: null,
		windMs: null
	};
	for (const field of ['ghi', 'dni', 'dhi', 'tempC', 'windMs'] as const) {
		const read = readValue(row, columns[field]);
		if (!read.ok) return read;
		values[field] = read.value;
	}
	for (const field of ['ghi', 'dni', 'dhi'] as const) {
		const value = values[field];
		if (value !== null && value < 0) {
			counts.negative += 1;
			values[field] = 0;
		}
	}
	return { ok: true, row: { startMs, ...values } };
}

/** Columns of irradiance in W/m² (Wh/m² of the hour): shared bounds. */
export function irradianceColumn(
	index: number,
	name: string,
	isMissing: WeatherColumn['isMissing']
): WeatherColumn {
	return { index, name: `${name}, Wh/m²`, least: NIGHT_OFFSET, most: 2000, isMissing };
}

/**
 * Refuses hours that are doubled, left out or out of order. In a typical year the months come from different years, so
 * at the end of a month any year may follow, and February may end on the 28th.
 */
export function refuseGap(line: number, before: HourStamp, now: HourStamp): Refusal | null {
	const expected = new Date(stampMs(before) + HOUR_MS);
	const monthEnds =
		before.hour === 23 && before.day >= (before.month === 2 ? 28 : daysOf(before.year, before.month));
	const nextMonth = (before.month % 12) + 1;
	if (stampMs(now) === expected.getTime()) return null;
	if (monthEnds && now.month === nextMonth && now.day === 1 && now.hour === 0) return null;
	const wanted: HourStamp = monthEnds
		? { year: now.year, month: nextMonth, day: 1, hour: 0 }
		: { year: before.year, month: before.month, day: expected.getUTCDate(), hour: expected.getUTCHours() };
	return refusal(
		stampMs(now) === stampMs(before) ? 'doubled-hour' : 'gap',
		`Row ${line} is the hour that ends on ${named(now)}; ${named(wanted)} should follow ${named(before)}.`,
		'Put the hours in order, each once. Where an hour has no values, keep its row and mark them missing.'
	);
}

/** "3 February, 14:00": month, day and the clock at the end of the hour. */
function named({ month, day, hour }: HourStamp): string {
	const names = 'January February March April May June July August September October November December'.split(
		' '
	);
	return `${day} ${names[month - 1]}, ${hour + 1}:00`;
}

/** Puts the reading together: warnings of what is missing or odd, and a sentence of what was read. */
export function finishReading(
	weather: WeatherYear,
	format: 'EPW' | 'TMY3',
	warnings: readonly string[],
	counts: { negative: number }
): WeatherReading {
	const { rows, place, utcOffsetHours } = weather;
	const all = [...warnings];
	const wholeYear = rows.length === 8760 || rows.length === 8784;
	if (!wholeYear) {
		all.push(
			`The file has ${formatNumber(rows.length)} hours; a year has 8,760. Yearly figures need the whole year.`
		);
	}
	const missing = rows.filter(({ ghi, dni, dhi }) => ghi === null || dni === null || dhi === null).length;
	if (missing > 0) {
		all.push(
			`${formatNumber(missing)} ${missing === 1 ? 'hour lacks' : 'hours lack'} an irradiance and count as dark.`
		);
	}
	if (counts.negative > 0) {
		all.push(`${formatNumber(counts.negative)} irradiances a little below zero were read as zero.`);
	}
	if (Math.abs(place.longitudeDeg / 15 - utcOffsetHours) > 4) {
		all.push(
			`The time zone UTC${utcOffsetHours < 0 ? '−' : '+'}${Math.abs(utcOffsetHours)} lies far from longitude ${formatNumber(place.longitudeDeg, 1)}°: look at the signs of both.`
		);
	}
	const sentence = `${format}, ${place.name || 'place without a name'}: ${formatNumber(rows.length)} hours at ${formatNumber(place.latitudeDeg, 3)}°, ${formatNumber(place.longitudeDeg, 3)}°, ${formatNumber(place.altitudeM)} m.`;
	return { ok: true, format, ...weather, wholeYear, warnings: all, sentence };
}
