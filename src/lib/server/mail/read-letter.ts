/** The subject and text of a letter as nodemailer writes it: one plain part, quoted-printable, base64 or as it is. */
export function readLetter(raw: string): { subject: string; text: string } {
	const [head, ...rest] = raw.split(/\r?\n\r?\n/);
	const headers = new Map<string, string>();
	for (const line of head.replace(/\r?\n[ \t]+/g, ' ').split(/\r?\n/)) {
		const colon = line.indexOf(':');
		headers.set(line.slice(0, colon).toLowerCase(), line.slice(colon + 1).trim());
	}
	const body = rest.join('\n\n').replace(/\r\n/g, '\n');
	const encoding = headers.get('content-transfer-encoding')?.toLowerCase();
	return {
		subject: decodeWords(headers.get('subject') ?? ''),
		text: (encoding === 'base64'
			? Buffer.from(body, 'base64').toString('utf8')
			: encoding === 'quoted-printable'
				? unquote(body)
				: body
		).trim()
	};
}

/** Quoted-printable, RFC 2045 section 6.7. */
function unquote(text: string): string {
	const joined = text.replace(/=\n/g, '');
	const bytes: number[] = [];
	for (let i = 0; i < joined.length; i++) {
		const hex = joined[i] === '=' ? /^[0-9A-F]{2}/i.exec(joined.slice(i + 1, i + 3)) : null;
		if (hex) {
			bytes.push(Number.parseInt(hex[0], 16));
			i += 2;
		} else bytes.push(...Buffer.from(joined[i], 'utf8'));
	}
	return Buffer.from(bytes).toString('utf8');
}

/** Encoded words in a header, RFC 2047. */
function decodeWords(text: string): string {
	return text
		.replace(/\?=\s+=\?/g, '?==?')
		.replace(/=\?utf-8\?([bq])\?([^?]*)\?=/gi, (_all, kind: string, word: string) =>
			kind.toLowerCase() === 'b'
				? Buffer.from(word, 'base64').toString('utf8')
				: unquote(word.replaceAll('_', ' '))
		);
}
