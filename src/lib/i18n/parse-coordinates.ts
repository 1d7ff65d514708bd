/** A place that was understood, or a sentence that says what to write instead. */
export type ParsedCoordinates =
	| { ok: true; latitudeDeg: number; longitudeDeg: number; altitudeM?: number; note?: string }
	| { ok: false; message: string };

type Letter = 'N' | 'S' | 'E' | 'W';
type Angle = { valueDeg: number; letter: Letter | null };

const EXAMPLE = 'for example 41.2000, 14.5000 or 41°12′00″N 14°30′00″E';

/** Words and letters of the winds in English, Italian, Spanish, French; `O` is west there (ovest, oeste, ouest). */
const words: [RegExp, string][] = [
	[/\b(LATITUDE|LATITUDINE|LATITUD|LAT|LONGITUDE|LONGITUDINE|LONGITUD|LONG|LON|LNG)\b\.?\s*[:=]?/g, ' '],
	[/\b(NORTH|NORD|NORTE)\b/g, 'N'],
	[/\b(SOUTH|SUD|SUR)\b/g, 'S'],
	[/\b(EAST|EST|ESTE|OST)\b/g, 'E'],
	[/\b(WEST|OVEST|OESTE|OUEST)\b/g, 'W']
];

function normalise(text: string): string {
	let clean = text
		.trim()
		.toUpperCase()
		.replace(/[\u2212\u2013]/g, '-')
		.replace(/[\u00ba\u02da]/g, '°')
		.replace(/''|[\u2033\u201d\u201c\u02ba]/g, '"')
		.replace(/[\u2032\u2019\u2018\u02b9\u00b4`]/g, "'")
		.replace(/[\u00a0\u202f]/g, ' ');
	for (const [pattern, letter] of words) clean = clean.replace(pattern, letter);
	return clean.replace(/[()[\]{}]/g, ' ').trim();
}

/** The two halves of what was typed, by the clearest divider there is; null when there is none. */
function halves(clean: string): [string, string] | null {
	const cut = (divider: RegExp) => {
		const parts = clean.split(divider).map((part) => part.trim());
		return parts.length === 2 && parts.every((part) => /\d/.test(part)) ? (parts as [string, string]) : null;
	};
	if (/[;/\t\n|]/.test(clean)) return cut(/\s*[;/\t\n|]\s*/);
	const letters = clean.match(/[NSEWO]/g) ?? [];
	if (letters.length === 2) {
		const divider = /^[NSEWO]/.test(clean) ? /\s*,?\s*(?=(?!^)[NSEWO])/ : /(?<=[NSEWO])\s*,?\s*(?=.)/;
		return cut(divider);
	}
	const spacedCommas = clean.match(/,\s+|\s+,/g)?.length ?? 0;
	if (spacedCommas === 1) return cut(/\s*,\s+|\s+,\s*/);
	if (spacedCommas > 1) return null;
	if (clean.includes('°') && (clean.match(/°/g) ?? []).length === 2)
		return cut(/[\s,]+(?=[+-]?\d+(?:[.,]\d+)?\s*°)/);
	if (!/\s/.test(clean)) return /\./.test(clean) ? cut(/,/) : null;
	const pieces = clean.split(/\s+/);
	if (pieces.length % 2 || !pieces.every((piece) => /\d/.test(piece))) return null;
	const middle = pieces.length / 2;
	return [pieces.slice(0, middle).join(' '), pieces.slice(middle).join(' ')];
}

/** Decimal degrees, degrees and minutes, or degrees, minutes and seconds, with a sign or a letter. */
function readAngle(half: string): Angle | string {
	const found = half.match(/[NSEWO]/g) ?? [];
	if (found.length > 1) return `“${half}” carries more than one letter.`;
	const letter = found.length ? ((found[0] === 'O' ? 'W' : found[0]) as Letter) : null;
	const body = half.replace(/[NSEWO]/g, ' ').trim();
	const shape =
		/^([+-]?)\s*(\d+(?:[.,]\d+)?)\s*(?:°\s*|D\s*|\s+|$)(?:(\d+(?:[.,]\d+)?)\s*(?:'|M|\s|$)\s*)?(?:(\d+(?:[.,]\d+)?)\s*(?:"|$)\s*)?$/;
	const match = shape.exec(body);
	if (!match) return `“${half}” can't be read as an angle.`;
	const [, sign, ...texts] = match;
	const given = texts.filter((part) => part !== undefined);
	const numbers = given.map((part) => Number(part.replace(',', '.')));
	if (given.slice(0, -1).some((part) => /[.,]/.test(part))) {
		return `“${half}”: only the last part of an angle may have decimals.`;
	}
	if (numbers.slice(1).some((part) => part >= 60))
		return `“${half}”: minutes and seconds must stay below 60.`;
	if (sign === '-' && letter) return `“${half}” has both a minus sign and a letter: keep one of them.`;
	const size = numbers[0] + (numbers[1] ?? 0) / 60 + (numbers[2] ?? 0) / 3600;
	return { valueDeg: sign === '-' || letter === 'S' || letter === 'W' ? -size : size, letter };
}

function checked(latitudeDeg: number, longitudeDeg: number, extra: object = {}): ParsedCoordinates {
	if (Math.abs(latitudeDeg) > 90) {
		const swapped = Math.abs(longitudeDeg) <= 90 ? ' Latitude comes first, or add N/S and E/W.' : '';
		return {
			ok: false,
			message: `The latitude reads ${latitudeDeg}°, it must lie between −90° and 90°.${swapped}`
		};
	}
	if (Math.abs(longitudeDeg) > 180) {
		return {
			ok: false,
			message: `The longitude reads ${longitudeDeg}°, it must lie between −180° and 180°.`
		};
	}
	return { ok: true, latitudeDeg, longitudeDeg, ...extra };
}

/** `geo:lat,lon[,alt][;crs=wgs84][;u=..]`, RFC 5870; other reference systems are refused. */
function readGeoUri(text: string): ParsedCoordinates {
	const match = /^geo:(-?\d+(?:\.\d+)?),(-?\d+(?:\.\d+)?)(?:,(-?\d+(?:\.\d+)?))?((?:;[^;]+)*)$/i.exec(
		text.trim()
	);
	if (!match) return { ok: false, message: 'This geo: address can’t be read: it looks like geo:41.2,14.5.' };
	const system = /;crs=([^;]+)/i.exec(match[4])?.[1];
	if (system && system.toLowerCase() !== 'wgs84') {
		return { ok: false, message: `This geo: address uses “${system}”: give the place in WGS 84.` };
	}
	return checked(
		Number(match[1]),
		Number(match[2]),
		match[3] === undefined ? {} : { altitudeM: Number(match[3]) }
	);
}

/** Longest text that is looked at, characters: links are long. */
export const MAX_PLACE_TEXT = 2000;
const MAX_TYPED = 200;

/** A pair in decimal degrees after `@`, `q=` or `ll=`, as map links carry it; a comma may be written as %2C. */
const linkPair =
	/(?:@|(?:^|[?&#;\s])(?:q|ll)=)([+-]?\d{1,3}\.\d+)(?:,|%2C)(?:\s|\+|%20)*([+-]?\d{1,3}\.\d+)(?![\d.])/gi;

/** The one place that a pasted link holds; null when the text is no such link. */
function readLink(text: string): ParsedCoordinates | null {
	const places = new Map<string, [number, number]>();
	for (const [, latitude, longitude] of text.matchAll(linkPair)) {
		const pair: [number, number] = [Number(latitude), Number(longitude)];
		places.set(pair.join(), pair);
	}
	if (places.size > 1) {
		return {
			ok: false,
			message: `The link holds ${places.size} different places: write latitude and longitude, ${EXAMPLE}.`
		};
	}
	const [only] = places.values();
	return only ? checked(...only) : null;
}

/**
 * Reads latitude and longitude (WGS 84, degrees) as people type or paste them: decimal degrees with point or comma, degrees
 * and minutes, degrees minutes seconds, letters or signs in front or behind, in either order when letters say which is
 * which, `geo:` addresses, and links in which one pair of decimal degrees stands after `@`, `q=` or `ll=`.
 */
export function parseCoordinates(text: string): ParsedCoordinates {
	if (!text.trim()) return { ok: false, message: `Write latitude and longitude, ${EXAMPLE}.` };
	const tooLong: ParsedCoordinates = {
		ok: false,
		message: `That is too long for one place. Write ${EXAMPLE}.`
	};
	if (text.length > MAX_PLACE_TEXT) return tooLong;
	if (/^\s*geo:/i.test(text)) return readGeoUri(text);
	const linked = readLink(text);
	if (linked) return linked;
	if (text.length > MAX_TYPED) return tooLong;
	const clean = normalise(text);
	const pair = halves(clean);
	if (!pair) return { ok: false, message: `Two numbers are needed, latitude and longitude, ${EXAMPLE}.` };
	const [first, second] = pair.map(readAngle);
	if (typeof first === 'string') return { ok: false, message: `${first} Write ${EXAMPLE}.` };
	if (typeof second === 'string') return { ok: false, message: `${second} Write ${EXAMPLE}.` };
	const along = (angle: Angle) =>
		angle.letter === null ? null : 'NS'.includes(angle.letter) ? 'lat' : 'lon';
	const [axisA, axisB] = [along(first), along(second)];
	if (axisA && axisA === axisB) {
		return {
			ok: false,
			message: 'Both numbers carry letters of the same axis: one needs N or S, the other E or W.'
		};
	}
	const note = /O/.test(clean) ? 'O is read as west (ovest, oeste, ouest).' : undefined;
	const swapped = axisA === 'lon' || axisB === 'lat';
	const [latitude, longitude] = swapped ? [second, first] : [first, second];
	return checked(latitude.valueDeg, longitude.valueDeg, note ? { note } : {});
}
