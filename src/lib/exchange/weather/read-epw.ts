import { refusal, type Refusal } from '../read-text';
import { cellName, plainNumber, readHead, weatherLines, type WeatherLine } from './cells';
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

const WANTED = 'an EPW weather file';
const HEAD_LINES = 8;
/** Through the wind speed, the last column that is read. */
const LEAST_COLUMNS = 22;

/** Places and missing marks by the EnergyPlus data dictionary; a value at or above its mark is missing. */
const COLUMNS: WeatherColumns = {
	ghi: irradianceColumn(13, 'global horizontal', (value) => value >= 9999),
	dni: irradianceColumn(14, 'direct normal', (value) => value >= 9999),
	dhi: irradianceColumn(15, 'diffuse horizontal', (value) => value >= 9999),
	tempC: { index: 6, name: 'dry bulb, °C', least: -70, most: 70, isMissing: (value) => value >= 99.9 },
	windMs: { index: 21, name: 'wind speed, m/s', least: 0, most: 60, isMissing: (value) => value >= 999 }
};

/**
 * Reads an EPW file: eight head lines, then one row an hour of local standard time, where hour h covers h - 1 to h.
 * Irradiances are sums of the hour, Wh/m². The minute column is not looked at: files write 0, 30 and 60 there.
 */
export function readEpw(input: Uint8Array | string): WeatherReading | Refusal {
	const text = weatherLines(input, WANTED);
	return text.ok ? readEpwLines(text.lines, text.warnings) : text;
}

export function readEpwLines(
	lines: readonly WeatherLine[],
	before: readonly string[]
): WeatherReading | Refusal {
	const location = lines[0];
	if (location?.cells[0].toUpperCase() !== 'LOCATION') {
		return refusal(
			'wrong-type',
			'Row 1 does not begin with LOCATION, so this is no EPW file.',
			`Choose ${WANTED} as it was downloaded.`
		);
	}
	const head = readLocation(location);
	if (!head.ok) return head;
	const firstRow = lines.findIndex(({ cells }) => /^\d{4}$/.test(cells[0]));
	const periods = lines.slice(0, firstRow < 0 ? HEAD_LINES : firstRow).find(isPeriods);
	if (!periods || firstRow < 0) {
		return refusal(
			'no-rows',
			periods
				? 'No row of hours follows the head of the file.'
				: 'The head of the file has no line DATA PERIODS.',
			`Choose ${WANTED} as it was downloaded.`
		);
	}
	const recordsPerHour = plainNumber(periods.cells[2] ?? '');
	if (recordsPerHour !== 1) {
		return refusal(
			'not-hourly',
			`${cellName(periods.line, 2, 'records an hour')} is "${periods.cells[2] ?? ''}"; only 1 is read.`,
			'Choose a file with one row an hour.'
		);
	}
	const weather = {
		place: head.place,
		utcOffsetHours: head.utcOffsetHours,
		rows: [] as WeatherReading['rows']
	};
	const counts = { negative: 0 };
	let last: HourStamp | null = null;
	for (const row of lines.slice(firstRow)) {
		const stamp = readStamp(row);
		if (!stamp.ok) return stamp;
		const gap = last && refuseGap(row.line, last, stamp.stamp);
		if (gap) return gap;
		last = stamp.stamp;
		const startMs = stampMs(stamp.stamp) - head.utcOffsetHours * 3600000;
		const read = readRow(row, COLUMNS, startMs, counts);
		if (!read.ok) return read;
		weather.rows.push(read.row);
	}
	return finishReading(weather, 'EPW', before, counts);
}

function isPeriods({ cells }: WeatherLine): boolean {
	return cells[0].toUpperCase() === 'DATA PERIODS';
}

/** LOCATION,city,state,country,source,WMO,lat,lon,zone,height. A comma in a name shifts all: the last four are counted from the end. */
function readLocation(
	line: WeatherLine
): ({ ok: true } & Pick<WeatherReading, 'place' | 'utcOffsetHours'>) | Refusal {
	const cells = [...line.cells];
	while (cells.length > 10 && cells[cells.length - 1] === '') cells.pop();
	const first = Math.max(6, cells.length - 4);
	const row = { line: line.line, cells };
	const latitude = readHead(row, first, 'latitude', -90, 90);
	if (!latitude.ok) return latitude;
	const longitude = readHead(row, first + 1, 'longitude', -180, 180);
	if (!longitude.ok) return longitude;
	const zone = readHead(row, first + 2, 'time zone', -12, 14);
	if (!zone.ok) return zone;
	const altitude = readHead(row, first + 3, 'height above the sea', -450, 9000);
	if (!altitude.ok) return altitude;
	return {
		ok: true,
		place: {
			name: cells
				.slice(1, first - 4)
				.join(', ')
				.trim(),
			latitudeDeg: latitude.value,
			longitudeDeg: longitude.value,
			altitudeM: altitude.value
		},
		utcOffsetHours: zone.value
	};
}

function readStamp(row: WeatherLine): { ok: true; stamp: HourStamp } | Refusal {
	if (row.cells.length < LEAST_COLUMNS) {
		return refusal(
			'wrong-columns',
			`Row ${row.line} has ${row.cells.length} columns; an EPW row has 35.`,
			'Complete the row, or download the file again.'
		);
	}
	const [year, month, day, hour] = row.cells.slice(0, 4).map(plainNumber);
	const fields = [
		{ name: 'year', value: year, least: 1900, most: 2200 },
		{ name: 'month', value: month, least: 1, most: 12 },
		{ name: 'day', value: day, least: 1, most: month >= 1 && month <= 12 ? daysOf(year, month) : 31 },
		{ name: 'hour', value: hour, least: 1, most: 24 }
	];
	for (const [index, { name, value, least, most }] of fields.entries()) {
		if (Number.isInteger(value) && value >= least && value <= most) continue;
		// A typical February may carry a leap day under a year that has none.
		if (name === 'day' && month === 2 && value === 29) continue;
		return refusal(
			'bad-time',
			`${cellName(row.line, index, name)} is "${row.cells[index]}"; it must be a whole number from ${least} to ${most}.`,
			name === 'hour'
				? 'Count hours by their end: 1 for 0:00 to 1:00, 24 for 23:00 to 24:00.'
				: `Correct the ${name}.`
		);
	}
	return { ok: true, stamp: { year, month, day, hour: hour - 1 } };
}
