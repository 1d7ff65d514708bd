import type { MountPlaceResult, TrackerMounts } from '$lib/core';
import { classOf } from '$lib/charts/mount-measures';
import { classWords, edgeWords, mountEdges, mountWords } from '$lib/charts/mount-words';
import type { Column } from '$lib/ui';

const hours = (value: number) => Math.round(value * 100) / 100;

/** One row a tracker: the common mount there, and its own best. */
export const mountColumns: Column<TrackerMounts>[] = [
	{ key: 'tag', label: 'Tracker', value: (row) => row.tag },
	{ key: 'class', label: 'Common mount', value: (row) => classWords[row.commonClass] },
	{ key: 'reason', label: 'Because', value: (row) => row.commonReason },
	{
		key: 'blind',
		label: 'Blind',
		unit: 'h a year',
		align: 'right',
		value: (row) => hours(row.common.blindHours),
		text: (row) => row.common.blindHours.toFixed(1)
	},
	{
		key: 'blindRun',
		label: 'Longest blind run, any sun',
		unit: 'min',
		align: 'right',
		value: (row) => Math.round(row.common.longestBlindMinutes)
	},
	{
		key: 'run',
		label: 'Longest shade, sun above 3°',
		unit: 'min',
		align: 'right',
		value: (row) => Math.round(row.common.longestRunMinutes)
	},
	{
		key: 'runUp',
		label: 'Worst run-up',
		unit: 'min',
		align: 'right',
		value: (row) => Math.round(row.common.runUpWorstMinutes)
	},
	{ key: 'best', label: 'Best place', value: (row) => mountWords(row.best.mount) },
	{ key: 'bestClass', label: 'Its class', value: (row) => classWords[row.bestClass] }
];

export interface PlaceRow {
	key: string;
	place: MountPlaceResult;
}

/** Every candidate of one tracker, edge by edge. */
export function placeRows(tracker: TrackerMounts): PlaceRow[] {
	return mountEdges.flatMap((edge) =>
		tracker.edges[edge].map((place) => ({ key: `${edge}:${place.mount.alongM}`, place }))
	);
}

export const placeColumns: Column<PlaceRow>[] = [
	{ key: 'edge', label: 'Edge', value: (row) => edgeWords[row.place.mount.edge] },
	{
		key: 'along',
		label: 'Along',
		unit: 'm',
		align: 'right',
		value: (row) => hours(row.place.mount.alongM),
		text: (row) => row.place.mount.alongM.toFixed(2)
	},
	{ key: 'class', label: 'Class', value: (row) => classWords[classOf(row.place)] },
	{
		key: 'blind',
		label: 'Blind',
		unit: 'h',
		align: 'right',
		value: (row) => hours(row.place.blindHours),
		text: (row) => row.place.blindHours.toFixed(1)
	},
	{
		key: 'shaded',
		label: 'Shaded',
		unit: 'h',
		align: 'right',
		value: (row) => hours(row.place.shadedHours),
		text: (row) => row.place.shadedHours.toFixed(1)
	},
	{
		key: 'blindRun',
		label: 'Longest blind run, any sun',
		unit: 'min',
		align: 'right',
		value: (row) => Math.round(row.place.longestBlindMinutes)
	},
	{
		key: 'run',
		label: 'Longest shade, sun above 3°',
		unit: 'min',
		align: 'right',
		value: (row) => Math.round(row.place.longestRunMinutes)
	},
	{
		key: 'runUp',
		label: 'Worst run-up',
		unit: 'min',
		align: 'right',
		value: (row) => Math.round(row.place.runUpWorstMinutes)
	}
];
