import type { Role } from './roles';

/**
 * What can be done, and by whom. The same table hides a button and refuses a request.
 * A plan may be read by crew: it is what they build from. Clients get their own review page, not the plan's files.
 */
const table = {
	'project.read': ['owner', 'designer', 'crew', 'client'],
	'project.create': ['owner', 'designer'],
	'project.edit': ['owner', 'designer'],
	'project.delete': ['owner'],
	'project.invite': ['owner', 'designer'],
	'plot.edit': ['owner', 'designer'],
	'layout.read': ['owner', 'designer', 'crew', 'client'],
	'layout.edit': ['owner', 'designer'],
	'run.read': ['owner', 'designer', 'crew', 'client'],
	'run.start': ['owner', 'designer'],
	'run.cancel': ['owner', 'designer'],
	'plan.read': ['owner', 'designer', 'crew'],
	'plan.issue': ['owner', 'designer'],
	'model.read': ['owner', 'designer', 'crew', 'client'],
	'model.edit': ['owner', 'designer'],
	'team.read': ['owner', 'designer'],
	'team.manage': ['owner']
} as const satisfies Record<string, readonly Role[]>;

export type Action = keyof typeof table;

export const actions = Object.keys(table) as Action[];

export function can(role: Role, action: Action): boolean {
	return (table[action] as readonly Role[]).includes(role);
}

/** The roles that may do it: for use inside a query's WHERE clause. */
export function rolesThatCan(action: Action): readonly Role[] {
	return table[action];
}
