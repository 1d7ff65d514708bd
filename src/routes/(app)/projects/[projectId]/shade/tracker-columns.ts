import type { TrackerShade } from '$lib/core';
import type { Column } from '$lib/ui';

const share = (value: number) => Math.round(value * 1e6) / 1e4;

/** The year's table: one row a tracker. Shares are downloaded as percent with four decimals. */
export const trackerColumns: Column<TrackerShade>[] = [
	{ key: 'tag', label: 'Tracker', value: (row) => row.tag },
	{
		key: 'loss',
		label: 'Beam lost',
		unit: '%',
		align: 'right',
		value: (row) => share(row.beamLoss),
		text: (row) => (row.beamLoss * 100).toFixed(2)
	},
	{
		key: 'mean',
		label: 'Mean shaded share',
		unit: '%',
		align: 'right',
		value: (row) => share(row.meanShadedShare),
		text: (row) => (row.meanShadedShare * 100).toFixed(2)
	},
	{
		key: 'hours',
		label: 'Hours with shade',
		unit: 'h',
		align: 'right',
		value: (row) => Math.round(row.shadedHours * 10) / 10,
		text: (row) => row.shadedHours.toFixed(0)
	},
	{
		key: 'without',
		label: 'Beam, no shade',
		unit: 'kWh/m²',
		align: 'right',
		value: (row) => Math.round(row.beamKwhM2 * 10) / 10,
		text: (row) => row.beamKwhM2.toFixed(0)
	},
	{
		key: 'with',
		label: 'Beam, with shade',
		unit: 'kWh/m²',
		align: 'right',
		value: (row) => Math.round(row.beamLitKwhM2 * 10) / 10,
		text: (row) => row.beamLitKwhM2.toFixed(0)
	},
	{
		key: 'upTo',
		label: 'Shortest day, up to',
		unit: '°',
		align: 'right',
		value: (row) => (row.shadedUpToDeg === null ? null : Math.round(row.shadedUpToDeg * 100) / 100),
		text: (row) => (row.shadedUpToDeg === null ? '–' : row.shadedUpToDeg.toFixed(1))
	},
	{
		key: 'rule',
		label: 'Winter rule',
		value: (row) => (row.meetsWinterRule ? 'met' : 'not met')
	}
];

export interface MonthHourRow {
	month: number;
	hour: number;
	loss: number;
}

/** The month by hour map as rows, hours without beam left out. */
export function monthHourRows(values: readonly (readonly (number | null)[])[]): MonthHourRow[] {
	return values.flatMap((byHour, month) =>
		byHour.flatMap((loss, hour) => (loss === null ? [] : [{ month, hour, loss }]))
	);
}
