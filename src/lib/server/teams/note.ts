import type { Actor } from '../auth/actor';
import type { Executor } from '../db';
import { newId } from '../db/ids';
import { audit } from '../db/schema';

/** Writes into the team's record who did what. Give the transaction of the deed, so that both hold or neither. */
export async function note(
	executor: Executor,
	actor: Actor | null,
	action: string,
	subject: string,
	detail: Record<string, unknown> = {}
): Promise<void> {
	await executor
		.insert(audit)
		.values({ id: newId(), actor: actor?.userId ?? null, action, subject, detail, at: new Date() });
}
