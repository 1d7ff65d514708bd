import { sameData } from './same';

/**
 * Merging two versions that grew from one: what only one side changed is taken from that side. `undefined` stands for a thing that
 * a side does not have. Data in, data out.
 */

export type Merged<T> = { ok: true; value: T } | { ok: false };

/** One thing: taken from the side that changed it; refused when both did, and differently. */
export function mergeOne<T>(base: T, mine: T, theirs: T): Merged<T> {
	if (sameData(mine, base)) return { ok: true, value: theirs };
	if (sameData(theirs, base) || sameData(mine, theirs)) return { ok: true, value: mine };
	return { ok: false };
}

/** Several things by key, in the order of theirs, then what only mine has. Answers the keys that both sides changed. */
export function mergeByKey<T>(
	base: ReadonlyMap<string, T>,
	mine: ReadonlyMap<string, T>,
	theirs: ReadonlyMap<string, T>
): { merged: Map<string, T>; clashes: string[] } {
	const merged = new Map<string, T>();
	const clashes: string[] = [];
	for (const key of new Set([...theirs.keys(), ...mine.keys()])) {
		const one = mergeOne(base.get(key), mine.get(key), theirs.get(key));
		if (!one.ok) clashes.push(key);
		else if (one.value !== undefined) merged.set(key, one.value);
	}
	return { merged, clashes };
}
