import { createHash } from 'node:crypto';
import { CORE_VERSION } from '$lib/core';
import type { Layout, Place, Plot, WinterRule } from '$lib/core/document';
import type { EnergySettings, RunInput } from '$lib/core/results';
import { standardOffsetMinutes } from '$lib/i18n';
import type { RunEnergy } from '$lib/schema/energy';
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
export function runInput(sources: RunSources, terms: RunTerms, energy?: EnergySettings): RunInput {
	return {
		place: sources.place,
		plot: sources.plot,
		layout: sources.layout,
		winterRule: sources.winterRule,
		year: terms.year,
		stepMinutes: terms.stepMinutes,
		treeYears: terms.treeYears,
		utcOffsetMinutes: standardOffsetMinutes(terms.year, sources.place.timeZone),
		...(energy && { energy })
	};
}

/**
 * SHA-256 of what a run's result depends on, with the core's version. The chosen mounts are left out (choosing one does
 * not make a run out of date), and the winter rule where the result says nothing of it. Energy settings count by their digest, so that the
 * hash of a run as it stands can be had without the hours of a weather file.
 */
export function runInputHash(
	kind: RunKind,
	input: RunInput,
	energyDigest = input.energy && digestOf(input.energy)
): string {
	const counted = {
		...input,
		energy: energyDigest,
		layout: { ...input.layout, mounts: null },
		winterRule: kind === 'shade' ? input.winterRule : defaultWinterRule
	};
	return createHash('sha256')
		.update(canonicalJson({ kind, core: CORE_VERSION, input: counted }))
		.digest('hex');
}

function digestOf(energy: EnergySettings): string {
	return createHash('sha256').update(canonicalJson(energy)).digest('hex');
}

/** What is told of a run's energy settings: all but the hours of a weather file. */
export function toldEnergy(energy: EnergySettings): RunEnergy {
	const { sky, skyModel, albedo } = energy;
	return {
		source: sky.source,
		skyModel,
		albedo,
		name: sky.source === 'weather' ? sky.name : null,
		linkeTurbidity: sky.source === 'clear' ? (sky.linkeTurbidity ?? null) : null,
		monthlyHorizontalKwhM2: sky.source === 'average' ? sky.monthlyHorizontalKwhM2 : null,
		digest: digestOf(energy)
	};
}
