/** What the last part of a figure's name means. @type {Record<string, string>} */
const UNITS = {
	ms: 'ms',
	tableSunsPerS: 'tables x suns/s',
	mb: 'MB',
	meanErrorPercent: '% of the table, mean error',
	maxErrorPercent: '% of the table, largest error',
	timesSlower: 'times slower than the core',
	ofNative: 'of the native twin',
	threadGain: 'times faster on two threads'
};

/** @param {string} name effect.field.N.unit */
export function unitOf(name) {
	const last = name.slice(name.lastIndexOf('.') + 1);
	return UNITS[last] ?? (last.endsWith('Ms') ? 'ms' : last);
}

/** @param {number | undefined} before @param {number} now @param {string} word */
function beside(before, now, word) {
	if (before === undefined) return null;
	const percent = Math.round((100 * now) / before - 100);
	// A change of rounding errors says nothing.
	const change = Math.abs(before) < 1e-9 ? '' : `, ${percent > 0 ? '+' : ''}${percent} %`;
	return `${word} ${before}${change}`;
}

/**
 * One figure for people: its value, what it was before, a remark.
 * @param {{ name: string, value: number, note: string, last?: number, recorded?: number }} figure
 */
export function figureLine({ name, value, note, last, recorded }) {
	const compared = [beside(last, value, 'last'), beside(recorded, value, 'recorded')].filter(
		(part) => part !== null
	);
	return [`${name} ${value} ${unitOf(name)}`, compared.length > 0 ? `(${compared.join('; ')})` : '', note]
		.filter((part) => part !== '')
		.join(' ');
}
