import { neverClear, reasonWords, takerName } from '$lib/charts/answer-words';
import { longMonthNames } from '$lib/charts/months';
import type { LightPair, TrackerAnswers } from '$lib/core';
import { formatBearing, formatHours } from '$lib/i18n';
import type { Column } from '$lib/ui';

const percent = (value: number, digits: number) => Math.round(value * 10 ** (digits + 2)) / 10 ** digits;

/** One row a pair: who takes from whom. */
export const pairColumns: Column<LightPair>[] = [
	{ key: 'by', label: 'Who takes', value: (row) => takerName(row.by) },
	{ key: 'from', label: 'From', value: (row) => row.fromTag },
	{
		key: 'field',
		label: "Of the field's beam",
		unit: '%',
		align: 'right',
		value: (row) => percent(row.fieldLoss, 5),
		text: (row) => (row.fieldLoss * 100).toFixed(4)
	},
	{
		key: 'removal',
		label: 'Of its own, by removal',
		unit: '%',
		align: 'right',
		value: (row) => percent(row.by.removalLoss, 4),
		text: (row) => (row.by.removalLoss * 100).toFixed(2)
	},
	{
		key: 'alone',
		label: 'Taken alone',
		unit: '%',
		align: 'right',
		value: (row) => percent(row.by.aloneLoss, 4),
		text: (row) => (row.by.aloneLoss * 100).toFixed(2)
	},
	{
		key: 'when',
		label: 'When most',
		value: (row) => `${longMonthNames[row.by.month]}, ${row.by.half}`
	}
];

/** One row a tracker: who, when, up to which sun, which way. `highestSunDeg`: highest sun of the year at the place. */
export const answerColumns = (highestSunDeg: number): Column<TrackerAnswers>[] => [
	{ key: 'tag', label: 'Tracker', value: (row) => row.tag },
	{
		key: 'loss',
		label: 'Beam lost',
		unit: '%',
		align: 'right',
		value: (row) => percent(row.beamLoss, 4),
		text: (row) => (row.beamLoss * 100).toFixed(2)
	},
	{ key: 'by', label: 'Taken by', value: reasonWords },
	{
		key: 'takes',
		label: 'Takes from others',
		unit: '% of field',
		align: 'right',
		value: (row) => percent(row.takesFromField, 5),
		text: (row) => (row.takesFromField * 100).toFixed(4)
	},
	{
		key: 'above',
		label: 'Clear above',
		unit: '°',
		align: 'right',
		value: (row) => (row.clearAboveDeg === null ? null : Math.round(row.clearAboveDeg * 100) / 100),
		text: (row) =>
			row.clearAboveDeg === null
				? '–'
				: neverClear(row.clearAboveDeg, highestSunDeg)
					? 'never'
					: row.clearAboveDeg.toFixed(2)
	},
	{
		key: 'window',
		label: 'Shortest day, clear',
		unit: 'solar time',
		value: (row) =>
			row.window === null
				? null
				: `${formatHours(row.window.fromSolarHour)}–${formatHours(row.window.toSolarHour)}`,
		text: (row) =>
			row.window === null
				? 'never'
				: `${formatHours(row.window.fromSolarHour)}–${formatHours(row.window.toSolarHour)}`
	},
	{
		key: 'way',
		label: 'Best way to move',
		align: 'right',
		value: (row) => (row.move.bestAzimuthDeg === null ? null : Math.round(row.move.bestAzimuthDeg)),
		text: (row) => (row.move.bestAzimuthDeg === null ? '–' : formatBearing(row.move.bestAzimuthDeg))
	},
	{
		key: 'gain',
		label: 'Gain a metre',
		unit: '% of field',
		align: 'right',
		value: (row) => percent(row.move.gainOfOneMetre ?? row.move.gainPerMetre, 5),
		text: (row) =>
			row.move.gainOfOneMetre === null
				? `≈ ${(row.move.gainPerMetre * 100).toFixed(4)}`
				: (row.move.gainOfOneMetre * 100).toFixed(4)
	},
	{
		key: 'gainBy',
		label: 'The gain is',
		value: (row) => (row.move.gainOfOneMetre === null ? 'estimated' : 'computed')
	}
];
