/** A file that cannot be taken: what is wrong, and what to do about it. Nothing else has changed when this is answered. */
export interface Refusal {
	ok: false;
	problem: string;
	message: string;
	remedy: string;
}

export function refusal(problem: string, message: string, remedy: string): Refusal {
	return { ok: false, problem, message, remedy };
}

/** Largest file that is read, bytes. */
export const MAX_FILE_BYTES = 5_000_000;

/** Looks at the size alone, so that a huge file is refused before a byte of it is read. */
export function refuseLargeFile(sizeBytes: number): Refusal | null {
	if (sizeBytes <= MAX_FILE_BYTES) return null;
	const megabytes = sizeBytes / 1e6;
	return refusal(
		'too-large',
		`The file has ${megabytes < 10 ? megabytes.toFixed(1) : Math.round(megabytes)} MB; at most 5 MB are read.`,
		'Save only the land that you need, with no more corners than its shape asks for, and choose that file.'
	);
}

const SIGNATURES: { bytes: number[]; what: string }[] = [
	{ bytes: [0x50, 0x4b, 0x03, 0x04], what: 'a zip archive' },
	{ bytes: [0x25, 0x50, 0x44, 0x46], what: 'a PDF document' },
	{ bytes: [0x89, 0x50, 0x4e, 0x47], what: 'a PNG picture' },
	{ bytes: [0xff, 0xd8, 0xff], what: 'a JPEG picture' },
	{ bytes: [0x1f, 0x8b], what: 'a gzip archive' },
	{ bytes: [0xd0, 0xcf, 0x11, 0xe0], what: 'an old office document' },
	{ bytes: [0x49, 0x49, 0x2a, 0x00], what: 'a TIFF picture' }
];

/**
 * The text of a file, byte order mark taken off; or why it has none. `wanted` names what the file should have been, for
 * example "a GeoJSON file".
 */
export function readText(input: Uint8Array | string, wanted: string): { ok: true; text: string } | Refusal {
	const large = refuseLargeFile(typeof input === 'string' ? input.length : input.byteLength);
	if (large) return large;
	const decoded = typeof input === 'string' ? { ok: true as const, text: input } : decode(input, wanted);
	if (!decoded.ok) return decoded;
	const text = decoded.text.charCodeAt(0) === 0xfeff ? decoded.text.slice(1) : decoded.text;
	if (text.trim() === '')
		return refusal('empty', 'The file is empty.', `Choose ${wanted} with something in it.`);
	return { ok: true, text };
}

function decode(bytes: Uint8Array, wanted: string): { ok: true; text: string } | Refusal {
	for (const signature of SIGNATURES) {
		if (signature.bytes.every((byte, index) => bytes[index] === byte)) {
			return refusal('wrong-type', `This is ${signature.what}, not ${wanted}.`, `Choose ${wanted}.`);
		}
	}
	const wide = (bytes[0] === 0xff && bytes[1] === 0xfe) || (bytes[0] === 0xfe && bytes[1] === 0xff);
	const damaged = refusal(
		'not-utf8',
		wide ? 'The file is written in UTF-16, not in UTF-8.' : 'The file is not written in UTF-8.',
		'Open it where it was made and save it again with the encoding UTF-8.'
	);
	if (wide) return damaged;
	let text: string;
	try {
		text = new TextDecoder('utf-8', { fatal: true }).decode(bytes);
	} catch (error) {
		if (error instanceof TypeError) return damaged;
		throw error;
	}
	if (text.includes('\u0000')) {
		return refusal('wrong-type', `This is not a text file, so it is not ${wanted}.`, `Choose ${wanted}.`);
	}
	return { ok: true, text };
}
