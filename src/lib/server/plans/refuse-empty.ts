import type { Layout } from '$lib/core';

/** Why no plan can be made of a layout at all, in words; null when one can. */
export function whyNoPlan(layout: Layout): string | null {
	if (layout.trackers.length > 0) return null;
	return 'This layout has no tracker, so there is nothing to set out. Place trackers first.';
}
