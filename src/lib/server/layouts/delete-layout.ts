import { eq } from 'drizzle-orm';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { layouts, plans } from '../db/schema';
import { AppError } from '../errors';
import { stopRunsOfLayout } from '../runs/stop-runs';
import { findLayout } from './find-layout';

/** Deletes a layout with its runs. The last layout of a project stays, and one that a plan was issued from stays too. */
export async function deleteLayout(actor: Actor, layoutId: string): Promise<void> {
	const { projectId } = await findLayout(actor, layoutId, 'layout.edit');
	await db.transaction(async (tx) => {
		const held = await tx
			.select({ id: layouts.id })
			.from(layouts)
			.where(eq(layouts.projectId, projectId))
			.for('update');
		if (held.length <= 1) {
			throw new AppError(
				'conflict',
				'A project keeps at least one layout: add another before you delete this.'
			);
		}
		const [issued] = await tx
			.select({ letter: plans.revisionLetter })
			.from(plans)
			.where(eq(plans.layoutId, layoutId))
			.limit(1);
		if (issued) {
			throw new AppError('conflict', `Plan ${issued.letter} was issued from this layout, so it stays.`);
		}
		await stopRunsOfLayout(layoutId);
		await tx.delete(layouts).where(eq(layouts.id, layoutId));
	});
}
