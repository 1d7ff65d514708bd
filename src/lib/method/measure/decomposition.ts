import {
	averageYear,
	collaresPereiraRablHourShare,
	erbsDiffuseShare,
	erbsMonthlyDiffuseShare,
	liuJordanHourShare,
	orgillHollandsDiffuseShare
} from '../../core';
import { distances, single, within, type Check, type Row } from '../check';

type Pairs = readonly (readonly [number, number])[];
const ERBS: Pairs = [
	[0.1, 0.991],
	[0.22, 0.9802],
	[0.3, 0.9486],
	[0.4, 0.84],
	[0.5, 0.6591],
	[0.6, 0.4395],
	[0.7, 0.244],
	[0.8, 0.1653],
	[0.9, 0.165]
];
const ORGILL: Pairs = [
	[0.1, 0.9751],
	[0.3, 0.9253],
	[0.4, 0.821],
	[0.5, 0.637],
	[0.6, 0.453],
	[0.7, 0.269],
	[0.8, 0.177]
];
/** Sunset hour angle, share of the noon hour of global and of diffuse. */
const NOON_HOUR: readonly (readonly [number, number, number])[] = [
	[60, 0.2045, 0.1911],
	[75, 0.1665, 0.1547],
	[90, 0.1417, 0.1309],
	[105, 0.1244, 0.1144]
];

const middles = Array.from({ length: 24 }, (_, k) => k * 15 - 172.5);
const sum = (values: readonly number[]): number => values.reduce((total, value) => total + value, 0);

/** Invented monthly sums of a place at 42 north, kWh/m². */
const SUMS = [52, 74, 118, 148, 180, 198, 212, 186, 138, 92, 56, 44];

function* closure(): Generator<Row> {
	for (const step of [60, 20, 10]) {
		const year = averageYear(42, SUMS, step);
		if (!year.ok) throw new Error(year.message);
		for (const { month, days, steps, diffuseShare } of year.months) {
			const kwh = (values: readonly number[]) => (sum(values) * days * step) / 60000;
			const at = `month ${month + 1}, steps of ${step} minutes`;
			yield [at, kwh(steps.map((one) => one.globalHorizontal)), SUMS[month]];
			yield [`${at}, diffuse`, kwh(steps.map((one) => one.diffuseHorizontal)), SUMS[month] * diffuseShare];
		}
	}
}

export const decompositionChecks: Check[] = [
	{
		id: 'split-erbs',
		effect: 'average-year',
		title: 'Diffuse share of an hour by clearness',
		against: 'values of the printed polynomial',
		source: 'Erbs, Klein and Duffie 1982',
		provenance: 'formula',
		unit: '',
		tolerance: within(1e-4),
		measure: () => distances(ERBS.map(([k, share]): Row => [`k ${k}`, erbsDiffuseShare(k), share]))
	},
	{
		id: 'split-orgill-hollands',
		effect: 'average-year',
		title: 'The same by another correlation',
		against: 'values of the formula',
		source: 'Orgill and Hollands 1977 (from memory)',
		provenance: 'memory',
		unit: '',
		tolerance: within(1e-4),
		measure: () =>
			distances(ORGILL.map(([k, share]): Row => [`k ${k}`, orgillHollandsDiffuseShare(k), share]))
	},
	{
		id: 'split-erbs-month',
		effect: 'average-year',
		title: 'Diffuse share of a month: June in Madison',
		against: '0.38',
		source: 'Duffie and Beckman, Solar Engineering of Thermal Processes, example 2.12.1 (from memory)',
		provenance: 'memory',
		unit: '',
		tolerance: single(0.005),
		measure: () => distances([['KT 0.55', erbsMonthlyDiffuseShare(0.55, 113.4), 0.38]])
	},
	{
		id: 'split-hour-global',
		effect: 'average-year',
		title: 'Share of an hour in the day’s global sum',
		against: 'values of the printed formula',
		source: 'Collares-Pereira and Rabl 1979',
		provenance: 'formula',
		unit: '',
		tolerance: within(1e-4),
		measure: () =>
			distances([
				...NOON_HOUR.map(([ws, rt]): Row => [`noon, sunset ${ws}°`, collaresPereiraRablHourShare(0, ws), rt]),
				['7.5°, sunset 90°', collaresPereiraRablHourShare(7.5, 90), 0.14],
				['37.5°, sunset 90°', collaresPereiraRablHourShare(37.5, 90), 0.1033],
				['after sunset', collaresPereiraRablHourShare(100, 90), 0],
				['sum of the day', sum(middles.map((w) => collaresPereiraRablHourShare(w, 90))), 0.9936]
			])
	},
	{
		id: 'split-hour-diffuse',
		effect: 'average-year',
		title: 'Share of an hour in the day’s diffuse sum',
		against: 'values of the printed formula',
		source: 'Liu and Jordan 1960',
		provenance: 'formula',
		unit: '',
		tolerance: within(1e-4),
		measure: () =>
			distances([
				...NOON_HOUR.map(([ws, , rd]): Row => [`noon, sunset ${ws}°`, liuJordanHourShare(0, ws), rd]),
				['sum of the day', sum(middles.map((w) => liuJordanHourShare(w, 90))), 1.0029]
			])
	},
	{
		id: 'split-closure',
		effect: 'average-year',
		title: 'Twelve monthly sums come back from the year that is made of them',
		against: 'the sums themselves, invented, steps of 60, 20 and 10 minutes',
		source: 'Conservation: the shares of a day are brought to the sum 1',
		provenance: 'formula',
		unit: 'kWh/m²',
		tolerance: within(1e-9),
		measure: () => distances(closure())
	}
];
