import {
	energyYearPart,
	joinEnergyYear,
	joinShadeYear,
	shadeYearPart,
	type EnergyPart,
	type RunInput,
	type ShadeYearPart
} from '../../src/lib/core';

export interface Range {
	from: number;
	to: number;
}

/** A run that may be computed in parts of the field, each on a thread of its own. */
export interface PartRun<Part> {
	part: (input: RunInput, range: Range) => Part;
	join: (input: RunInput, parts: Part[]) => unknown;
}

const computed = <T>(result: T | null): T => {
	if (result === null) throw new Error('A run stopped that nobody stopped.');
	return result;
};

const energy: PartRun<EnergyPart> = {
	part: (input, range) => computed(energyYearPart(input, undefined, range)),
	join: (input, parts) => joinEnergyYear(input, parts)
};

const year: PartRun<ShadeYearPart> = {
	part: (input, range) => computed(shadeYearPart(input, undefined, range)),
	join: (input, parts) => joinShadeYear(input, parts)
};

export const PART_RUNS = { energy, year };
export type PartRunName = keyof typeof PART_RUNS;

export interface PartTask {
	run: PartRunName;
	input: RunInput;
	range: Range;
}
