import type { Run } from '$lib/schema/run';
import { runs } from '../db/schema';
import { currentHash } from './current-input';

/** Columns of a run that are told: all but the input. */
export const runColumns = {
	id: runs.id,
	projectId: runs.projectId,
	kind: runs.kind,
	status: runs.status,
	progress: runs.progress,
	stage: runs.stage,
	layoutId: runs.layoutId,
	layoutRevision: runs.layoutRevision,
	plotRevision: runs.plotRevision,
	year: runs.year,
	stepMinutes: runs.stepMinutes,
	treeYears: runs.treeYears,
	energy: runs.energy,
	inputHash: runs.inputHash,
	coreVersion: runs.coreVersion,
	createdAt: runs.createdAt,
	startedAt: runs.startedAt,
	finishedAt: runs.finishedAt,
	computeMs: runs.computeMs,
	error: runs.error
};

export type RunRow = Pick<typeof runs.$inferSelect, keyof typeof runColumns>;

/** A run as it is told; out of date when the same run asked for now would compute from something else. */
export async function runView(row: RunRow): Promise<Run> {
	const hash = await currentHash(row.layoutId, row.kind, row);
	return {
		...row,
		createdAt: row.createdAt.toISOString(),
		startedAt: row.startedAt?.toISOString() ?? null,
		finishedAt: row.finishedAt?.toISOString() ?? null,
		outOfDate: hash !== row.inputHash
	};
}
