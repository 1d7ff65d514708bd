/** What a check is. Plain data and one function; the same definition serves the tests and the page. */
import type { EffectId } from './effects';

/** Where the value that is compared with comes from. */
export type Provenance =
	/** Printed in the source, and read there. */
	| 'published'
	/** Worked out apart from this code, from the formula that the source prints. */
	| 'formula'
	/** Computed by a general library that shares no code with the core. */
	| 'library'
	/** Recalled, not read again in the source. */
	| 'memory'
	/** Common practice of the trade; there is no source. */
	| 'practice';

export interface Measured {
	/** Greatest distance from the compared value. */
	worst: number;
	mean: number;
	/** Values compared. */
	count: number;
	/** The value with the greatest distance, in words. */
	worstAt: string;
}

/** `whole` in the tests; `thinned` while the application is built, where a check of seconds takes fewer values. */
export type Extent = 'whole' | 'thinned';

export interface Check {
	/** Lower case with hyphens; unique. */
	id: string;
	effect: EffectId;
	/** What is measured, in a few words. */
	title: string;
	/** What it is compared with. */
	against: string;
	/** Author, year, equation or table. */
	source: string;
	provenance: Provenance;
	/** Of tolerance and distance; empty for shares and other pure numbers. */
	unit: string;
	/** Allowed for the greatest distance and for the mean one. */
	tolerance: { worst: number; mean: number };
	measure(extent: Extent): Measured;
}

/** A compared value: where, what the core says, what is expected. */
export type Row = readonly [at: string, value: number, expected: number];

/** Greatest and mean distance of the rows; a value that is no number is infinitely far. */
export function distances(rows: Iterable<Row>): Measured {
	let worst = 0;
	let worstAt = '';
	let sum = 0;
	let count = 0;
	for (const [at, value, expected] of rows) {
		const off = Math.abs(value - expected);
		const distance = Number.isNaN(off) ? Infinity : off;
		if (worstAt === '' || distance > worst) {
			worst = distance;
			worstAt = at;
		}
		sum += distance;
		count++;
	}
	return { worst, mean: count > 0 ? sum / count : Infinity, count, worstAt };
}

/** True when both distances are inside the tolerance; no values at all is a failure. */
export function passes(check: Pick<Check, 'tolerance'>, measured: Measured): boolean {
	return (
		measured.count > 0 && measured.worst <= check.tolerance.worst && measured.mean <= check.tolerance.mean
	);
}

/** Values printed to a last digit are off by half of it at most and by a quarter of it in the mean. */
export const within = (worst: number, mean = worst / 2): Check['tolerance'] => ({ worst, mean });

/** For a single value, whose mean is itself. */
export const single = (worst: number): Check['tolerance'] => ({ worst, mean: worst });
