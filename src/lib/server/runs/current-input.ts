import { eq } from 'drizzle-orm';
import type { RunEnergy } from '$lib/schema/energy';
import type { RunKind } from '$lib/schema/run';
import { readLayout, readPlot } from '$lib/schema/document-version';
import { db } from '../db';
import { layouts, projects } from '../db/schema';
import { notFound } from '../errors';
import { canonicalJson } from './canonical-json';
import { runInput, runInputHash, type RunSources, type RunTerms } from './run-input';

/** Everything that a run of a layout would compute from now, with the revisions. */
export async function currentSources(
	layoutId: string
): Promise<{ projectId: string; sources: RunSources; layoutRevision: number; plotRevision: number }> {
	const [row] = await db
		.select({
			projectId: projects.id,
			place: projects.place,
			winterRule: projects.winterRule,
			plot: projects.plot,
			plotRevision: projects.plotRevision,
			layout: layouts.document,
			layoutRevision: layouts.revision
		})
		.from(layouts)
		.innerJoin(projects, eq(projects.id, layouts.projectId))
		.where(eq(layouts.id, layoutId));
	if (!row) throw notFound();
	const { place, winterRule } = row;
	return {
		projectId: row.projectId,
		sources: { place, winterRule, plot: readPlot(row.plot), layout: readLayout(row.layout) },
		layoutRevision: row.layoutRevision,
		plotRevision: row.plotRevision
	};
}

/** Hashes by what they were made from; a large layout takes tens of milliseconds to read and hash. */
const known = new Map<string, string>();
const MAX_KNOWN = 500;

/** The hash that a run of the layout as it stands would have. */
export async function currentHash(
	layoutId: string,
	kind: RunKind,
	terms: RunTerms & { energy: RunEnergy | null }
): Promise<string> {
	const energyDigest = terms.energy?.digest;
	const [row] = await db
		.select({
			place: projects.place,
			winterRule: projects.winterRule,
			plotRevision: projects.plotRevision,
			layoutRevision: layouts.revision
		})
		.from(layouts)
		.innerJoin(projects, eq(projects.id, layouts.projectId))
		.where(eq(layouts.id, layoutId));
	if (!row) throw notFound();
	const key = canonicalJson({
		layoutId,
		kind,
		year: terms.year,
		stepMinutes: terms.stepMinutes,
		treeYears: terms.treeYears,
		energyDigest,
		...row
	});
	const found = known.get(key);
	if (found) return found;
	const current = await currentSources(layoutId);
	const hash = runInputHash(kind, runInput(current.sources, terms), energyDigest);
	if (current.layoutRevision === row.layoutRevision && current.plotRevision === row.plotRevision) {
		if (known.size >= MAX_KNOWN) known.delete(known.keys().next().value ?? '');
		known.set(key, hash);
	}
	return hash;
}
