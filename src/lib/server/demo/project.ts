import { and, eq } from 'drizzle-orm';
import type { MountChoice } from '$lib/core/document';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { newId } from '../db/ids';
import { audit, projectMembers, projects } from '../db/schema';
import { allLayouts } from '../layouts/list-layouts';
import { saveLayout } from '../layouts/save-layout';
import { logger } from '../log';
import { issuePlan } from '../plans/issue-plan';
import { createProject } from '../projects/create-project';
import { savePlot } from '../projects/save-plot';
import { getMountResult } from '../runs/get-run-result';
import { startRun } from '../runs/start-run';
import { waitForRun } from '../runs/wait-for-run';
import { demoLayout, demoName, demoNotes, demoPlace, demoPlot } from './hillside';
import type { DemoPeople } from './people';

/** One id for ever, so that a seed that was broken off is found and made anew. */
const DEMO_PROJECT_ID = 'demo-hillside-farm';

const DONE_MARK = 'demo.seeded';

const COMPUTE_PATIENCE_MS = 60_000;

/**
 * Puts the demo's project in, once: plot, layout, computed runs, chosen mounts and an issued plan, all by the use cases
 * of the pages. Does nothing when it was put in before, also when somebody has deleted it since.
 */
export async function seedProject(people: DemoPeople): Promise<void> {
	const [mark] = await db
		.select({ id: audit.id })
		.from(audit)
		.where(and(eq(audit.action, DONE_MARK), eq(audit.subject, DEMO_PROJECT_ID)))
		.limit(1);
	if (mark) return;
	const began = performance.now();
	await db.delete(projects).where(eq(projects.id, DEMO_PROJECT_ID));
	const designer: Actor = { userId: people.userIds.designer };
	await fillProject(designer, people);
	await db.insert(audit).values({
		id: newId(),
		actor: designer.userId,
		action: DONE_MARK,
		subject: DEMO_PROJECT_ID,
		detail: {},
		at: new Date()
	});
	logger.info({ ms: Math.round(performance.now() - began) }, 'the demo project is in');
}

async function fillProject(designer: Actor, people: DemoPeople): Promise<void> {
	const { id: projectId } = await createProject(
		designer,
		{ name: demoName, notes: demoNotes, place: demoPlace, teamId: people.teamId },
		DEMO_PROJECT_ID
	);
	const createdAt = new Date();
	await db.insert(projectMembers).values([
		{ projectId, userId: people.userIds.crew, role: 'crew', createdAt },
		{ projectId, userId: people.userIds.client, role: 'client', createdAt }
	]);
	await savePlot(designer, projectId, demoPlot, 1);
	const [{ id: layoutId }] = await allLayouts(designer, projectId);
	const layout = demoLayout();
	await saveLayout(designer, layoutId, layout, 1);

	const terms = { layoutId, stepMinutes: 10, treeYears: 0 };
	const shade = await startRun(designer, projectId, { kind: 'shade', ...terms });
	const mounts = await startRun(designer, projectId, { kind: 'mounts', ...terms });
	await Promise.all([shade, mounts].map((run) => waitForRun(designer, run.id, COMPUTE_PATIENCE_MS)));

	const choice = await chooseMounts(designer, mounts.id);
	await saveLayout(designer, layoutId, { ...layout, mounts: choice }, 2);
	await issuePlan(designer, projectId, { layoutId, reason: 'First issue, for pegging out (invented demo)' });
}

/** The common mount, and those exceptions of the run that better a tracker's class. */
async function chooseMounts(actor: Actor, runId: string): Promise<MountChoice> {
	const result = await getMountResult(actor, runId);
	const commonClass = new Map(result.trackers.map((one) => [one.trackerId, one.commonClass]));
	// A place of its own only where it wins a class: every further place is one more drawing for the crew.
	const worthIt = result.exceptions.filter((one) => one.class !== commonClass.get(one.trackerId));
	const exceptions = Object.fromEntries(worthIt.map((one) => [one.trackerId, one.mount]));
	return { common: result.common, exceptions, fromRunId: runId };
}
