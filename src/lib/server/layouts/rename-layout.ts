import { eq } from 'drizzle-orm';
import type { LayoutSummary } from '$lib/schema/project';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { layouts } from '../db/schema';
import { notFound } from '../errors';
import { findLayout } from './find-layout';
import { layoutSummary, summaryColumns } from './layout-summary';

/** Renames a layout. Its revision stays: nothing that is computed depends on the name. */
export async function renameLayout(actor: Actor, layoutId: string, name: string): Promise<LayoutSummary> {
	await findLayout(actor, layoutId, 'layout.edit');
	await db.update(layouts).set({ name }).where(eq(layouts.id, layoutId));
	const [row] = await db.select(summaryColumns).from(layouts).where(eq(layouts.id, layoutId));
	if (!row) throw notFound();
	return layoutSummary(row);
}
