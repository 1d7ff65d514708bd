import type { Layout, Plot } from '../core/document';
import { layoutSchema } from './layout';
import { plotSchema } from './plot';

/**
 * A step from one stored document version to the next. Stored documents are never rewritten in place: they are brought
 * up to date when they are read, and saved in the new form with the next revision.
 */
export interface Migration {
	from: number;
	upgrade: (document: Record<string, unknown>) => Record<string, unknown>;
}

/** No older version has been stored anywhere yet; the first change of a document's form adds its step here. */
const plotMigrations: Migration[] = [];
const layoutMigrations: Migration[] = [];

/** Runs the steps that an older document needs. A document that names no version is left for the shape to refuse. */
export function migrate(document: unknown, migrations: readonly Migration[]): unknown {
	if (typeof document !== 'object' || document === null || Array.isArray(document)) return document;
	let current: Record<string, unknown> = { ...document };
	for (const step of [...migrations].sort((a, b) => a.from - b.from)) {
		if (current.version === step.from) current = { ...step.upgrade(current), version: step.from + 1 };
	}
	return current;
}

/** A stored plot in today's form. Throws the validator's error when it is damaged. */
export function readPlot(document: unknown): Plot {
	return plotSchema.parse(migrate(document, plotMigrations));
}

/** A stored layout in today's form. Throws the validator's error when it is damaged. */
export function readLayout(document: unknown): Layout {
	return layoutSchema.parse(migrate(document, layoutMigrations));
}
