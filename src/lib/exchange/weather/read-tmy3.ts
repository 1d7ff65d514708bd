import { refusal, type Refusal } from '../read-text';
import { cellName, plainNumber, readHead, weatherLines, type WeatherColumn, type WeatherLine } from './cells';
import {
	daysOf,
	finishReading,
	irradianceColumn,
	readRow,
	refuseGap,
	stampMs,
	type HourStamp,
	type WeatherColumns,
	type WeatherReading
} from './hours';

const WANTED = 'a TMY3 weather file';
const DATE = /^(\d{1,2})\/(\d{1,2})\/(\d{4})$/;
/** What spreadsheets make of a date. */
const ISO_DATE = /^(\d{4})-(\d{1,2})-(\d{1,2})$/;
/** 1:00, 01:00, 24:00, and 24:00:00, which a spreadsheet leaves at a day's end. */
const TIME = /^(\d{1,2}):(\d{2})(?::(\d{2}))?$/;

const isMissing = (value: number) => value <= -9900 || value >= 9999;

/**
 * Reads a TMY3 file: a line of the station, a line of names, then one row an hour of local standard time stamped with the
 * hour's end, 01:00 to 24:00. Irradiances are sums of the hour, Wh/m². Months come from different years.
 */
export function readTmy3(input: Uint8Array | string): WeatherReading | Refusal {
	const text = weatherLines(input, WANTED);
	return text.ok ? readTmy3Lines(text.lines, text.warnings) : text;
}

export function readTmy3Lines(
	lines: readonly WeatherLine[],
	before: readonly string[]
): WeatherReading | Refusal {
	const [station, names, ...rows] = lines;
	if (!names || !/^date/i.test(names.cells[0]) || !/^time/i.test(names.cells[1] ?? '')) {
		return refusal(
			'wrong-type',
			'The second row does not name the columns Date and Time, so this is no TMY3 file.',
			`Choose ${WANTED} as it was downloaded.`
		);
	}
	const head = readStation(station);
	if (!head.ok) return head;
	const columns = findColumns(names);
	if (!columns.ok) return columns;
	if (rows.length === 0) {
		return refusal('no-rows', 'No row of hours follows the names.', `Choose ${WANTED} as it was downloaded.`);
	}
	const weather = {
		place: head.place,
		utcOffsetHours: head.utcOffsetHours,
		rows: [] as WeatherReading['rows']
	};
	const warnings = [...before];
	const counts = { negative: 0 };
	let midnights = 0;
	let last: HourStamp | null = null;
	for (const row of rows) {
		const stamp = readStamp(row);
		if (!stamp.ok) return stamp;
		if (stamp.midnight) midnights += 1;
		const gap = last && refuseGap(row.line, last, stamp.stamp);
		if (gap) return gap;
		last = stamp.stamp;
		if (row.cells.length <= columns.last) {
			return refusal(
				'wrong-columns',
				`Row ${row.line} has ${row.cells.length} columns; at least ${columns.last + 1} are wanted.`,
				'Complete the row, or download the file again.'
			);
		}
		const startMs = stampMs(stamp.stamp) - head.utcOffsetHours * 3600000;
		const read = readRow(row, columns.columns, startMs, counts);
		if (!read.ok) return read;
		weather.rows.push(read.row);
	}
	if (midnights > 0) {
		warnings.push(
			'Midnights are written 0:00 of the new day; each was read as the end of the day before. Look at the closure.'
		);
	}
	return finishReading(weather, 'TMY3', warnings, counts);
}

/** id,name,state,zone,lat,lon,height and any number of trailing commas. A name with an unquoted comma shifts the rest. */
function readStation(
	line: WeatherLine
): ({ ok: true } & Pick<WeatherReading, 'place' | 'utcOffsetHours'>) | Refusal {
	const cells = [...line.cells];
	while (cells.length > 7 && cells[cells.length - 1] === '') cells.pop();
	const first = Math.max(3, cells.length - 4);
	const row = { line: line.line, cells };
	const zone = readHead(row, first, 'time zone', -12, 14);
	if (!zone.ok) return zone;
	const latitude = readHead(row, first + 1, 'latitude', -90, 90);
	if (!latitude.ok) return latitude;
	const longitude = readHead(row, first + 2, 'longitude', -180, 180);
	if (!longitude.ok) return longitude;
	const altitude = readHead(row, first + 3, 'height above the sea', -450, 9000);
	if (!altitude.ok) return altitude;
	return {
		ok: true,
		place: {
			name: cells.slice(1, first).join(', '),
			latitudeDeg: latitude.value,
			longitudeDeg: longitude.value,
			altitudeM: altitude.value
		},
		utcOffsetHours: zone.value
	};
}

/** Columns by their names: the irradiances must be there, air and wind may be missing. */
function findColumns(names: WeatherLine): { ok: true; columns: WeatherColumns; last: number } | Refusal {
	const find = (pattern: RegExp) => names.cells.findIndex((name) => pattern.test(name));
	const light = { ghi: find(/^GHI \(/i), dni: find(/^DNI \(/i), dhi: find(/^DHI \(/i) };
	for (const [key, index] of Object.entries(light)) {
		if (index >= 0) continue;
		const name = key.toUpperCase();
		return refusal(
			'no-column',
			`Row ${names.line} names no column ${name} (W/m^2).`,
			`Choose ${WANTED} with its row of names as it was downloaded.`
		);
	}
	const other = (pattern: RegExp, name: string, least: number, most: number): WeatherColumn => {
		const index = find(pattern);
		return { index: index < 0 ? null : index, name, least, most, isMissing };
	};
	return {
		ok: true,
		columns: {
			ghi: irradianceColumn(light.ghi, 'GHI', isMissing),
			dni: irradianceColumn(light.dni, 'DNI', isMissing),
			dhi: irradianceColumn(light.dhi, 'DHI', isMissing),
			tempC: other(/^Dry-bulb \(/i, 'dry bulb, °C', -90, 70),
			windMs: other(/^Wspd \(/i, 'wind speed, m/s', 0, 60)
		},
		last: Math.max(...Object.values(light))
	};
}

function readStamp(row: WeatherLine): { ok: true; stamp: HourStamp; midnight: boolean } | Refusal {
	const [date, time] = [row.cells[0], row.cells[1] ?? ''];
	const american = DATE.exec(date);
	const iso = ISO_DATE.exec(date);
	const [year, month, day] = american
		? [american[3], american[1], american[2]].map(plainNumber)
		: iso
			? iso.slice(1).map(plainNumber)
			: [Number.NaN, Number.NaN, Number.NaN];
	const leap = month === 2 && day === 29;
	if (!(month >= 1 && month <= 12 && day >= 1 && (day <= daysOf(year, month) || leap))) {
		return refusal(
			'bad-time',
			`${cellName(row.line, 0, 'date')} is "${date.slice(0, 30)}", not a day written month/day/year.`,
			'Write it as 1/31/1999: month first, the year with four digits.'
		);
	}
	const clock = TIME.exec(time);
	const hour = clock ? Number(clock[1]) : Number.NaN;
	if (!clock || !(hour <= 24) || Number(clock[2]) !== 0 || Number(clock[3] ?? 0) !== 0) {
		return refusal(
			'bad-time',
			`${cellName(row.line, 1, 'time')} is "${time.slice(0, 30)}", not the end of a whole hour.`,
			'Write hours by their end, 01:00 to 24:00.'
		);
	}
	if (hour > 0) return { ok: true, stamp: { year, month, day, hour: hour - 1 }, midnight: false };
	const dayBefore = new Date(Date.UTC(year, month - 1, day) - 86400000);
	return {
		ok: true,
		stamp: {
			year: dayBefore.getUTCFullYear(),
			month: dayBefore.getUTCMonth() + 1,
			day: dayBefore.getUTCDate(),
			hour: 23
		},
		midnight: true
	};
}
