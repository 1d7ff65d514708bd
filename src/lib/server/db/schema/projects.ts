/** A project with its place, rule and plot, every plot that was saved, and a team's own tracker models. */
import { index, int, mysqlTable, primaryKey, text, varchar } from 'drizzle-orm/mysql-core';
import type { Place, Plot, TrackerModel, WinterRule } from '../../../core/document';
import { document, idColumn, moment } from '../columns';
import { users } from './people';
import { teams } from './teams';

export const projects = mysqlTable(
	'projects',
	{
		id: idColumn('id').primaryKey(),
		teamId: idColumn('team_id')
			.notNull()
			.references(() => teams.id, { onDelete: 'cascade' }),
		name: varchar('name', { length: 120 }).notNull(),
		notes: text('notes').notNull(),
		place: document<Place>('place').notNull(),
		winterRule: document<WinterRule>('winter_rule').notNull(),
		plot: document<Plot>('plot').notNull(),
		/** Counts saves of the plot from 1. */
		plotRevision: int('plot_revision').notNull(),
		createdAt: moment('created_at').notNull(),
		updatedAt: moment('updated_at').notNull()
	},
	(table) => [index('projects_team').on(table.teamId, table.updatedAt)]
);

export const plotRevisions = mysqlTable(
	'plot_revisions',
	{
		projectId: idColumn('project_id')
			.notNull()
			.references(() => projects.id, { onDelete: 'cascade' }),
		revision: int('revision').notNull(),
		document: document<Plot>('document').notNull(),
		authorId: idColumn('author_id').references(() => users.id, { onDelete: 'set null' }),
		createdAt: moment('created_at').notNull()
	},
	(table) => [primaryKey({ columns: [table.projectId, table.revision] })]
);

export const trackerModels = mysqlTable(
	'tracker_models',
	{
		id: idColumn('id').primaryKey(),
		teamId: idColumn('team_id')
			.notNull()
			.references(() => teams.id, { onDelete: 'cascade' }),
		document: document<TrackerModel>('document').notNull(),
		createdAt: moment('created_at').notNull(),
		updatedAt: moment('updated_at').notNull()
	},
	(table) => [index('tracker_models_team').on(table.teamId)]
);
