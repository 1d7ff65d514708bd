import type { PlanSummary } from '$lib/schema/plan';

export type PlanFile = PlanSummary['files'][number];

/** What a file of a plan is for, by its ending. */
export function fileWords(name: string): { kind: string; use: string } {
	if (name.endsWith('.pdf')) return { kind: 'Plan sheets', use: 'PDF, A3, to scale' };
	if (name.endsWith('.csv')) return { kind: 'Peg list', use: 'CSV for the instrument' };
	if (name.endsWith('.geojson')) return { kind: 'Field map', use: 'GeoJSON, WGS84' };
	return { kind: name, use: '' };
}

/** The order that they are offered in: sheets, pegs, map. */
export function inOrder(files: PlanFile[]): PlanFile[] {
	const rank = (file: PlanFile) =>
		['.pdf', '.csv', '.geojson'].findIndex((ending) => file.name.endsWith(ending));
	return [...files].sort((a, b) => rank(a) - rank(b));
}

/** `144 kB`; kilobytes of a thousand bytes. */
export function sizeWords(bytes: number): string {
	if (bytes < 1000) return `${bytes} B`;
	if (bytes < 1e6) return `${Math.round(bytes / 1000)} kB`;
	return `${(bytes / 1e6).toFixed(1)} MB`;
}

export const fileHref = (planId: string, name: string) =>
	`/api/v1/plans/${planId}/files/${encodeURIComponent(name)}`;
