/** Teams and who is in them. */
import { index, mysqlEnum, mysqlTable, primaryKey, varchar } from 'drizzle-orm/mysql-core';
import { roles } from '../../../access/roles';
import { idColumn, moment } from '../columns';
import { users } from './people';

export const teams = mysqlTable('teams', {
	id: idColumn('id').primaryKey(),
	name: varchar('name', { length: 120 }).notNull(),
	createdAt: moment('created_at').notNull()
});

export const teamMembers = mysqlTable(
	'team_members',
	{
		teamId: idColumn('team_id')
			.notNull()
			.references(() => teams.id, { onDelete: 'cascade' }),
		userId: idColumn('user_id')
			.notNull()
			.references(() => users.id, { onDelete: 'cascade' }),
		role: mysqlEnum('role', roles).notNull(),
		createdAt: moment('created_at').notNull()
	},
	(table) => [
		primaryKey({ columns: [table.teamId, table.userId] }),
		index('team_members_user').on(table.userId)
	]
);
