import type { SkylinePoint } from '$lib/core/document';
import { formatBearing, formatNumber } from '$lib/i18n';
import { MAX_SKYLINE_POINTS } from '$lib/schema/plot';
import { splitTable, type TableRow } from './csv-table';
import { readText, refusal, type Refusal } from './read-text';

export interface SkylineReading {
	ok: true;
	/** Sorted by bearing, each bearing once, 0 up to but not including 360. */
	points: SkylinePoint[];
	warnings: string[];
	sentence: string;
}

const WANTED = 'a CSV file of bearing and height';
const LEAST_BEARING_DEG = -180;
const MOST_BEARING_DEG = 360;
/** A skyline below the level is seen from a hill top; above 60° it is no horizon but something that stands near. */
const LEAST_HEIGHT_DEG = -5;
const MOST_HEIGHT_DEG = 60;
/** Wider gaps are drawn as a straight line over country that nobody looked at, degrees. */
const WIDE_GAP_DEG = 45;

const BEARING_WORDS = /bearing|azimut|acimut|direction|direzione|richtung|rumbo|compass/i;
const HEIGHT_WORDS =
	/height|elevation|altitude|angle|altezza|elevazione|höhe|hoehe|altura|elevación|elevacion/i;

/**
 * Reads a skyline from text with one bearing (degrees clockwise from true north) and one height (degrees above level)
 * a line. Separators `,` `;` tab or blanks; decimal point or comma; a line of headings is optional.
 */
export function readSkyline(input: Uint8Array | string): SkylineReading | Refusal {
	const text = readText(input, WANTED);
	if (!text.ok) return text;
	const table = splitTable(text.text, WANTED);
	if (!table.ok) return table;
	const columns = chooseColumns(table.heading, table.rows);
	if (!columns.ok) return columns;
	const warnings: string[] = [];
	const points: SkylinePoint[] = [];
	let negative = 0;
	for (const row of table.rows) {
		const bearing = readCell(row, columns.bearing, 'bearing', LEAST_BEARING_DEG, MOST_BEARING_DEG);
		if (!bearing.ok) return bearing;
		const height = readCell(row, columns.height, 'height', LEAST_HEIGHT_DEG, MOST_HEIGHT_DEG);
		if (!height.ok) return height;
		if (bearing.value < 0) negative += 1;
		points.push({ azimuthDeg: (bearing.value + 360) % 360, elevationDeg: height.value });
	}
	if (points.length < 2) {
		return refusal(
			'too-few-rows',
			`The file has ${points.length === 0 ? 'no row' : 'one row'} with a bearing and a height.`,
			'Give at least two rows; every 10 to 15 degrees, and where the skyline bends, is good.'
		);
	}
	if (negative > 0) {
		warnings.push(
			`Negative bearings were read as degrees west of north: −30 is 330°. If yours count from south, change them first.`
		);
	}
	const sorted = sortAndJoin(points, warnings);
	if (sorted.length < 2) {
		return refusal('too-few-rows', 'All rows have the same bearing.', 'Give at least two bearings.');
	}
	if (sorted.length > MAX_SKYLINE_POINTS) {
		return refusal(
			'too-many-rows',
			`The file has ${formatNumber(sorted.length)} bearings; at most ${formatNumber(MAX_SKYLINE_POINTS)} are taken.`,
			'Keep one row every degree or so.'
		);
	}
	warnings.push(...gapWarnings(sorted));
	return { ok: true, points: sorted, warnings, sentence: skylineSentence(sorted) };
}

function chooseColumns(
	heading: string[] | null,
	rows: TableRow[]
): { ok: true; bearing: number; height: number } | Refusal {
	if (heading) {
		const bearing = heading.findIndex((word) => BEARING_WORDS.test(word));
		const height = heading.findIndex((word, index) => index !== bearing && HEIGHT_WORDS.test(word));
		if (bearing >= 0 && height >= 0) return { ok: true, bearing, height };
	}
	const wide = rows.find((row) => row.cells.length !== 2);
	if (wide) {
		return refusal(
			'wrong-columns',
			`Row ${wide.line} has ${wide.cells.length === 1 ? 'one column' : `${wide.cells.length} columns`}; two are wanted, bearing and height.`,
			wide.cells.length > 2
				? 'Keep two columns, or name them in a first line: bearing;height. With decimal commas, separate the columns by semicolons.'
				: 'Write each row as bearing,height: for example 135,8.5.'
		);
	}
	return { ok: true, bearing: 0, height: 1 };
}

function readCell(
	row: TableRow,
	column: number,
	what: 'bearing' | 'height',
	least: number,
	most: number
): { ok: true; value: number } | Refusal {
	const raw = row.cells[column] ?? '';
	const cleaned = raw
		.replace(/^["']|["']$/g, '')
		.replace(/[°º]|deg$/gi, '')
		.trim()
		.replace(/^\u2212/, '-');
	const where = `Row ${row.line}, column ${column + 1} (${what})`;
	if (cleaned === '') {
		return refusal('missing', `${where} is empty.`, `Give the ${what} in degrees, or take the row out.`);
	}
	const number = /^[+-]?(\d+([.,]\d*)?|[.,]\d+)([eE][+-]?\d+)?$/.test(cleaned)
		? Number(cleaned.replace(',', '.'))
		: Number.NaN;
	if (!Number.isFinite(number)) {
		return refusal(
			'not-a-number',
			`${where} is "${raw.slice(0, 30)}", not a number.`,
			`Give the ${what} in degrees, for example 8.5.`
		);
	}
	if (number < least || number > most) {
		const swapped =
			what === 'height' && number <= 360 && Number((row.cells[0] ?? '').replace(',', '.')) <= 60;
		return refusal(
			'out-of-range',
			`${where} is ${formatNumber(number, 1)}°; it must lie from ${formatNumber(least)} to ${formatNumber(most)}°.`,
			what === 'bearing'
				? 'Give bearings clockwise from true north, 0 to 360.'
				: `Give the height of the skyline above level in degrees, not in metres${swapped ? '; if the columns are exchanged, name them in a first line: height;bearing' : ''}. What stands near is an obstacle.`
		);
	}
	return { ok: true, value: number };
}

function sortAndJoin(points: SkylinePoint[], warnings: string[]): SkylinePoint[] {
	const byBearing = new Map<number, number>();
	let differing = 0;
	for (const point of points) {
		const before = byBearing.get(point.azimuthDeg);
		if (before !== undefined && before !== point.elevationDeg) differing += 1;
		byBearing.set(point.azimuthDeg, Math.max(before ?? -90, point.elevationDeg));
	}
	if (differing > 0) {
		warnings.push(
			`${formatNumber(differing)} ${differing === 1 ? 'bearing came' : 'bearings came'} more than once with different heights: the highest is kept.`
		);
	}
	return [...byBearing]
		.map(([azimuthDeg, elevationDeg]) => ({ azimuthDeg, elevationDeg }))
		.sort((a, b) => a.azimuthDeg - b.azimuthDeg);
}

function gapWarnings(points: SkylinePoint[]): string[] {
	return points.flatMap((point, index) => {
		const next = points[(index + 1) % points.length];
		const gap = (next.azimuthDeg - point.azimuthDeg + 360) % 360;
		if (gap <= WIDE_GAP_DEG) return [];
		return [
			`Nothing is given from ${formatBearing(point.azimuthDeg)} to ${formatBearing(next.azimuthDeg)} (${formatNumber(gap)}°): a straight line is drawn there.`
		];
	});
}

function skylineSentence(points: SkylinePoint[]): string {
	const highest = points.reduce((best, point) => (point.elevationDeg > best.elevationDeg ? point : best));
	return `${formatNumber(points.length)} bearings; the skyline is highest at ${formatBearing(highest.azimuthDeg)} with ${formatNumber(highest.elevationDeg, 1)}°.`;
}
