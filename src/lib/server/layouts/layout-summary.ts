import type { LayoutSummary } from '$lib/schema/project';
import { layouts } from '../db/schema';

/** Columns that a line of a layout list needs: all but the document. */
export const summaryColumns = {
	id: layouts.id,
	projectId: layouts.projectId,
	name: layouts.name,
	revision: layouts.revision,
	trackerCount: layouts.trackerCount,
	updatedAt: layouts.updatedAt
};

export function layoutSummary(row: Omit<LayoutSummary, 'updatedAt'> & { updatedAt: Date }): LayoutSummary {
	return { ...row, updatedAt: row.updatedAt.toISOString() };
}
