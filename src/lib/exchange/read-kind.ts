import { readText, refusal, type Refusal } from './read-text';

/** Files that say by their ending that they are drawings or archives of land: the boundary's reader names the remedy. */
const LAND_ENDING = /\.(geojson|json|kml|kmz|shp|dxf|zip|pdf|gpx|gml)$/i;
const TABLE_ENDING = /\.(csv|txt|tsv)$/i;
/** A line that begins with two numbers, whatever stands between them. */
const TWO_NUMBERS = /^[\s"']*[+\u2212-]?[\d.,]+\s*[°º]?["']?[\s;,\t]+["']?[+\u2212-]?[.,]?\d/m;

export type PlotFileKind = { ok: true; kind: 'boundary' | 'skyline' };

/**
 * What a file for the plot is, by what stands in it: JSON is a boundary, lines of two numbers are a skyline. A file that is
 * neither is refused with what is taken, unless its name or `wanted` asks for the reader's own reasons.
 */
export function readKind(
	input: Uint8Array | string,
	fileName: string,
	wanted: 'boundary' | 'skyline' | null
): PlotFileKind | Refusal {
	const byName = wanted ?? (TABLE_ENDING.test(fileName) ? 'skyline' : 'boundary');
	const text = readText(input, 'a boundary or a skyline');
	// Damaged, empty and foreign files are the readers' own business.
	if (!text.ok) return { ok: true, kind: byName };
	if (/^\s*[{[]/.test(text.text)) return { ok: true, kind: 'boundary' };
	if (LAND_ENDING.test(fileName)) return { ok: true, kind: 'boundary' };
	if (TWO_NUMBERS.test(text.text)) return { ok: true, kind: 'skyline' };
	return refusal(
		'wrong-type',
		'This file holds neither a boundary nor a skyline.',
		'Two kinds are taken here: a boundary as GeoJSON (.geojson or .json, WGS84 longitude and latitude), and a skyline as CSV with a bearing and a height in degrees on each line, for example 135,8.5.'
	);
}
