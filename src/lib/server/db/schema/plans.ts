/** Issued plans: rows here are written once and never changed. */
import { index, int, mysqlTable, primaryKey, text, uniqueIndex, varchar } from 'drizzle-orm/mysql-core';
import { bytes, document, idColumn, moment, sha256Column } from '../columns';
import { layouts } from './layouts';
import { users } from './people';
import { projects } from './projects';

export const plans = mysqlTable(
	'plans',
	{
		id: idColumn('id').primaryKey(),
		projectId: idColumn('project_id')
			.notNull()
			.references(() => projects.id, { onDelete: 'cascade' }),
		/** null when the layout was deleted afterwards; the snapshot keeps what was issued. */
		layoutId: idColumn('layout_id').references(() => layouts.id, { onDelete: 'set null' }),
		layoutRevision: int('layout_revision').notNull(),
		/** A, B, … Z, AA, … */
		revisionLetter: varchar('revision_letter', { length: 4 }).notNull(),
		title: varchar('title', { length: 120 }).notNull().default(''),
		reason: text('reason').notNull(),
		issuedBy: idColumn('issued_by').references(() => users.id, { onDelete: 'set null' }),
		issuedAt: moment('issued_at').notNull(),
		/** Everything the sheets were made from. */
		snapshot: document<Record<string, unknown>>('snapshot').notNull(),
		/** Of the snapshot's text as it is stored. */
		snapshotSha256: sha256Column('snapshot_sha256').notNull()
	},
	(table) => [
		uniqueIndex('plans_letter').on(table.projectId, table.revisionLetter),
		index('plans_layout').on(table.layoutId)
	]
);

export const planFiles = mysqlTable(
	'plan_files',
	{
		planId: idColumn('plan_id')
			.notNull()
			.references(() => plans.id, { onDelete: 'cascade' }),
		name: varchar('name', { length: 120 }).notNull(),
		mediaType: varchar('media_type', { length: 120 }).notNull(),
		byteSize: int('byte_size').notNull(),
		sha256: sha256Column('sha256').notNull(),
		bytes: bytes('bytes').notNull()
	},
	(table) => [primaryKey({ columns: [table.planId, table.name] })]
);
