import { shadeColour } from './shade-ramp';

/** Upper ends that a scale of shares may have; the next one above the largest value is taken. */
const ends = [0.005, 0.01, 0.02, 0.03, 0.05, 0.1, 0.2, 0.3, 0.5, 1];

/** A shade ramp stretched from 0 to `max`, for shares that are small against 1. Its legend must stand beside it. */
export interface RampScale {
	/** Share at the dark end, 0..1. */
	max: number;
	colour(share: number): string;
	/** Shares of the legend's labels, evenly spaced from 0 to `max`. */
	ticks: number[];
}

/** Scale that holds all values; 0..0.005 when nothing is above 0. */
export function rampScale(values: readonly (number | null)[]): RampScale {
	const largest = values.reduce<number>((top, value) => Math.max(top, value ?? 0), 0);
	const max = ends.find((end) => largest <= end + 1e-12) ?? 1;
	return {
		max,
		colour: (share) => shadeColour(share / max),
		ticks: [0, 0.25, 0.5, 0.75, 1].map((part) => part * max)
	};
}

/** Decimals of a percent label that tell the ticks of a scale apart. */
export function percentDigits(max: number): number {
	if (max <= 0.02) return 2;
	return max <= 0.3 ? 1 : 0;
}
