import { checkLayout, type Layout, type MountResult, type Plot, type WinterVerdict } from '$lib/core';
import type { Run } from '$lib/schema/run';
import { treesInWords } from '$lib/sheets';
import { chosenMountClasses } from './chosen-mount-classes';

export interface RunsBehind {
	shade: Run | null;
	mounts: Run | null;
	/** Of the shade run when it is done and not out of date. */
	verdict: WinterVerdict | null;
	/** Of the sensor run when it is done and not out of date. */
	mountResult: MountResult | null;
	/** False when the mounts were chosen from a run that plot or trackers have left behind. */
	choiceStands: boolean;
}

/** What is open in a layout as it stands, one sentence each: shown before issue and printed on the plan. */
export function openPoints(plot: Plot, layout: Layout, runs: RunsBehind): string[] {
	return [
		...checkLayout(plot, layout).map((finding) => finding.message),
		...postures(layout),
		...shadePoints(plot, runs),
		...mountPoints(plot, layout, runs)
	];
}

function postures(layout: Layout): string[] {
	const still = layout.trackers.filter((tracker) => tracker.posture.kind !== 'following');
	if (still.length === 0) return [];
	const one = still.length === 1;
	return [`${named(still.map((t) => t.tag))} ${one ? 'does' : 'do'} not follow the sun in this layout.`];
}

function shadePoints(plot: Plot, { shade, verdict }: RunsBehind): string[] {
	if (!shade) return ['No shade run was made for this layout.'];
	if (shade.status === 'failed') return ['The last shade run of this layout failed.'];
	if (shade.outOfDate) return ['The shade run is out of date: plot, layout or rule changed after it.'];
	if (shade.status !== 'done') return ['The shade run of this layout has not finished.'];
	if (verdict && !verdict.met) {
		const tags = verdict.brokenBy.map((each) => each.tag);
		const who = tags.length === 1 ? '1 tracker breaks' : `${tags.length} trackers break`;
		return [`The winter rule is not met: ${who} it${treeYears(plot, shade)}: ${named(tags)}.`];
	}
	if (verdict && verdict.judgedMinutes === 0) {
		return [
			'The winter rule asks for nothing here: the sun never stands where it looks on the shortest day.'
		];
	}
	return [];
}

/** ` (with trees 10 years older)` where the run's trees are not those of today. */
function treeYears(plot: Plot, run: Run): string {
	const older = run.treeYears > 0 && plot.obstacles.some((obstacle) => obstacle.kind === 'tree');
	return older ? ` (with ${treesInWords(run.treeYears)})` : '';
}

function mountPoints(plot: Plot, layout: Layout, behind: RunsBehind): string[] {
	const { mounts, mountResult, choiceStands } = behind;
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
	if (mounts && mountResult) points.push(...doubtfulMounts(layout, mountResult, treeYears(plot, mounts)));
	return points;
}

/** Every tag: who reads the sheet must find each tracker that a point is about. */
const named = (tags: string[]) => tags.join(', ');

/** Chosen places that the sensor run calls worse than sound, and those that it did not look at. */
function doubtfulMounts(layout: Layout, result: MountResult, trees: string): string[] {
	const { unfit, watch, unknown } = chosenMountClasses(layout, result);
	const sentence = (tags: string[], one: string, many: string) =>
		tags.length === 0
			? []
			: [
					`${tags.length} sensor ${tags.length === 1 ? `mount ${one}` : `mounts ${many}`}${trees}: ${named(tags)}.`
				];
	return [
		...sentence(unfit, 'is Unfit', 'are Unfit'),
		...sentence(watch, 'is Watch', 'are Watch'),
		...sentence(unknown, 'is at a place that no run computed', 'are at places that no run computed')
	];
}
