/** Who is on a project, and who was asked to join a team or a project. */
import { index, mysqlEnum, mysqlTable, primaryKey, uniqueIndex, varchar } from 'drizzle-orm/mysql-core';
import { roles } from '../../../access/roles';
import { idColumn, moment, sha256Column } from '../columns';
import { users } from './people';
import { projects } from './projects';
import { teams } from './teams';

/** Somebody's place on one project: the way in for crew and clients. */
export const projectMembers = mysqlTable(
	'project_members',
	{
		projectId: idColumn('project_id')
			.notNull()
			.references(() => projects.id, { onDelete: 'cascade' }),
		userId: idColumn('user_id')
			.notNull()
			.references(() => users.id, { onDelete: 'cascade' }),
		role: mysqlEnum('role', roles).notNull(),
		createdAt: moment('created_at').notNull()
	},
	(table) => [
		primaryKey({ columns: [table.projectId, table.userId] }),
		index('project_members_user').on(table.userId)
	]
);

export const invitations = mysqlTable(
	'invitations',
	{
		id: idColumn('id').primaryKey(),
		tokenHash: sha256Column('token_hash').notNull(),
		email: varchar('email', { length: 254 }).notNull(),
		role: mysqlEnum('role', roles).notNull(),
		teamId: idColumn('team_id')
			.notNull()
			.references(() => teams.id, { onDelete: 'cascade' }),
		/** null invites to the team, an id to that one project. */
		projectId: idColumn('project_id').references(() => projects.id, { onDelete: 'cascade' }),
		invitedBy: idColumn('invited_by').references(() => users.id, { onDelete: 'set null' }),
		expiresAt: moment('expires_at').notNull(),
		acceptedAt: moment('accepted_at'),
		createdAt: moment('created_at').notNull()
	},
	(table) => [
		uniqueIndex('invitations_hash').on(table.tokenHash),
		index('invitations_team').on(table.teamId),
		index('invitations_project').on(table.projectId)
	]
);
