import type { MountClass, MountPlaceResult } from '../results';

/**
 * What decides the class of a mount. Clear and unfit are the good and poor limits of the measures that the run
 * has (blind hours, shade with the sun above 5 degrees, longest run with the sun above 3 degrees, run-up); sound
 * ends in between. All four limits are proposals of practice without a source. The class is the worst of the rows.
 * Not measured here: edge crossings, margin to the shadow edge, drift and wrong-move loss.
 */
export const MOUNT_MEASURES = [
	{ key: 'blindHours', label: 'blind time', unit: 'h a year', clear: 5, sound: 15, watch: 40 },
	{
		key: 'shadedAbove5Hours',
		label: 'shade with the sun above 5°',
		unit: 'h a year',
		clear: 5,
		sound: 20,
		watch: 60
	},
	{
		key: 'longestRunMinutes',
		label: 'longest shade on one day',
		unit: 'min',
		clear: 10,
		sound: 20,
		watch: 45
	},
	{ key: 'runUpWorstMinutes', label: 'worst run-up', unit: 'min', clear: 10, sound: 20, watch: 40 }
] as const satisfies readonly {
	key: keyof MountPlaceResult;
	label: string;
	unit: string;
	clear: number;
	sound: number;
	watch: number;
}[];

export const MOUNT_CLASSES: readonly MountClass[] = ['clear', 'sound', 'watch', 'unfit'];

type Measured = Pick<MountPlaceResult, (typeof MOUNT_MEASURES)[number]['key']>;

function classOf(value: number, measure: (typeof MOUNT_MEASURES)[number]): number {
	if (value <= measure.clear) return 0;
	if (value <= measure.sound) return 1;
	return value <= measure.watch ? 2 : 3;
}

const figure = (value: number): string =>
	(value < 10 ? value.toFixed(1) : value.toFixed(0)).replace(/\.0$/, '');

/** Class 0 clear .. 3 unfit of a place and the measure that decides it; among equals the one nearest its next limit. */
export function rankMount(result: Measured): { rank: number; measure: number } {
	let rank = -1;
	let measure = 0;
	let strain = -1;
	MOUNT_MEASURES.forEach((m, k) => {
		const own = classOf(result[m.key], m);
		const ownStrain = result[m.key] / m.watch;
		if (own > rank || (own === rank && ownStrain > strain)) {
			rank = own;
			measure = k;
			strain = ownStrain;
		}
	});
	return { rank, measure };
}

/** Class of a place and why, in words; `by` names what blocks it most, when that is known. */
export function classifyMount(
	result: Measured,
	by: string | null = null
): { class: MountClass; reason: string } {
	const { rank, measure } = rankMount(result);
	const m = MOUNT_MEASURES[measure];
	const value = result[m.key];
	if (value === 0)
		return { class: MOUNT_CLASSES[rank], reason: 'Never shaded while its own table has the sun.' };
	const limit = rank === 0 ? m.clear : rank === 1 ? m.sound : rank === 2 ? m.watch : m.watch;
	const against =
		rank === 3 ? `unfit above ${limit} ${m.unit}` : `${MOUNT_CLASSES[rank]} up to ${limit} ${m.unit}`;
	const label = m.label[0].toUpperCase() + m.label.slice(1);
	const blame = by === null ? '' : `, mostly from ${by}`;
	return { class: MOUNT_CLASSES[rank], reason: `${label} ${figure(value)} ${m.unit} (${against})${blame}.` };
}
