import type { Page } from '$lib/schema/page';
import { writeCursor } from './cursor';

/** Makes a page from one row more than was asked for: that row only shows that there is a next page. */
export function pageOf<Row, Item>(
	rows: Row[],
	limit: number,
	toItem: (row: Row) => Item,
	key: (row: Row) => (string | number)[]
): Page<Item> {
	const shown = rows.slice(0, limit);
	const last = shown.at(-1);
	return {
		items: shown.map(toItem),
		nextCursor: rows.length > limit && last !== undefined ? writeCursor(key(last)) : null
	};
}
