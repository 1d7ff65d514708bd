import { and, eq, inArray } from 'drizzle-orm';
import { db } from '../db';
import { runs } from '../db/schema';
import { stopWorkingRun, tellRun } from '../jobs';

/** Stops one run wherever it is: waiting, working here, or working in another process (at its next sign of life). */
export async function stopRun(runId: string): Promise<void> {
	const [waited] = await db
		.update(runs)
		.set({ status: 'cancelled', stage: 'cancelled', cancelRequested: true, finishedAt: new Date() })
		.where(and(eq(runs.id, runId), eq(runs.status, 'queued')));
	if (waited.affectedRows > 0) {
		tellRun(runId, { status: 'cancelled', progress: 0, stage: 'cancelled' });
		return;
	}
	const [working] = await db
		.update(runs)
		.set({ cancelRequested: true })
		.where(and(eq(runs.id, runId), eq(runs.status, 'working')));
	if (working.affectedRows > 0) await stopWorkingRun(runId);
}

async function stopAll(open: { id: string }[]): Promise<void> {
	await Promise.all(open.map((run) => stopRun(run.id)));
}

/** Stops every open run of a project, before it is deleted. */
export async function stopRunsOf(projectId: string): Promise<void> {
	await stopAll(
		await db
			.select({ id: runs.id })
			.from(runs)
			.where(and(eq(runs.projectId, projectId), inArray(runs.status, ['queued', 'working'])))
	);
}

/** Stops every open run of a layout, before it is deleted. */
export async function stopRunsOfLayout(layoutId: string): Promise<void> {
	await stopAll(
		await db
			.select({ id: runs.id })
			.from(runs)
			.where(and(eq(runs.layoutId, layoutId), inArray(runs.status, ['queued', 'working'])))
	);
}
