import type { Role } from '$lib/access';
import type { Project } from '$lib/schema/project';
import type { projects } from '../db/schema';

/** What of a project's row is told outside, without the plot. */
export function projectView(
	row: Omit<typeof projects.$inferSelect, 'plot' | 'plotRevision'>,
	role: Role
): Project {
	return {
		id: row.id,
		name: row.name,
		notes: row.notes,
		place: row.place,
		winterRule: row.winterRule,
		teamId: row.teamId,
		role,
		createdAt: row.createdAt.toISOString(),
		updatedAt: row.updatedAt.toISOString()
	};
}
