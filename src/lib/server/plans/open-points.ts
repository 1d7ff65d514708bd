import { checkLayout, type Layout, type Plot, type WinterVerdict } from '$lib/core';
import type { Run } from '$lib/schema/run';

export interface RunsBehind {
	shade: Run | null;
	mounts: Run | null;
	/** Of the shade run when it is done and not out of date. */
	verdict: WinterVerdict | null;
	/** False when the mounts were chosen from a run that plot or trackers have left behind. */
	choiceStands: boolean;
}

/** Tags named in one sentence before the rest is counted. */
const NAMED = 8;

/** What is open in a layout as it stands, one sentence each: shown before issue and printed on the plan. */
export function openPoints(plot: Plot, layout: Layout, runs: RunsBehind): string[] {
	return [
		...checkLayout(plot, layout).map((finding) => finding.message),
		...postures(layout),
		...shadePoints(runs),
		...mountPoints(layout, runs)
	];
}

function postures(layout: Layout): string[] {
	const still = layout.trackers.filter((tracker) => tracker.posture.kind !== 'following');
	if (still.length === 0) return [];
	const one = still.length === 1;
	return [`${named(still.map((t) => t.tag))} ${one ? 'does' : 'do'} not follow the sun in this layout.`];
}

function shadePoints({ shade, verdict }: RunsBehind): string[] {
	if (!shade) return ['No shade run was made for this layout.'];
	if (shade.status === 'failed') return ['The last shade run of this layout failed.'];
	if (shade.outOfDate) return ['The shade run is out of date: plot, layout or rule changed after it.'];
	if (shade.status !== 'done') return ['The shade run of this layout has not finished.'];
	if (verdict && !verdict.met) {
		const tags = verdict.brokenBy.map((each) => each.tag);
		return [`The winter rule is not met: ${named(tags)} ${tags.length === 1 ? 'breaks' : 'break'} it.`];
	}
	if (verdict && verdict.judgedMinutes === 0) {
		return [
			'The winter rule asks for nothing here: the sun never stands where it looks on the shortest day.'
		];
	}
	return [];
}

function mountPoints(layout: Layout, { mounts, choiceStands }: RunsBehind): string[] {
	const { common, exceptions } = layout.mounts;
	const without = layout.trackers.filter((tracker) => !common && !exceptions[tracker.id]);
	if (without.length === layout.trackers.length) return ['No sensor mount is chosen.'];
	const points: string[] = [];
	if (without.length > 0) points.push(`No sensor mount is chosen for ${named(without.map((t) => t.tag))}.`);
	if (!mounts || mounts.status !== 'done')
		points.push('No finished sensor run stands behind the chosen mount.');
	else if (mounts.outOfDate) points.push('The sensor run is out of date: plot or layout changed after it.');
	else if (!choiceStands)
		points.push('The mount was chosen from an earlier sensor run: look at the newer one and choose again.');
	return points;
}

function named(tags: string[]): string {
	if (tags.length <= NAMED) return tags.join(', ');
	return `${tags.slice(0, NAMED).join(', ')} and ${tags.length - NAMED} more`;
}
