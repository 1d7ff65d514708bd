import { and, eq } from 'drizzle-orm';
import { db } from '../db';
import { runs } from '../db/schema';
import { currentHash } from './current-input';
import { runColumns } from './run-view';

/**
 * Whether a mount run of the project was computed from what a layout and its plot are now; a copied layout shares the
 * run of the one it was made from. True without a run: a choice that was made by hand goes with none.
 */
export async function isMountRunOf(
	projectId: string,
	layoutId: string,
	runId: string | null
): Promise<boolean> {
	if (runId === null) return true;
	const [run] = await db
		.select(runColumns)
		.from(runs)
		.where(and(eq(runs.id, runId), eq(runs.projectId, projectId), eq(runs.kind, 'mounts')));
	return run !== undefined && run.inputHash === (await currentHash(layoutId, 'mounts', run));
}
