/** Day of the year of an ISO date (`2026-12-21`), 1..366. NaN for anything else. */
export function dayOfDate(isoDate: string): number {
	const year = Number(isoDate.slice(0, 4));
	return Math.round((Date.parse(`${isoDate}T00:00:00Z`) - Date.UTC(year, 0, 1)) / 86_400_000) + 1;
}
