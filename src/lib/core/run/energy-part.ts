import type { EnergySteps } from './energy-steps';

/** Trackers `from` to `to`, not itself, in layout order. */
export interface TrackerRange {
	from: number;
	to: number;
}

/** Twelve months, then twenty-four hours. */
export const BINS = 36;
/** Beam, circumsolar, isotropic, horizon, ground. */
export const PARTS = 5;

/**
 * Sums of an energy year for some of its trackers, kWh/m². Plain arrays, so that a thread can hand them over. Bins are the
 * twelve months and the twenty-four hours; lists by tracker begin at `from`.
 */
export interface EnergyPart extends TrackerRange {
	/** Group of poses of every tracker of the field. */
	groupOf: Int32Array;
	/** [group][bin][part]: on bare tables. */
	without: Float64Array;
	/** [group]: the other sky model's year on bare tables. */
	otherWithout: Float64Array;
	/** [month][global, diffuse, direct normal]: of the sky. */
	horizontal: Float64Array;
	/** [bin][tracker] */
	beamLost: Float64Array;
	circumsolarLost: Float64Array;
	/** Isotropic and horizon together. */
	skyLost: Float64Array;
	/** Beyond the shaded area, likely. */
	stringsLost: Float64Array;
	/** [tracker], of the year: */
	horizonLost: Float64Array;
	/** Beyond the shaded area, worst wiring. */
	worstLost: Float64Array;
	/** By the other sky model: isotropic and horizon; beam and circumsolar with strings. */
	otherSkyLost: Float64Array;
	otherShadeLost: Float64Array;
	steps: Pick<EnergySteps, 'count' | 'stepMinutes' | 'linkeTurbidity' | 'unplacedKwhM2' | 'missingHours'>;
}

export function emptyPart(
	from: number,
	to: number,
	groups: number,
	groupOf: Int32Array,
	steps: EnergySteps
): EnergyPart {
	const size = to - from;
	const { count, stepMinutes, linkeTurbidity, unplacedKwhM2, missingHours } = steps;
	return {
		from,
		to,
		groupOf,
		without: new Float64Array(groups * BINS * PARTS),
		otherWithout: new Float64Array(groups),
		horizontal: new Float64Array(12 * 3),
		beamLost: new Float64Array(BINS * size),
		circumsolarLost: new Float64Array(BINS * size),
		skyLost: new Float64Array(BINS * size),
		stringsLost: new Float64Array(BINS * size),
		horizonLost: new Float64Array(size),
		worstLost: new Float64Array(size),
		otherSkyLost: new Float64Array(size),
		otherShadeLost: new Float64Array(size),
		steps: { count, stepMinutes, linkeTurbidity, unplacedKwhM2, missingHours }
	};
}
