import type { PegRow } from '../schema/peg-row';

const header = [
	'number',
	'tag',
	'peg_id',
	'e_m',
	'n_m',
	'ground_level_m',
	'axis_height_above_ground_m',
	'axis_level_m',
	'latitude_deg',
	'longitude_deg',
	'reach_radius_m',
	'stop_east_side_deg',
	'stop_west_side_deg',
	'tracker_model',
	'mount_edge',
	'mount_along_m',
	'mount_out_m',
	'mount_forward_m',
	'own_mount'
] as const;

/**
 * The peg list as CSV after RFC 4180: comma, CRLF, one header line, UTF-8 without a byte-order mark, a decimal point.
 * E and N in metres of the local grid to the millimetre, latitude and longitude to 7 decimals. A text that a spreadsheet
 * would run as a formula gets an apostrophe in front.
 */
export function writePegCsv(rows: PegRow[]): string {
	const lines = rows.map((row) => [
		String(row.number),
		textCell(row.tag),
		`PEG-${String(row.number).padStart(4, '0')}`,
		fixed(row.eastM, 3),
		fixed(row.northM, 3),
		fixed(row.groundM, 3),
		fixed(row.axisHeightM, 3),
		fixed(row.axisLevelM, 3),
		fixed(row.latitudeDeg, 7),
		fixed(row.longitudeDeg, 7),
		fixed(row.reachM, 3),
		row.stops ? fixed(row.stops.fromDeg, 1) : '',
		row.stops ? fixed(row.stops.toDeg, 1) : '',
		textCell(row.modelName),
		row.mount?.edge ?? '',
		row.mount ? fixed(row.mount.alongM, 3) : '',
		row.mount ? fixed(row.mount.outM, 3) : '',
		row.mount ? fixed(row.mount.forwardM, 3) : '',
		row.ownMount ? 'yes' : 'no'
	]);
	return [header.join(','), ...lines.map((cells) => cells.join(','))].map((line) => `${line}\r\n`).join('');
}

/** A number with a point and no minus before zero. */
function fixed(value: number, digits: number): string {
	const text = value.toFixed(digits);
	return /^-0\.?0*$/.test(text) ? text.slice(1) : text;
}

function textCell(text: string): string {
	const safe = /^[=+\-@\t\r]/.test(text) ? `'${text}` : text;
	return /[",\r\n]/.test(safe) ? `"${safe.replace(/"/g, '""')}"` : safe;
}
