import type { Layout } from '$lib/core/document';
import type { LayoutAnswer } from '$lib/schema/project';
import type { Actor } from '../auth/actor';
import type { Executor } from '../db';
import { newId } from '../db/ids';
import { layoutRevisions, layouts } from '../db/schema';

/** Puts a layout with its first revision into a project. The caller has checked that the actor may. */
export async function insertLayout(
	tx: Executor,
	actor: Actor,
	projectId: string,
	name: string,
	document: Layout
): Promise<LayoutAnswer> {
	const now = new Date();
	const id = newId();
	const trackerCount = document.trackers.length;
	await tx
		.insert(layouts)
		.values({ id, projectId, name, revision: 1, document, trackerCount, createdAt: now, updatedAt: now });
	await tx
		.insert(layoutRevisions)
		.values({ layoutId: id, revision: 1, document, trackerCount, authorId: actor.userId, createdAt: now });
	return { id, projectId, name, revision: 1, document, updatedAt: now.toISOString() };
}
