import { inArray, sql } from 'drizzle-orm';
import type { PlanSummary } from '$lib/schema/plan';
import { db } from '../db';
import { planFiles, plans, users } from '../db/schema';

/** Columns of a plan that are told: all but the snapshot. Join `users` on `issuedBy`. */
export const planColumns = {
	id: plans.id,
	projectId: plans.projectId,
	layoutId: plans.layoutId,
	layoutRevision: plans.layoutRevision,
	/** Stands in the snapshot only. */
	plotRevision: sql<number>`cast(json_value(${plans.snapshot}, '$.content.heading.plotRevision') as signed)`,
	revision: plans.revisionLetter,
	title: plans.title,
	reason: plans.reason,
	issuedAt: plans.issuedAt,
	issuedBy: users.name
};

interface PlanRow {
	id: string;
	projectId: string;
	layoutId: string | null;
	layoutRevision: number;
	plotRevision: number;
	revision: string;
	title: string;
	reason: string;
	issuedAt: Date;
	issuedBy: string | null;
}

/** Plans with the list of their files, without the bytes. */
export async function planViews(rows: PlanRow[]): Promise<PlanSummary[]> {
	if (rows.length === 0) return [];
	const files = await db
		.select({
			planId: planFiles.planId,
			name: planFiles.name,
			mediaType: planFiles.mediaType,
			bytes: planFiles.byteSize,
			sha256: planFiles.sha256
		})
		.from(planFiles)
		.where(
			inArray(
				planFiles.planId,
				rows.map((row) => row.id)
			)
		)
		.orderBy(planFiles.name);
	return rows.map((row) => ({
		...row,
		issuedAt: row.issuedAt.toISOString(),
		files: files
			.filter((file) => file.planId === row.id)
			.map(({ name, mediaType, bytes, sha256 }) => ({ name, mediaType, bytes, sha256 }))
	}));
}
