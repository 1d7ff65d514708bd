/** What the trade holds without a source: the core must at least agree with it. */
import { sunVector, tableAxes } from '../../core';
import { distances, single, within, type Check, type Row } from '../check';

const practice = 'Common practice, no source';
const along = (a: readonly number[], b: readonly number[]): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
/** Beam lost, in percent, by a table that points beside the sun. */
const lostPercent = (offDeg: number): number =>
	100 * (1 - along(tableAxes(180, 45).n, sunVector(180, 45 + offDeg)));

export const practiceChecks: Check[] = [
	{
		id: 'practice-bearings',
		effect: 'frame',
		title: 'Bearings clockwise from north: 0 north, 90 east, 180 south, 270 west',
		against: 'the four directions of the compass',
		source: practice,
		provenance: 'practice',
		unit: '',
		tolerance: within(1e-12),
		measure: () =>
			distances(
				[
					[0, 0, 1],
					[90, 1, 0],
					[180, 0, -1],
					[270, -1, 0]
				].flatMap(([bearing, east, north]): Row[] => {
					const s = sunVector(bearing, 0);
					return [
						[`east of ${bearing}`, s[0], east],
						[`north of ${bearing}`, s[1], north]
					];
				})
			)
	},
	{
		id: 'practice-axes',
		effect: 'frame',
		title: 'A table facing south: u is east, v north and up, n = u x v',
		against: 'the definition',
		source: 'This project',
		provenance: 'formula',
		unit: '',
		tolerance: within(1e-12),
		measure: () => {
			const { u, v, n } = tableAxes(180, 30);
			const half = 0.5;
			const root = Math.sqrt(3) / 2;
			return distances([
				['u east', u[0], 1],
				['u north', u[1], 0],
				['v north', v[1], root],
				['v up', v[2], half],
				['n south', n[1], -half],
				['n up', n[2], root],
				['n.u', along(n, u), 0],
				['n.v', along(n, v), 0],
				['u.v', along(u, v), 0]
			]);
		}
	},
	{
		id: 'practice-pointing',
		effect: 'frame',
		title: 'Beam lost by pointing 1° off the sun',
		against: '0.015 %',
		source: practice,
		provenance: 'practice',
		unit: '%',
		tolerance: single(0.0005),
		measure: () => distances([['1°', lostPercent(1), 0.015]])
	},
	{
		id: 'practice-blind-pointing',
		effect: 'frame',
		title: 'Beam lost by pointing 20° off the sun',
		against: '6.0 %',
		source: practice,
		provenance: 'practice',
		unit: '%',
		tolerance: single(0.05),
		measure: () => distances([['20°', lostPercent(20), 6.0]])
	}
];
