import type { Effect } from './effect';
import type { MeasuredCheck } from './report';

const plain = (text: string): string =>
	text
		.toLowerCase()
		.normalize('NFD')
		.replace(/\p{Mark}/gu, '');

/**
 * The checks of an effect that hold every word of a search, all of them when its own words do; null when neither does.
 * Case and accents do not matter.
 */
export function findChecks(
	effect: Effect,
	checks: readonly MeasuredCheck[],
	query: string
): MeasuredCheck[] | null {
	const words = plain(query).split(/\s+/).filter(Boolean);
	const holds = (...texts: string[]): boolean => {
		const all = plain(texts.join(' '));
		return words.every((word) => all.includes(word));
	};
	const own = [
		effect.title,
		effect.words,
		...effect.sources,
		...effect.neglected.map(({ what, howBig }) => `${what} ${howBig}`)
	];
	if (holds(...own)) return [...checks];
	const found = checks.filter(({ title, against, source, unit }) =>
		holds(effect.title, title, against, source, unit)
	);
	return found.length > 0 ? found : null;
}
