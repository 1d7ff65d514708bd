import { eq } from 'drizzle-orm';
import type { Action, Role } from '$lib/access';
import type { Actor } from '../auth/actor';
import { db, type Executor } from '../db';
import { layouts } from '../db/schema';
import { notFound } from '../errors';
import { requireProject } from '../guard';

export interface FoundLayout {
	id: string;
	projectId: string;
	role: Role;
}

/** Which project a layout belongs to, for those who may do this there; strangers get "not found". */
export async function findLayout(
	actor: Actor,
	layoutId: string,
	action: Action,
	executor: Executor = db
): Promise<FoundLayout> {
	const [row] = await executor
		.select({ projectId: layouts.projectId })
		.from(layouts)
		.where(eq(layouts.id, layoutId));
	if (!row) throw notFound();
	const { role } = await requireProject(actor, row.projectId, action, executor);
	return { id: layoutId, projectId: row.projectId, role };
}
