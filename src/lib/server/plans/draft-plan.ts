import { planSheets, sheetToSvg, type Sheet } from '$lib/sheets';
import type { Actor } from '../auth/actor';
import { notFound } from '../errors';
import { planContent, planSources } from './plan-sources';
import { nextRevision } from './revision-letter';
import { whyNoPlan } from './refuse-empty';

export interface PlanDraft {
	layoutId: string;
	layoutRevision: number;
	plotRevision: number;
	/** Letter that the next issue gets. */
	nextRevision: string;
	/** Why no plan can be issued at all; null when one can. */
	refusal: string | null;
	openPoints: string[];
	shadeNote: string | null;
	sheets: { name: string; scale: string | null }[];
}

/** What a plan issued now would hold, for those who may issue it; its sheets say that they are a draft. */
export async function draftPlan(actor: Actor, projectId: string, layoutId: string): Promise<PlanDraft> {
	const { sources, sheets } = await draftSheets(actor, projectId, layoutId);
	return {
		layoutId,
		layoutRevision: sources.layoutRevision,
		plotRevision: sources.plotRevision,
		nextRevision: nextRevision(sources.lastRevision),
		refusal: whyNoPlan(sources.layout),
		openPoints: sources.openPoints,
		shadeNote: sources.shadeNote,
		sheets: sheets.map(({ name, scale }) => ({ name, scale }))
	};
}

/** One sheet of the draft as SVG, 1 is the first. */
export async function draftSheetSvg(
	actor: Actor,
	projectId: string,
	layoutId: string,
	number: number
): Promise<string> {
	const { sheets } = await draftSheets(actor, projectId, layoutId);
	const sheet = sheets[number - 1];
	if (!sheet) throw notFound();
	return sheetToSvg(sheet);
}

async function draftSheets(actor: Actor, projectId: string, layoutId: string) {
	const sources = await planSources(actor, projectId, layoutId);
	const empty = whyNoPlan(sources.layout) !== null;
	const sheets: Sheet[] = empty
		? []
		: planSheets(planContent(sources, { title: null, reason: '', issued: null }));
	return { sources, sheets };
}
