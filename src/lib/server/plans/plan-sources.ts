import { desc, eq } from 'drizzle-orm';
import { CORE_VERSION, type Layout, type Place, type Plot, type ShadeResult } from '$lib/core';
import { pegRows } from '$lib/exchange/peg-csv-rows';
import { formatDay, formatPercent, isoDateAt } from '$lib/i18n';
import type { Run } from '$lib/schema/run';
import { grownTreesInWords, type PlanContent } from '$lib/sheets';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { layouts, plans, projects, teams } from '../db/schema';
import { notFound } from '../errors';
import { requireProject } from '../guard';
import { currentSources } from '../runs/current-input';
import { getMountResult, getShadeResult } from '../runs/get-run-result';
import { isMountRunOf } from '../runs/is-mount-run-of';
import { latestRun } from '../runs/latest-run';
import { openPoints } from './open-points';
import { nextRevision } from './revision-letter';

/** What a plan issued now would be made from. */
export interface PlanSources {
	place: Place;
	plot: Plot;
	layout: Layout;
	layoutName: string;
	layoutRevision: number;
	plotRevision: number;
	projectName: string;
	teamName: string;
	projectId: string;
	/** Letter of the last issued plan of the project. */
	lastRevision: string | null;
	openPoints: string[];
	shadeNote: string | null;
	/** Years that the trees of the shade run have grown; null without a run that stands. */
	treeYears: number | null;
	runs: { shade: Run | null; mounts: Run | null };
}

/** Reads a layout as it stands with all that a plan says about it. For those who may issue plans. */
export async function planSources(actor: Actor, projectId: string, layoutId: string): Promise<PlanSources> {
	await requireProject(actor, projectId, 'plan.issue');
	const [names] = await db
		.select({ layout: layouts.name, project: projects.name, team: teams.name })
		.from(layouts)
		.innerJoin(projects, eq(projects.id, layouts.projectId))
		.innerJoin(teams, eq(teams.id, projects.teamId))
		.where(eq(layouts.id, layoutId));
	const current = await currentSources(layoutId);
	if (!names || current.projectId !== projectId) throw notFound();
	const { place, plot, layout } = current.sources;
	const runs = {
		shade: await latestRun(actor, layoutId, 'shade'),
		mounts: await latestRun(actor, layoutId, 'mounts')
	};
	const usable = standing(runs.shade);
	const result = usable ? await getShadeResult(actor, usable.id) : null;
	const mountRun = standing(runs.mounts);
	return {
		place,
		plot,
		layout,
		layoutName: names.layout,
		layoutRevision: current.layoutRevision,
		plotRevision: current.plotRevision,
		projectName: names.project,
		teamName: names.team,
		projectId,
		lastRevision: await lastRevision(projectId),
		openPoints: openPoints(plot, layout, {
			...runs,
			verdict: result?.winterRule ?? null,
			mountResult: mountRun ? await getMountResult(actor, mountRun.id) : null,
			choiceStands: await isMountRunOf(projectId, layoutId, layout.mounts.fromRunId)
		}),
		shadeNote: usable && result ? shadeNote(usable, result, place, plot) : null,
		treeYears: usable?.treeYears ?? null,
		runs
	};
}

export async function lastRevision(projectId: string): Promise<string | null> {
	const [last] = await db
		.select({ revision: plans.revisionLetter })
		.from(plans)
		.where(eq(plans.projectId, projectId))
		.orderBy(desc(plans.id))
		.limit(1);
	return last?.revision ?? null;
}

/** A finished run of what the layout and its plot are now. */
function standing(run: Run | null): Run | null {
	return run?.status === 'done' && !run.outOfDate ? run : null;
}

function shadeNote(run: Run, result: ShadeResult, place: Place, plot: Plot): string {
	const day = formatDay(isoDateAt(Date.parse(run.finishedAt ?? run.createdAt), place.timeZone), true);
	const { met, judgedMinutes } = result.winterRule;
	const rule = !met ? 'not met' : judgedMinutes === 0 ? 'not put to the test' : 'met';
	const grown = grownTreesInWords(plot.obstacles, run.treeYears);
	const trees = grown ? `, computed with ${grown}` : '';
	const loss = formatPercent(result.field.beamLoss, 1);
	return `Shade run of ${day} for the year ${run.year}${trees}. Beam loss by shade ${loss}, winter rule ${rule}.`;
}

/** The content of a plan's sheets; without `issued` it is a draft. */
export function planContent(
	sources: PlanSources,
	facts: { title: string | null; reason: string; issued: { timeMs: number; by: string } | null }
): PlanContent {
	const { place, plot, layout } = sources;
	return {
		heading: {
			owner: sources.teamName,
			project: facts.title ?? sources.projectName,
			layoutName: sources.layoutName,
			layoutRevision: sources.layoutRevision,
			plotRevision: sources.plotRevision,
			documentNumber: documentNumber(sources.projectId),
			revision: nextRevision(sources.lastRevision),
			supersedes: sources.lastRevision,
			issued: facts.issued,
			reason: facts.reason,
			coreVersion: CORE_VERSION,
			shadeNote: sources.shadeNote,
			treeYears: sources.treeYears
		},
		place,
		plot,
		layout,
		rows: pegRows(place, plot, layout),
		openPoints: sources.openPoints
	};
}

/** One number for all plans of a project, within the 16 characters of ISO 7200. */
export function documentNumber(projectId: string): string {
	return `TY-${projectId.slice(-8).toUpperCase()}`;
}
