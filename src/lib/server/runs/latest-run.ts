import { and, desc, eq, inArray } from 'drizzle-orm';
import type { Run, RunKind } from '$lib/schema/run';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { runs } from '../db/schema';
import { findLayout } from '../layouts/find-layout';
import { runColumns, runView } from './run-view';

/** How far back to look for a run that fits the layout as it stands, as after an undo. */
const LOOK_BACK = 10;

/** The run to show for a layout: the newest that is not out of date, else the newest; null when there is none. */
export async function latestRun(actor: Actor, layoutId: string, kind: RunKind): Promise<Run | null> {
	await findLayout(actor, layoutId, 'run.read');
	const rows = await db
		.select(runColumns)
		.from(runs)
		.where(
			and(
				eq(runs.layoutId, layoutId),
				eq(runs.kind, kind),
				inArray(runs.status, ['queued', 'working', 'done', 'failed'])
			)
		)
		.orderBy(desc(runs.id))
		.limit(LOOK_BACK);
	let newest: Run | null = null;
	for (const row of rows) {
		const run = await runView(row);
		if (!run.outOfDate && run.status !== 'failed') return run;
		newest ??= run;
	}
	return newest;
}
