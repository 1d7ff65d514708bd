import {
	answersPart,
	energyYearPart,
	joinAnswers,
	joinEnergyYear,
	mountYear,
	joinShadeYear,
	shadeYearPart,
	type AnswersPart,
	type EnergyPart,
	type ShadeYearPart,
	type TrackerRange
} from '../../core';
import type { MountResult, RunInput } from '../../core/results';

type Progress = (done01: number) => boolean;

/** How one kind of run is computed: by ranges of trackers that follow each other, and put together in their order. */
interface RunMethod<P extends object> {
	/** Null when `onProgress` answered false. */
	part(input: RunInput, onProgress: Progress, range: TrackerRange): P | null;
	join(input: RunInput, parts: P[]): { coreVersion: string };
}

/** Part of a run with energy that its shade is, for telling the progress. */
const SHADE_01 = 0.25;

interface ShadeAndEnergy {
	shade: ShadeYearPart;
	energy: EnergyPart | null;
}

const shade: RunMethod<ShadeAndEnergy> = {
	part(input, onProgress, range) {
		const asked = input.energy !== undefined;
		const year = shadeYearPart(input, (done01) => onProgress(asked ? done01 * SHADE_01 : done01), range);
		if (!year || !asked) return year && { shade: year, energy: null };
		const energy = energyYearPart(input, (done01) => onProgress(SHADE_01 + (1 - SHADE_01) * done01), range);
		return energy && { shade: year, energy };
	},
	join(input, parts) {
		const energies = parts.flatMap((part) => part.energy ?? []);
		const year = joinShadeYear(
			input,
			parts.map((part) => part.shade)
		);
		return energies.length > 0 ? { ...year, energy: joinEnergyYear(input, energies) } : year;
	}
};

/** Mounts are compared over the whole field: never in parts. */
const mounts: RunMethod<MountResult> = {
	part: (input, onProgress) => mountYear(input, undefined, onProgress),
	join: (_input, [result]) => result
};

const answers: RunMethod<AnswersPart> = {
	part: (input, onProgress, range) => answersPart(input, onProgress, range),
	join: (input, parts) => joinAnswers(input, parts)
};

/** By the kinds of `runKindSchema`, which the worker does not load. */
export const runMethods = { shade, mounts, answers };
export type PartOfRun = ShadeAndEnergy | MountResult | AnswersPart;
export type RunMethodName = keyof typeof runMethods;

/** The method of a kind, its parts seen as what they are between threads: objects. */
export const methodOf = (kind: RunMethodName): RunMethod<object> => runMethods[kind] as RunMethod<object>;
