import { MOUNT_CLASSES, MOUNT_MEASURES, classifyMount, rankMount } from '$lib/core';
import type { MountClass, MountPlaceResult } from '$lib/core';
import { formatDay, formatMinutes, formatNumber } from '$lib/i18n';

/** A line of "why it is Sound". */
export interface MeasureRow {
	key: string;
	label: string;
	/** What a word of the trade in the label means, empty where it speaks for itself. */
	meaning: string;
	value: string;
	/** Its own class, null for what is told but does not decide. */
	class: MountClass | null;
	/** Limits in words, empty for what does not decide. */
	clear: string;
	unfit: string;
}

/** Class of a candidate place: the worst of its measures, by the core's table. */
export function classOf(place: MountPlaceResult): MountClass {
	return MOUNT_CLASSES[rankMount(place).rank];
}

/** Why the place has its class, in words. */
export function reasonOf(place: MountPlaceResult): string {
	return classifyMount(place).reason;
}

/** Hours with one decimal below ten. */
export function hoursWords(hours: number): string {
	return `${formatNumber(hours, hours > 0 && hours < 9.95 ? 1 : 0)} h`;
}

/** Class of one measure alone: the others are set to nothing. */
function classOfMeasure(place: MountPlaceResult, key: (typeof MOUNT_MEASURES)[number]['key']): MountClass {
	const alone = { blindHours: 0, shadedAbove5Hours: 0, longestRunMinutes: 0, runUpWorstMinutes: 0 };
	alone[key] = place[key];
	return MOUNT_CLASSES[rankMount(alone).rank];
}

const meanings: Record<string, string> = {
	blindHours: 'the head, the eye of the sensor, in shade',
	longestRunMinutes: 'the head in shade without a break, sun above 3°, whether its table is lit or not',
	longestBlindMinutes: 'the head in shade without a break while its table is lit, any height of the sun',
	runUpWorstMinutes: 'run-up: from the first sun on the table until the head has it'
};

/** The measures of a place in the order they are read. */
export function measuresOf(place: MountPlaceResult): MeasureRow[] {
	const deciding = MOUNT_MEASURES.map((measure): MeasureRow => {
		const value = place[measure.key];
		const isTime = measure.unit === 'min';
		const date =
			measure.key === 'longestRunMinutes' && place.longestRunDate && value > 0
				? ` · ${formatDay(place.longestRunDate)}`
				: '';
		return {
			key: measure.key,
			label: measure.key === 'blindHours' ? 'blind while its table is lit' : measure.label,
			meaning: meanings[measure.key] ?? '',
			value: isTime ? formatMinutes(value) + date : `${hoursWords(value)} a year`,
			class: classOfMeasure(place, measure.key),
			clear: `up to ${measure.clear} ${measure.unit}`,
			unfit: `above ${measure.watch} ${measure.unit}`
		};
	});
	const told = (key: string, label: string, value: string): MeasureRow => ({
		key,
		label,
		meaning: meanings[key] ?? '',
		value,
		class: null,
		clear: '',
		unfit: ''
	});
	return [
		...deciding,
		told('longestBlindMinutes', 'longest blind run', formatMinutes(place.longestBlindMinutes)),
		told('runUpMeanMinutes', 'mean run-up', formatMinutes(place.runUpMeanMinutes)),
		told('shadedHours', 'shaded in all, sun above the skyline', `${hoursWords(place.shadedHours)} a year`)
	];
}

/** The limits of the classes as a table: Clear, Sound, Watch, Unfit. */
export const thresholdRows: { label: string; cells: [string, string, string, string] }[] = MOUNT_MEASURES.map(
	(measure) => ({
		label: `${measure.label}, ${measure.unit}`,
		cells: [`to ${measure.clear}`, `to ${measure.sound}`, `to ${measure.watch}`, `above ${measure.watch}`]
	})
);
