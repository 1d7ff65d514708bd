/** The real weather file of Golden: read rightly, closing, and what two axes gain. */
import { trackingGain, weatherClosure, weatherSums, type GainOptions } from '../../core';
import { readWeather } from '../../exchange/weather';
import { distances, single, within, type Check, type Row } from '../check';
import { goldenBytes } from './fixtures';

function readGolden() {
	const reading = readWeather(goldenBytes());
	if (!reading.ok) throw new Error(`${reading.message} ${reading.remedy}`);
	return reading;
}
let kept: ReturnType<typeof readGolden> | undefined;
const golden = () => (kept ??= readGolden());
/** The real year, read once. */
export const goldenYear = golden;

const GHI = [71.8, 85.4, 145.7, 170.6, 189.5, 187.9, 191.4, 182.7, 147.9, 107.9, 86.4, 52.7];
const DNI = [138.7, 126.2, 183.4, 176.1, 176.7, 159.4, 182.4, 178.3, 163.4, 143.8, 166.1, 72.1];

/** All months in one calendar year, as the reference took them; the file's come from different ones. */
function inOneYear() {
	const { utcOffsetHours } = golden();
	const rows = golden().rows.map((row) => {
		const at = new Date(row.startMs + utcOffsetHours * 3600000);
		const clock = Date.UTC(2001, at.getUTCMonth(), at.getUTCDate(), at.getUTCHours());
		return { ...row, startMs: clock - utcOffsetHours * 3600000 };
	});
	return { ...golden(), rows };
}

function closed(closure: ReturnType<typeof weatherClosure>) {
	if (closure === null) throw new Error('The file has no hour of light');
	return closure;
}

/** Isotropic and Hay-Davies: two axes, best fixed plane, its tilt; kWh/m². */
const GAIN: readonly (readonly [GainOptions['model'], number, number, number])[] = [
	['isotropic', 2392.9, 1845.0, 33],
	['hay-davies', 2557.8, 1894.0, 35]
];

export const weatherChecks: Check[] = [
	{
		id: 'weather-sums',
		effect: 'weather',
		title: 'Sums of a real year: global, beam, diffuse, whole and by month',
		against: 'sums of the file taken independently',
		source: 'TMY3 of Golden, Colorado (public data of the US government)',
		provenance: 'library',
		unit: 'kWh/m²',
		tolerance: within(0.0501, 0.04),
		measure: () => {
			const sums = weatherSums(golden());
			return distances([
				['global', sums.ghi, 1619.9],
				['beam', sums.dni, 1866.5],
				['diffuse', sums.dhi, 577.9],
				...GHI.map((value, m): Row => [`global of month ${m + 1}`, sums.monthlyGhi[m], value]),
				...DNI.map((value, m): Row => [`beam of month ${m + 1}`, sums.monthlyDni[m], value])
			]);
		}
	},
	{
		id: 'weather-closure',
		effect: 'weather',
		title: 'Closure: global - (diffuse + beam cos z), root mean square',
		against: '0; hours read from their wrong end give more than 15',
		source: 'TMY3 of Golden; sun of mid-hour with refraction',
		provenance: 'formula',
		unit: 'W/m²',
		tolerance: single(2),
		measure: () => distances([['3881 hours', closed(weatherClosure(golden())).rmsWm2, 0]])
	},
	{
		id: 'weather-closure-reference',
		effect: 'weather',
		title: 'Closure with an airless sun and all months in one year',
		against: 'the reference: mean 0.12, root mean square 0.70, 3881 hours',
		source: 'TMY3 of Golden, computed independently',
		provenance: 'library',
		unit: 'W/m²',
		tolerance: within(0.03, 0.015),
		measure: () => {
			const closure = closed(weatherClosure(inOneYear(), 0, true));
			return distances([
				['mean', closure.meanWm2, 0.12],
				['root mean square', closure.rmsWm2, 0.7],
				['hours', closure.hours, 3881]
			]);
		}
	},
	{
		id: 'weather-closure-most',
		effect: 'weather',
		title: 'The same, greatest hour',
		against: 'the reference: 2.9',
		source: 'TMY3 of Golden, computed independently; its year is not told',
		provenance: 'library',
		unit: 'W/m²',
		tolerance: single(0.3),
		measure: () => distances([['greatest', closed(weatherClosure(inOneYear(), 0, true)).maxWm2, 2.9]])
	},
	{
		id: 'weather-tracking-gain',
		effect: 'weather',
		title: 'Two axes and the best fixed plane over the real year',
		against: 'sums of the formulas, isotropic and Hay-Davies, albedo 0.2; relative',
		source: 'TMY3 of Golden, computed independently',
		provenance: 'formula',
		unit: '%',
		tolerance: within(0.5),
		measure: (extent) =>
			distances(
				GAIN.flatMap(([model, twoAxis, fixed, tilt]): Row[] => {
					// The search for the best tilt takes most of the time; the tests make it.
					const fixedTiltDeg = extent === 'whole' ? undefined : tilt;
					const gain = trackingGain(golden(), { model, albedo: 0.2, fixedTiltDeg });
					return [
						[`two axes, ${model}`, (gain.twoAxisKwhM2 / twoAxis - 1) * 100, 0],
						[`fixed, ${model}`, (gain.fixedKwhM2 / fixed - 1) * 100, 0]
					];
				})
			)
	}
];
