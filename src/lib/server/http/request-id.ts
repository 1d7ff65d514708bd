import { randomBytes } from 'node:crypto';

/** No 0, 1, i, l, o, u: it is read out over the telephone. */
const alphabet = '23456789ABCDEFGHJKMNPQRSTVWXYZ';

/** Eight characters in two groups, for example `7KQ2-M9XD`. */
export function newRequestId(): string {
	const letters = [...randomBytes(8)].map((byte) => alphabet[byte % alphabet.length]).join('');
	return `${letters.slice(0, 4)}-${letters.slice(4)}`;
}
