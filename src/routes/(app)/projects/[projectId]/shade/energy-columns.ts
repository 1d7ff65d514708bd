import { monthNames } from '$lib/charts/months';
import type { EnergyParts, EnergyResult, TrackerEnergy } from '$lib/core';
import type { Column } from '$lib/ui';

const percent = (share: number) => (share * 100).toFixed(2);
const share = (value: number) => Math.round(value * 1e6) / 1e4;

function lossColumn(key: string, label: string, of: (row: TrackerEnergy) => number): Column<TrackerEnergy> {
	return {
		key,
		label,
		unit: '% of all light',
		align: 'right',
		value: (row) => share(of(row)),
		text: (row) => percent(of(row))
	};
}

/** One row a tracker: its losses apart and its light. */
export const trackerEnergyColumns: Column<TrackerEnergy>[] = [
	{ key: 'tag', label: 'Tracker', value: (row) => row.tag },
	lossColumn('beam', 'Beam shaded', (row) => row.losses.beam),
	lossColumn('sky', 'Sky covered', (row) => row.losses.sky),
	lossColumn('strings', 'Strings', (row) => row.losses.electrical.likely),
	lossColumn('low', 'All, least', (row) => row.losses.total.low),
	lossColumn('likely', 'All, likely', (row) => row.losses.total.likely),
	lossColumn('high', 'All, most', (row) => row.losses.total.high),
	{
		key: 'without',
		label: 'Light, no shade',
		unit: 'kWh/m²',
		align: 'right',
		value: (row) => Math.round(row.without.total * 10) / 10,
		text: (row) => row.without.total.toFixed(0)
	},
	{
		key: 'with',
		label: 'Light, with shade',
		unit: 'kWh/m²',
		align: 'right',
		value: (row) => Math.round(row.with.total * 10) / 10,
		text: (row) => row.with.total.toFixed(0)
	}
];

export interface EnergyMonth {
	month: number;
	without: number;
	beam: number;
	sky: number;
	electrical: number;
	total: number;
}

/** Field by month: light without shade, kWh/m², and the losses apart. */
export function energyMonths({ field }: EnergyResult): EnergyMonth[] {
	return field.monthlyWithoutKwhM2.map((without, month) => {
		const beam = field.months.beam[month] ?? 0;
		const sky = field.months.sky[month] ?? 0;
		const electrical = field.months.electrical[month] ?? 0;
		return { month, without, beam, sky, electrical, total: beam + sky + electrical };
	});
}

const monthLoss = (key: 'beam' | 'sky' | 'electrical' | 'total', label: string): Column<EnergyMonth> => ({
	key,
	label,
	unit: '% of all light',
	align: 'right',
	value: (row) => share(row[key]),
	text: (row) => percent(row[key])
});

export const energyMonthColumns: Column<EnergyMonth>[] = [
	{ key: 'month', label: 'Month', value: (row) => row.month + 1, text: (row) => monthNames[row.month] },
	{
		key: 'without',
		label: 'Light, no shade',
		unit: 'kWh/m²',
		align: 'right',
		value: (row) => Math.round(row.without * 10) / 10,
		text: (row) => row.without.toFixed(1)
	},
	monthLoss('beam', 'Beam shaded'),
	monthLoss('sky', 'Sky covered'),
	monthLoss('electrical', 'Strings'),
	monthLoss('total', 'All, likely')
];

/** Light on the tables by where it comes from, kWh/m², parts that are nothing left out. */
export function energyParts({ field }: EnergyResult): { name: string; without: number; with: number }[] {
	const names: [keyof EnergyParts, string][] = [
		['beam', 'beam'],
		['circumsolar', 'sky about the sun'],
		['isotropic', 'rest of the sky'],
		['horizon', 'band at the horizon'],
		['ground', 'from the ground'],
		['total', 'all light']
	];
	return names
		.map(([key, name]) => ({ name, without: field.without[key], with: field.with[key] }))
		.filter((row) => Math.abs(row.without) >= 0.05);
}
