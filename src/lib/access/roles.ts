/** What somebody can be in a team or on one project. */
export const roles = ['owner', 'designer', 'crew', 'client'] as const;
export type Role = (typeof roles)[number];

/** Owners and designers see every project of their team; crew and clients those they were put on. */
export const teamWideRoles = ['owner', 'designer'] as const satisfies readonly Role[];

/** What crew and clients are given on a project. */
export const projectRoles = ['designer', 'crew', 'client'] as const satisfies readonly Role[];
export type ProjectRole = (typeof projectRoles)[number];

export const roleNames: Record<Role, string> = {
	owner: 'Owner',
	designer: 'Designer',
	crew: 'Crew',
	client: 'Client'
};
