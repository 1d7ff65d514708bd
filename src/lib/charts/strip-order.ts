/** A row of the shade strip. */
export interface StripRow {
	trackerId: string;
	tag: string;
	eastM: number;
	northM: number;
	/** Beam lost on the day, 0..1. */
	loss: number;
	/** Index into `DayShade.shares`. */
	index: number;
}

export type StripOrder = 'tag' | 'loss' | 'position';

const byTag = new Intl.Collator('en', { numeric: true, sensitivity: 'base' });

/** `B2` before `B10`. */
export function compareTags(a: string, b: string): number {
	return byTag.compare(a, b);
}

/** Rows by tag, by loss (most first) or from west to east; ties by tag. The rows given are left as they are. */
export function orderRows(rows: readonly StripRow[], order: StripOrder): StripRow[] {
	const ordered = [...rows];
	ordered.sort((a, b) => {
		const first = order === 'loss' ? b.loss - a.loss : order === 'position' ? a.eastM - b.eastM : 0;
		return first || compareTags(a.tag, b.tag);
	});
	return ordered;
}
