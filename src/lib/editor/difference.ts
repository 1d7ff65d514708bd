import type { Layout, Plot, Tracker } from '$lib/core';
import { formatMetres } from '$lib/i18n';
import { sameData } from './kernels/same';

const namedAtMost = 5;

/** "3 trackers (A01, A02, A03)", with a few names at most. */
function counted(one: string, many: string, names: string[]): string {
	const shown = names.slice(0, namedAtMost).join(', ');
	const rest = names.length > namedAtMost ? ` and ${names.length - namedAtMost} more` : '';
	return `${names.length} ${names.length === 1 ? one : many} (${shown}${rest})`;
}

/** What the other version of a layout has that mine has not, as short sentences for a person who must choose. */
export function layoutDifferences(mine: Layout, theirs: Layout): string[] {
	const mineById = new Map(mine.trackers.map((tracker) => [tracker.id, tracker]));
	const theirIds = new Set(theirs.trackers.map((tracker) => tracker.id));
	const onlyTheirs = theirs.trackers.filter(({ id }) => !mineById.has(id));
	const onlyMine = mine.trackers.filter(({ id }) => !theirIds.has(id));
	const pairs = theirs.trackers.flatMap((their): [Tracker, Tracker][] => {
		const own = mineById.get(their.id);
		return own ? [[own, their]] : [];
	});
	const moved = pairs.filter(([own, their]) => own.eastM !== their.eastM || own.northM !== their.northM);
	const renamed = pairs.filter(([own, their]) => own.tag !== their.tag);
	const otherwise = pairs.filter(
		([own, their]) =>
			own.modelId !== their.modelId ||
			own.axisHeightM !== their.axisHeightM ||
			!sameData(own.posture, their.posture)
	);
	const lines: string[] = [];
	const tags = (trackers: Tracker[]): string[] => trackers.map(({ tag }) => tag);
	const say = (list: string[], sentence: (what: string) => string): void => {
		if (list.length > 0) lines.push(sentence(counted('tracker', 'trackers', list)));
	};
	say(tags(onlyTheirs), (what) => `The other version has ${what} that yours has not.`);
	say(tags(onlyMine), (what) => `Yours has ${what} that the other version has not.`);
	if (moved.length > 0) {
		const places = moved.slice(0, namedAtMost).map(([own, their]) => {
			const apartM = Math.hypot(own.eastM - their.eastM, own.northM - their.northM);
			return `${own.tag} by ${formatMetres(apartM, apartM < 0.1 ? 3 : 1)}`;
		});
		const rest = moved.length > namedAtMost ? ` and ${moved.length - namedAtMost} more` : '';
		lines.push(`Places differ: ${places.join(', ')}${rest}.`);
	}
	say(tags(renamed.map(([own]) => own)), (what) => `It has ${what} under another tag.`);
	say(
		tags(otherwise.map(([own]) => own)),
		(what) => `It has ${what} with another model, axis height or posture.`
	);
	if (!sameData(mine.mounts, theirs.mounts)) lines.push('It has another choice of mounts.');
	if (lines.length === 0) lines.push('Only the order of trackers or the tracker models differ.');
	return lines;
}

/** What the other version of a plot has that mine has not. */
export function plotDifferences(mine: Plot, theirs: Plot): string[] {
	const lines: string[] = [];
	if (!sameData(mine.boundary, theirs.boundary)) lines.push('The boundary differs.');
	if (!sameData(mine.ground, theirs.ground)) lines.push('The ground differs.');
	if (!sameData(mine.skyline, theirs.skyline)) lines.push('The skyline differs.');
	if (mine.setBackM !== theirs.setBackM) {
		lines.push(`The set-back is ${theirs.setBackM} m there and ${mine.setBackM} m in yours.`);
	}
	const mineById = new Map(mine.obstacles.map((obstacle) => [obstacle.id, obstacle]));
	const theirIds = new Set(theirs.obstacles.map(({ id }) => id));
	const differing = [
		...theirs.obstacles.filter((their) => !sameData(mineById.get(their.id), their)),
		...mine.obstacles.filter(({ id }) => !theirIds.has(id))
	].map(({ name }) => name);
	if (differing.length > 0) lines.push(`${counted('obstacle differs', 'obstacles differ', differing)}.`);
	return lines;
}
