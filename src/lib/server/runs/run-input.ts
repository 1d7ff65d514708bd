import { createHash } from 'node:crypto';
import { CORE_VERSION } from '$lib/core';
import type { Layout, Place, Plot, WinterRule } from '$lib/core/document';
import type { RunInput } from '$lib/core/results';
import { standardOffsetMinutes } from '$lib/i18n';
import type { RunKind } from '$lib/schema/run';
import { defaultWinterRule } from '$lib/schema/winter-rule';
import { canonicalJson } from './canonical-json';

export interface RunSources {
	place: Place;
	winterRule: WinterRule;
	plot: Plot;
	layout: Layout;
}

export interface RunTerms {
	year: number;
	stepMinutes: number;
	treeYears: number;
}

/** What the core is given for a run of these documents. */
export function runInput(sources: RunSources, terms: RunTerms): RunInput {
	return {
		place: sources.place,
		plot: sources.plot,
		layout: sources.layout,
		winterRule: sources.winterRule,
		year: terms.year,
		stepMinutes: terms.stepMinutes,
		treeYears: terms.treeYears,
		utcOffsetMinutes: standardOffsetMinutes(terms.year, sources.place.timeZone)
	};
}

/**
 * SHA-256 of what a run's result depends on, with the core's version. The chosen mounts are left out (choosing one does
 * not make a run out of date), and for mount runs the winter rule too.
 */
export function runInputHash(kind: RunKind, input: RunInput): string {
	const counted = {
		...input,
		layout: { ...input.layout, mounts: null },
		winterRule: kind === 'mounts' ? defaultWinterRule : input.winterRule
	};
	return createHash('sha256')
		.update(canonicalJson({ kind, core: CORE_VERSION, input: counted }))
		.digest('hex');
}
