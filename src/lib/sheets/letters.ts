import anyAscii from 'any-ascii';
import { fontOf } from './font-book';

/** Signs that no sheet font has and that have a usual spelling. */
const spellings: Record<string, string> = {
	'→': '->',
	'←': '<-',
	'≤': '<=',
	'≥': '>=',
	'≠': '<>',
	'≈': '~',
	'′': "'",
	'″': '"',
	'✓': 'x',
	'\u00a0': ' ',
	'\u202f': ' '
};

/** Direction marks, joiners, control characters: nothing that a printed sheet shows. */
function isUnprinted(code: number): boolean {
	return (
		code < 32 ||
		(code >= 0x7f && code < 0xa0) ||
		code === 0xad ||
		(code >= 0x200b && code <= 0x200f) ||
		(code >= 0x2028 && code <= 0x202e) ||
		(code >= 0x2060 && code <= 0x206f) ||
		(code >= 0xfe00 && code <= 0xfe0f) ||
		code === 0xfeff
	);
}

/**
 * The text as the sheets can letter it: composed, with blanks for control characters, and with letters of scripts that
 * no sheet font holds (Hebrew, Arabic, Chinese, ...) spelled in Latin letters. What comes out runs left to right.
 */
export function lettered(text: string): string {
	let result = '';
	for (const character of text.normalize('NFC')) {
		const code = character.codePointAt(0) ?? 32;
		if (character in spellings) result += spellings[character];
		else if (isUnprinted(code)) result += code < 32 ? ' ' : '';
		else if (fontOf(code)) result += character;
		else result += anyAscii(character) || '?';
	}
	return result;
}
