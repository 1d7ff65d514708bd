/** Layouts of a project and every revision that was saved. */
import { index, int, mysqlTable, primaryKey, varchar } from 'drizzle-orm/mysql-core';
import type { Layout } from '../../../core/document';
import { document, idColumn, moment } from '../columns';
import { users } from './people';
import { projects } from './projects';

export const layouts = mysqlTable(
	'layouts',
	{
		id: idColumn('id').primaryKey(),
		projectId: idColumn('project_id')
			.notNull()
			.references(() => projects.id, { onDelete: 'cascade' }),
		name: varchar('name', { length: 120 }).notNull(),
		/** Counts saves from 1. */
		revision: int('revision').notNull(),
		document: document<Layout>('document').notNull(),
		/** Of the document, so that lists need not read it. */
		trackerCount: int('tracker_count').notNull().default(0),
		createdAt: moment('created_at').notNull(),
		updatedAt: moment('updated_at').notNull()
	},
	(table) => [index('layouts_project').on(table.projectId, table.createdAt)]
);

export const layoutRevisions = mysqlTable(
	'layout_revisions',
	{
		layoutId: idColumn('layout_id')
			.notNull()
			.references(() => layouts.id, { onDelete: 'cascade' }),
		revision: int('revision').notNull(),
		document: document<Layout>('document').notNull(),
		/** Of the document, so that lists need not read it. */
		trackerCount: int('tracker_count').notNull().default(0),
		authorId: idColumn('author_id').references(() => users.id, { onDelete: 'set null' }),
		createdAt: moment('created_at').notNull()
	},
	(table) => [primaryKey({ columns: [table.layoutId, table.revision] })]
);
