import { z } from 'zod';
import './sentences';

/** A finite number in a range, with the sentence that a person reads when it is not one. Both ends are allowed. */
export function quantity(min: number, max: number, unit = '') {
	const sentence = `Give a number from ${min} to ${max}${unit ? ` ${unit}` : ''}.`;
	return z.number({ error: sentence }).min(min, { error: sentence }).max(max, { error: sentence });
}

/** A whole number in a range. */
export function wholeNumber(min: number, max: number) {
	const sentence = `Give a whole number from ${min} to ${max}.`;
	return z
		.number({ error: sentence })
		.int({ error: sentence })
		.min(min, { error: sentence })
		.max(max, { error: sentence });
}

/** Text with something in it, outer blanks taken off, no control characters. */
export function label(maxLength: number, what = 'text') {
	return z
		.string({ error: `Give a ${what}.` })
		.trim()
		.min(1, { error: `Give a ${what}.` })
		.max(maxLength, { error: `Keep the ${what} within ${maxLength} characters.` })
		.refine((text) => !hasControlCharacters(text), {
			error: `Take line breaks and control characters out of the ${what}.`
		});
}

/** A name that may be left empty. Line breaks and control characters become blanks, outer blanks are taken off. */
export function optionalLabel(maxLength: number, what = 'name') {
	return z
		.string({ error: `Give the ${what} as text.` })
		.overwrite((text) => [...text].map((each) => (hasControlCharacters(each) ? ' ' : each)).join(''))
		.trim()
		.max(maxLength, { error: `Keep the ${what} within ${maxLength} characters.` });
}

function hasControlCharacters(text: string): boolean {
	for (let i = 0; i < text.length; i += 1) {
		const code = text.charCodeAt(i);
		if (code < 32 || code === 127) return true;
	}
	return false;
}

/** An identifier as the product makes them: letters, digits, `-`, `_`, `.`, `:`. */
export const idSchema = z
	.string({ error: 'Give an id.' })
	.regex(/^[A-Za-z0-9._:-]{1,64}$/, { error: 'Give an id of 1 to 64 letters, digits, - _ . or :.' });

/** `2026-12-21`, a day that exists. */
export const isoDateSchema = z
	.string({ error: 'Give a day as YYYY-MM-DD.' })
	.refine((text) => /^\d{4}-\d{2}-\d{2}$/.test(text) && isRealDay(text), {
		error: 'Give a day as YYYY-MM-DD.'
	});

function isRealDay(text: string): boolean {
	const timeMs = Date.parse(`${text}T00:00:00Z`);
	return Number.isFinite(timeMs) && new Date(timeMs).toISOString().startsWith(text);
}
