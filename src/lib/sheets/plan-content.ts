import type { Layout, Place, Plot } from '../core';
import type { PegRow } from '../schema/peg-row';

/** Who and what the title block names. */
export interface PlanHeading {
	/** Legal owner of the document: the firm. */
	owner: string;
	/** The project's name. */
	project: string;
	layoutName: string;
	layoutRevision: number;
	plotRevision: number;
	/** At most 16 characters (ISO 7200). */
	documentNumber: string;
	/** `A`, `B`, ...; for a draft the one it would get. */
	revision: string;
	/** Letter of the revision that this one replaces. */
	supersedes: string | null;
	/** Null marks a draft: every sheet then says so. */
	issued: { timeMs: number; by: string } | null;
	reason: string;
	/** The core that computed what the plan rests on. */
	coreVersion: string;
	/** The shade run that the layout was judged by, in words; null when there is none. */
	shadeNote: string | null;
	/** Years that the trees of that run have grown since today; null when no shade run stands behind the layout. */
	treeYears: number | null;
}

/** Everything that a plan's sheets are drawn from; frozen with the plan when it is issued. */
export interface PlanContent {
	heading: PlanHeading;
	place: Place;
	plot: Plot;
	layout: Layout;
	/** One for each tracker, in the order of setting out. */
	rows: PegRow[];
	/** What was open when the plan was issued, one sentence each. */
	openPoints: string[];
}
