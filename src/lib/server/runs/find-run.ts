import { eq } from 'drizzle-orm';
import type { Action } from '$lib/access';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { runs } from '../db/schema';
import { notFound } from '../errors';
import { requireProject } from '../guard';
import { runColumns, type RunRow } from './run-view';

/** A run's row for those who may do this on its project; strangers get "not found". */
export async function findRun(actor: Actor, runId: string, action: Action): Promise<RunRow> {
	const [row] = await db.select(runColumns).from(runs).where(eq(runs.id, runId));
	if (!row) throw notFound();
	await requireProject(actor, row.projectId, action);
	return row;
}
