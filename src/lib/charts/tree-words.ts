/** With which trees a number was computed: "with trees 10 years older", or null when they are as recorded. */
export function treesOlderWords(treeYears: number): string | null {
	if (treeYears <= 0) return null;
	return `with trees ${treeYears} ${treeYears === 1 ? 'year' : 'years'} older`;
}
