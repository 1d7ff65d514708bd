import { isMeasured } from '$lib/core';
import type { Layout, Plot } from '$lib/core/document';

/**
 * Why the top edge may be shaded here, in words, from what stands in the documents; empty on level ground with equal machines that all
 * follow the sun and nothing near. Alike stops and the skyline are no reason: they hold every table back alike.
 */
export function unlevelReasons(plot: Plot, layout: Layout): string[] {
	const reasons: string[] = [];
	if (plot.ground.kind === 'plane' && plot.ground.risePercent !== 0) {
		reasons.push(`the ground rises ${Math.abs(plot.ground.risePercent)} m in 100 m`);
	}
	if (isMeasured(plot.ground)) reasons.push('the ground is uneven');
	const used = new Set(layout.trackers.map((tracker) => tracker.modelId));
	if (used.size > 1) reasons.push('the trackers are of different models');
	const axisHeights = new Set(
		layout.trackers.map(
			(tracker) =>
				tracker.axisHeightM ?? layout.models.find((model) => model.id === tracker.modelId)?.axisHeightM
		)
	);
	if (used.size <= 1 && axisHeights.size > 1) reasons.push('the axes stand at different heights');
	if (layout.trackers.some((tracker) => tracker.posture.kind !== 'following')) {
		reasons.push('not every tracker follows the sun');
	}
	if (plot.obstacles.length) {
		reasons.push(
			plot.obstacles.length === 1
				? 'an obstacle stands near'
				: `${plot.obstacles.length} obstacles stand near`
		);
	}
	return reasons;
}

/** "a", "a and b", "a, b and c". */
export function listWords(parts: readonly string[]): string {
	if (parts.length < 2) return parts.join('');
	return `${parts.slice(0, -1).join(', ')} and ${parts[parts.length - 1]}`;
}
