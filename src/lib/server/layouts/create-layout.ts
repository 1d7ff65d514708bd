import { count, eq } from 'drizzle-orm';
import type { z } from 'zod';
import { emptyLayout } from '$lib/schema/layout';
import type { LayoutAnswer, newLayoutSchema } from '$lib/schema/project';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { layouts } from '../db/schema';
import { AppError } from '../errors';
import { requireProject } from '../guard';
import { getLayout } from './get-layout';
import { insertLayout } from './insert-layout';

const MAX_LAYOUTS = 200;

/** Adds a layout: the one given, a copy of another of the same project, or an empty one. */
export async function createLayout(
	actor: Actor,
	projectId: string,
	wish: z.output<typeof newLayoutSchema>
): Promise<LayoutAnswer> {
	await requireProject(actor, projectId, 'layout.edit');
	if (wish.document && wish.copyOf) {
		throw new AppError('invalid', 'A new layout is either given or copied.', {
			errors: [{ path: 'copyOf', message: 'Leave out either document or copyOf.' }]
		});
	}
	const [{ held }] = await db.select({ held: count() }).from(layouts).where(eq(layouts.projectId, projectId));
	if (held >= MAX_LAYOUTS) {
		throw new AppError('conflict', `A project keeps at most ${MAX_LAYOUTS} layouts: delete one first.`);
	}
	const document = wish.copyOf
		? await documentToCopy(actor, projectId, wish.copyOf)
		: (wish.document ?? emptyLayout());
	return db.transaction((tx) => insertLayout(tx, actor, projectId, wish.name, document));
}

async function documentToCopy(actor: Actor, projectId: string, layoutId: string) {
	const layout = await getLayout(actor, layoutId);
	if (layout.projectId !== projectId) {
		throw new AppError('invalid', 'A layout is copied within its project.', {
			errors: [{ path: 'copyOf', message: 'Give the id of a layout of this project.' }]
		});
	}
	return layout.document;
}
