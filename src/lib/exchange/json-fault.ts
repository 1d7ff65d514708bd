/**
 * Finds where a text stops being JSON (RFC 8259), because engines word and place their own message differently.
 * Answers the offset of the first character that cannot stand there, or -1 when the text is JSON.
 */
export function jsonFaultOffset(text: string): number {
	const token =
		// eslint-disable-next-line no-control-regex -- JSON forbids raw control characters in strings (RFC 8259, section 7)
		/[ \t\r\n]*(?:([{}[\],:])|("(?:[^"\\\u0000-\u001f]|\\(?:["\\/bfnrt]|u[0-9a-fA-F]{4}))*")|(-?(?:0|[1-9]\d*)(?:\.\d+)?(?:[eE][+-]?\d+)?|true|false|null)(?![A-Za-z0-9_.]))/y;
	const blank = /[ \t\r\n]*/y;
	const open: string[] = [];
	/** What may come next. */
	let expect: 'value' | 'value-or-close' | 'key' | 'key-or-close' | 'colon' | 'comma-or-close' | 'end' =
		'value';
	let at = 0;
	const after = () => (open.length === 0 ? 'end' : 'comma-or-close');
	for (;;) {
		blank.lastIndex = at;
		blank.test(text);
		const start = blank.lastIndex;
		if (start >= text.length) return expect === 'end' ? -1 : text.length;
		token.lastIndex = at;
		const found = token.exec(text);
		if (!found) return start;
		at = token.lastIndex;
		const [, mark, string, literal] = found;
		if (string !== undefined && (expect === 'key' || expect === 'key-or-close')) expect = 'colon';
		else if (mark === ':' && expect === 'colon') expect = 'value';
		else if (mark === ',' && expect === 'comma-or-close') expect = open.at(-1) === '{' ? 'key' : 'value';
		else if (
			mark === '}' &&
			open.at(-1) === '{' &&
			(expect === 'key-or-close' || expect === 'comma-or-close')
		) {
			open.pop();
			expect = after();
		} else if (
			mark === ']' &&
			open.at(-1) === '[' &&
			(expect === 'value-or-close' || expect === 'comma-or-close')
		) {
			open.pop();
			expect = after();
		} else if (expect === 'value' || expect === 'value-or-close') {
			if (mark === '{') expect = 'key-or-close';
			else if (mark === '[') expect = 'value-or-close';
			else if (mark === undefined && (string !== undefined || literal !== undefined)) expect = after();
			else return start;
			if (mark !== undefined) open.push(mark);
		} else return start;
	}
}

/** Line and column, both from 1, of an offset; `\r\n`, `\n` and `\r` end a line. */
export function lineOfOffset(text: string, offset: number): { line: number; column: number } {
	const before = text.slice(0, offset).split(/\r\n|\n|\r/);
	return { line: before.length, column: before[before.length - 1].length + 1 };
}
