/** People who sign in, and how: sessions, tries, forgotten passwords, personal API tokens. */
import { boolean, index, mysqlTable, text, uniqueIndex, varchar } from 'drizzle-orm/mysql-core';
import { document, idColumn, moment, sha256Column } from '../columns';

export const users = mysqlTable(
	'users',
	{
		id: idColumn('id').primaryKey(),
		/** Lower case. */
		email: varchar('email', { length: 254 }).notNull(),
		name: varchar('name', { length: 120 }).notNull(),
		/** Argon2id, in its own text form with salt and cost. */
		passwordHash: varchar('password_hash', { length: 255 }).notNull(),
		createdAt: moment('created_at').notNull()
	},
	(table) => [uniqueIndex('users_email').on(table.email)]
);

export const sessions = mysqlTable(
	'sessions',
	{
		id: varchar('id', { length: 64 }).primaryKey(),
		userId: idColumn('user_id')
			.notNull()
			.references(() => users.id, { onDelete: 'cascade' }),
		expiresAt: moment('expires_at').notNull()
	},
	(table) => [index('sessions_user').on(table.userId), index('sessions_expiry').on(table.expiresAt)]
);

export const passwordResets = mysqlTable(
	'password_resets',
	{
		/** SHA-256 of the token that was sent; the token itself is nowhere. */
		tokenHash: sha256Column('token_hash').primaryKey(),
		userId: idColumn('user_id')
			.notNull()
			.references(() => users.id, { onDelete: 'cascade' }),
		expiresAt: moment('expires_at').notNull(),
		createdAt: moment('created_at').notNull()
	},
	(table) => [index('password_resets_user').on(table.userId)]
);

/** Tries that count against a limit: failed sign-ins, sign-ups and reset requests, by who tried. */
export const signInAttempts = mysqlTable(
	'sign_in_attempts',
	{
		id: idColumn('id').primaryKey(),
		/** Kind of try and SHA-256 of address and host, so that the table holds no addresses of strangers. */
		bucket: varchar('bucket', { length: 80 }).notNull(),
		at: moment('at').notNull()
	},
	(table) => [
		index('sign_in_attempts_bucket').on(table.bucket, table.at),
		index('sign_in_attempts_at').on(table.at)
	]
);

export const apiTokens = mysqlTable(
	'api_tokens',
	{
		id: idColumn('id').primaryKey(),
		userId: idColumn('user_id')
			.notNull()
			.references(() => users.id, { onDelete: 'cascade' }),
		name: varchar('name', { length: 120 }).notNull(),
		tokenHash: sha256Column('token_hash').notNull(),
		scopes: document<string[]>('scopes').notNull(),
		/** null never expires. */
		expiresAt: moment('expires_at'),
		lastUsedAt: moment('last_used_at'),
		createdAt: moment('created_at').notNull()
	},
	(table) => [uniqueIndex('api_tokens_hash').on(table.tokenHash), index('api_tokens_user').on(table.userId)]
);

/** Letters that the local catcher took in; only filled in local mode. */
export const mailbox = mysqlTable(
	'mailbox',
	{
		id: idColumn('id').primaryKey(),
		to: varchar('to', { length: 254 }).notNull(),
		subject: varchar('subject', { length: 255 }).notNull(),
		text: text('text').notNull(),
		/** Whether somebody opened it on the mailbox page. */
		seen: boolean('seen').notNull().default(false),
		at: moment('at').notNull()
	},
	(table) => [index('mailbox_at').on(table.at)]
);

/** Who did what, for the team's own record. */
export const audit = mysqlTable(
	'audit',
	{
		id: idColumn('id').primaryKey(),
		/** User id, or null when nobody was signed in. Not a reference: the record outlives the account. */
		actor: idColumn('actor'),
		/** For example `project.create`. */
		action: varchar('action', { length: 80 }).notNull(),
		/** Id of what it was done to. */
		subject: varchar('subject', { length: 64 }),
		detail: document<Record<string, unknown>>('detail'),
		at: moment('at').notNull()
	},
	(table) => [
		index('audit_subject').on(table.subject, table.at),
		index('audit_actor').on(table.actor, table.at)
	]
);
