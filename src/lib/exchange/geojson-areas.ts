import { refusal, type Refusal } from './read-text';
import { jsonFaultOffset, lineOfOffset } from './json-fault';

/** One polygon as it stands in the file: nothing about its numbers is checked yet. */
export interface RawArea {
	/** The feature's own name where it has one. */
	name: string | null;
	rings: unknown[];
}

export interface RawAreas {
	areas: RawArea[];
	/** How many points and lines were left aside. */
	leftAside: number;
	/** Name of an old-style coordinate system member, if the file has one. */
	crs: string | null;
}

type Dictionary = Record<string, unknown>;

function isDictionary(value: unknown): value is Dictionary {
	return typeof value === 'object' && value !== null && !Array.isArray(value);
}

/** Reads the JSON text; says on which line it breaks. */
export function parseJson(text: string): { ok: true; value: unknown } | Refusal {
	try {
		return { ok: true, value: JSON.parse(text) };
	} catch (error) {
		if (!(error instanceof SyntaxError)) throw error;
		return jsonRefusal(text);
	}
}

function jsonRefusal(text: string): Refusal {
	const offset = Math.max(0, jsonFaultOffset(text));
	const rest = text.slice(offset);
	const { line, column } = lineOfOffset(text, offset);
	if (text.trimStart().startsWith('<')) {
		return refusal(
			'wrong-type',
			'This is an XML file (KML, GML or a web page), not a GeoJSON file.',
			'Save the boundary as GeoJSON in the program it comes from, and choose that file.'
		);
	}
	if (/^-?(NaN|Infinity)/.test(rest)) {
		return refusal(
			'not-a-number',
			`Line ${line}, column ${column}: a coordinate is ${/^-?\w+/.exec(rest)?.[0]}, which is not a number.`,
			'Give that corner its coordinates, or take the corner out, and choose the file again.'
		);
	}
	return refusal(
		'not-json',
		offset >= text.length
			? `The file breaks off at line ${line}: it is not complete.`
			: `The file is not GeoJSON: line ${line}, column ${column} cannot be read.`,
		'Save it again as GeoJSON in the program it comes from. If you edited it by hand, look at that line for a comma or bracket too many or too few.'
	);
}

const LINES_AND_POINTS = new Set(['Point', 'MultiPoint', 'LineString', 'MultiLineString']);
/** Collections inside collections deeper than this are not real land. */
const MAX_DEPTH = 8;

/** All polygons of a GeoJSON object of any type (RFC 7946, section 3), in the file's order. */
export function collectAreas(value: unknown): ({ ok: true } & RawAreas) | Refusal {
	const found: RawAreas = { areas: [], leftAside: 0, crs: isDictionary(value) ? crsName(value.crs) : null };
	const fault = walk(value, null, found, 'The file', 0);
	if (fault) return fault;
	if (found.areas.length > 0) return { ok: true, ...found };
	return refusal(
		'no-area',
		found.leftAside > 0
			? `The file holds ${found.leftAside === 1 ? 'one point or line' : `${found.leftAside} points or lines`} but no area.`
			: 'The file holds no area.',
		'Save the boundary as a Polygon or MultiPolygon: a closed outline, not single lines or points.'
	);
}

function crsName(crs: unknown): string | null {
	if (!isDictionary(crs)) return null;
	const name = isDictionary(crs.properties) ? crs.properties.name : null;
	return typeof name === 'string' ? name.slice(0, 80) : 'without a name';
}

function featureName(properties: unknown): string | null {
	if (!isDictionary(properties)) return null;
	for (const key of ['name', 'Name', 'NAME', 'label', 'title', 'id']) {
		const value = properties[key];
		if (typeof value === 'string' && value.trim() !== '') return value.trim().slice(0, 60);
		if (typeof value === 'number') return String(value);
	}
	return null;
}

function walk(
	value: unknown,
	name: string | null,
	found: RawAreas,
	where: string,
	depth: number
): Refusal | null {
	if (value === null) return null;
	if (!isDictionary(value) || typeof value.type !== 'string') {
		return refusal(
			'wrong-type',
			`${where} is JSON but not GeoJSON: it has no "type".`,
			'Choose a GeoJSON file: a Feature, FeatureCollection, Polygon or MultiPolygon.'
		);
	}
	const malformed = (member: string) =>
		refusal(
			'malformed',
			`${where} is a ${value.type as string} without a list of ${member}.`,
			'Save it again as GeoJSON in the program it comes from.'
		);
	if (depth > MAX_DEPTH) {
		return refusal('malformed', `${where} nests collections too deep.`, 'Save the outline as one Polygon.');
	}
	switch (value.type) {
		case 'FeatureCollection':
			if (!Array.isArray(value.features)) return malformed('features');
			return firstFault(value.features, (feature, index) =>
				walk(feature, null, found, `Feature ${index + 1}`, depth + 1)
			);
		case 'Feature':
			return walk(value.geometry ?? null, featureName(value.properties), found, where, depth + 1);
		case 'GeometryCollection':
			if (!Array.isArray(value.geometries)) return malformed('geometries');
			return firstFault(value.geometries, (geometry) => walk(geometry, name, found, where, depth + 1));
		case 'Polygon':
			if (!Array.isArray(value.coordinates)) return malformed('coordinates');
			if (value.coordinates.length > 0) found.areas.push({ name, rings: value.coordinates });
			return null;
		case 'MultiPolygon':
			if (!Array.isArray(value.coordinates)) return malformed('coordinates');
			return firstFault(value.coordinates, (rings) => {
				if (!Array.isArray(rings)) return malformed('coordinates');
				if (rings.length > 0) found.areas.push({ name, rings });
				return null;
			});
		default:
			if (LINES_AND_POINTS.has(value.type)) {
				found.leftAside += 1;
				return null;
			}
			return refusal(
				'wrong-type',
				`${where} has the type "${value.type.slice(0, 40)}", which GeoJSON does not know.`,
				'Choose a GeoJSON file: a Feature, FeatureCollection, Polygon or MultiPolygon.'
			);
	}
}

function firstFault<T>(list: T[], check: (item: T, index: number) => Refusal | null): Refusal | null {
	for (let i = 0; i < list.length; i += 1) {
		const fault = check(list[i], i);
		if (fault) return fault;
	}
	return null;
}
