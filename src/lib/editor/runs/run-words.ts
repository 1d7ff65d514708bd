import type { Run } from '$lib/schema';
import { formatMoment, formatNumber } from '$lib/i18n';

/** When and how long, for the method line of a finished run. */
export function computedWords(run: Run, timeZone: string): string {
	const at = run.finishedAt ?? run.createdAt;
	const took = run.computeMs === null ? '' : ` in ${formatNumber(run.computeMs / 1000, 2)} s`;
	return `${formatMoment(Date.parse(at), timeZone)}${took}`;
}

/** The first characters of a hash: enough to compare by eye. */
export function shortHash(hash: string): string {
	return hash.slice(0, 12);
}

/** What the run stood on: "layout revision 34, plot revision 5". */
export function revisionWords(run: Run): string {
	return `layout revision ${run.layoutRevision}, plot revision ${run.plotRevision}`;
}
