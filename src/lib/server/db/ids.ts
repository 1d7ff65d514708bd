import { randomBytes } from 'node:crypto';

/** Crockford's base 32, lower case: no i, l, o, u. */
const alphabet = '0123456789abcdefghjkmnpqrstvwxyz';

/** 26 characters: 48 bits of time in milliseconds, then 80 random bits; ids sort by the time they were made. */
export function newId(now: number = Date.now()): string {
	let time = '';
	for (let rest = now, i = 0; i < 10; i++) {
		time = alphabet[rest % 32] + time;
		rest = Math.floor(rest / 32);
	}
	const bytes = randomBytes(16);
	let random = '';
	for (const byte of bytes) random += alphabet[byte & 31];
	return time + random;
}
