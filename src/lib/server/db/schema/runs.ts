/** Computations: what was asked, with the whole input, how far it is, and what came out. */
import {
	boolean,
	double,
	index,
	int,
	mysqlEnum,
	mysqlTable,
	primaryKey,
	text,
	varchar
} from 'drizzle-orm/mysql-core';
import type { RunInput } from '../../../core/results';
import type { RunEnergy } from '../../../schema/energy';
import { bytes, document, idColumn, moment, sha256Column } from '../columns';
import { layouts } from './layouts';
import { users } from './people';
import { projects } from './projects';

export const runs = mysqlTable(
	'runs',
	{
		id: idColumn('id').primaryKey(),
		projectId: idColumn('project_id')
			.notNull()
			.references(() => projects.id, { onDelete: 'cascade' }),
		layoutId: idColumn('layout_id')
			.notNull()
			.references(() => layouts.id, { onDelete: 'cascade' }),
		kind: mysqlEnum('kind', ['shade', 'mounts', 'answers']).notNull(),
		layoutRevision: int('layout_revision').notNull(),
		plotRevision: int('plot_revision').notNull(),
		/** What the run was asked for, also inside its input: lists show these without reading the whole. */
		year: int('year').notNull(),
		stepMinutes: int('step_minutes').notNull(),
		treeYears: double('tree_years').notNull(),
		/** Energy settings without the hours of a weather file; null for the shade alone. */
		energy: document<RunEnergy>('energy'),
		status: mysqlEnum('status', ['queued', 'working', 'done', 'failed', 'cancelled']).notNull(),
		/** 0..1. */
		progress: double('progress').notNull().default(0),
		/** What it is doing, in words. */
		stage: varchar('stage', { length: 120 }).notNull().default(''),
		/** SHA-256 of the input as it was computed: equal inputs share a result. */
		inputHash: sha256Column('input_hash').notNull(),
		coreVersion: varchar('core_version', { length: 32 }).notNull(),
		input: document<RunInput>('input').notNull(),
		computeMs: double('compute_ms'),
		error: text('error'),
		cancelRequested: boolean('cancel_requested').notNull().default(false),
		requestedBy: idColumn('requested_by').references(() => users.id, { onDelete: 'set null' }),
		createdAt: moment('created_at').notNull(),
		startedAt: moment('started_at'),
		finishedAt: moment('finished_at'),
		/** Last sign of life of the process that works on it; an old one is taken up again. */
		heartbeatAt: moment('heartbeat_at'),
		/** Who works on it: a finished result of a process that lost the run is not taken. */
		leaseId: idColumn('lease_id'),
		/** How often it was taken up; a run that ends its process every time is given up. */
		attempts: int('attempts').notNull().default(0)
	},
	(table) => [
		index('runs_layout').on(table.layoutId, table.kind, table.createdAt),
		index('runs_input').on(table.inputHash, table.kind),
		index('runs_status').on(table.status, table.createdAt),
		index('runs_project').on(table.projectId)
	]
);

/** Results as gzip of JSON, in parts that stay well under the server's packet limit. Written with the run's end. */
export const runResults = mysqlTable(
	'run_results',
	{
		runId: idColumn('run_id')
			.notNull()
			.references(() => runs.id, { onDelete: 'cascade' }),
		part: int('part').notNull(),
		bytes: bytes('bytes').notNull()
	},
	(table) => [primaryKey({ columns: [table.runId, table.part] })]
);
