import { eq } from 'drizzle-orm';
import { readLayout } from '$lib/schema/document-version';
import type { LayoutAnswer } from '$lib/schema/project';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { layouts } from '../db/schema';
import { notFound } from '../errors';
import { findLayout } from './find-layout';

export async function getLayout(actor: Actor, layoutId: string): Promise<LayoutAnswer> {
	await findLayout(actor, layoutId, 'layout.read');
	const [row] = await db.select().from(layouts).where(eq(layouts.id, layoutId));
	if (!row) throw notFound();
	return {
		id: row.id,
		projectId: row.projectId,
		name: row.name,
		revision: row.revision,
		document: readLayout(row.document),
		updatedAt: row.updatedAt.toISOString()
	};
}
