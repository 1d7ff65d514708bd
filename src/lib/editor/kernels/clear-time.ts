import type { DayShade } from '$lib/core';

/** Below this share a table counts as clear; it keeps rounding at an edge from flickering. */
const clearShare = 1e-6;

/**
 * Minutes from `timeMs` until the tracker is next clear of shade on that day: 0 when it is clear now, null when it stays shaded
 * until the day's end or the time is outside the day. Good to the day's step.
 */
export function minutesToClear(day: DayShade, trackerIndex: number, timeMs: number): number | null {
	const shares = day.shares[trackerIndex];
	if (!shares) return null;
	for (let i = 0; i < day.timesMs.length; i += 1) {
		if (day.timesMs[i] < timeMs) continue;
		if (shares[i] <= clearShare) return Math.max(0, Math.round((day.timesMs[i] - timeMs) / 60_000));
	}
	return null;
}
