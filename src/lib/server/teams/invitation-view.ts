import type { Invitation } from '$lib/schema/account';
import type { invitations } from '../db/schema';

/** An invitation as it is shown: without the hash of its secret. */
export function invitationView(row: typeof invitations.$inferSelect): Invitation {
	return {
		id: row.id,
		email: row.email,
		role: row.role,
		projectId: row.projectId,
		createdAt: row.createdAt.toISOString(),
		expiresAt: row.expiresAt.toISOString()
	};
}
