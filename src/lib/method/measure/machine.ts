/** Where a table points, how far it reaches: against plain searches over everything that the machine can do. */
import { followAim, lowestCornerM, reachRadiusM, sunVector, tableAxes, type StopArc } from '../../core';
import { distances, within, type Check, type Row } from '../check';
import { plainModel } from './fields';
import { randomSource } from './random';

const SEED = 240_120;
type Range = { stops: StopArc | null; minTiltDeg: number; maxTiltDeg: number };

const cosine = (azimuthDeg: number, tiltDeg: number, s: readonly number[]): number => {
	const { n } = tableAxes(azimuthDeg, tiltDeg);
	return n[0] * s[0] + n[1] * s[1] + n[2] * s[2];
};

/** Least angle to the sun over a fine net of reachable aims, its own neighbours searched again. */
function searched({ stops, minTiltDeg, maxTiltDeg }: Range, s: readonly number[]): number {
	const from = stops?.fromDeg ?? 0;
	const span = stops ? (stops.toDeg - stops.fromDeg + 360) % 360 : 360;
	let best = { along: 0, up: 0, cosine: -2 };
	let step = 1 / 60;
	for (let round = 0; round < 6; round++) {
		const { along: a, up: b } = best;
		const all = round === 0;
		for (let i = all ? 0 : -5; i <= (all ? 60 : 5); i++) {
			for (let j = all ? 0 : -5; j <= (all ? 60 : 5); j++) {
				const along = Math.min(1, Math.max(0, all ? i * step : a + i * step));
				const up = Math.min(1, Math.max(0, all ? j * step : b + j * step));
				const found = cosine(from + span * along, minTiltDeg + (maxTiltDeg - minTiltDeg) * up, s);
				if (found > best.cosine) best = { along, up, cosine: found };
			}
		}
		step /= 5;
	}
	return best.cosine;
}
const angleDeg = (cos: number): number => (Math.acos(Math.min(1, cos)) * 180) / Math.PI;

function* aimRows(): Generator<Row> {
	const random = randomSource(SEED);
	for (let k = 0; k < 120; k++) {
		const fromDeg = 360 * random();
		const range: Range = {
			stops: k % 4 === 0 ? null : { fromDeg, toDeg: (fromDeg + 40 + 300 * random()) % 360 },
			minTiltDeg: 30 * random(),
			maxTiltDeg: 50 + 40 * random()
		};
		const sun = { azimuthDeg: 360 * random(), elevationDeg: 0.1 + 89 * random() };
		const s = sunVector(sun.azimuthDeg, sun.elevationDeg);
		const aim = followAim(range, sun);
		const at = `sun ${sun.azimuthDeg.toFixed(1)}, ${sun.elevationDeg.toFixed(1)}`;
		yield [at, angleDeg(cosine(aim.azimuthDeg, aim.tiltDeg, s)), angleDeg(searched(range, s))];
	}
}

/** Farthest and lowest point of the steel's corners over all tilts in steps of 0.02 degrees. */
function* reachRows(): Generator<Row> {
	const random = randomSource(SEED);
	for (let k = 0; k < 40; k++) {
		const model = plainModel({
			widthM: 1 + 12 * random(),
			heightM: 1 + 8 * random(),
			frameMarginM: 0.2 * random(),
			tiltAxisOffsetM: random() - 0.3,
			tableOffsetM: 0.5 * random(),
			centreShiftM: random() - 0.5,
			minTiltDeg: 20 * random(),
			maxTiltDeg: 60 + 30 * random(),
			night: { azimuthDeg: null, tiltDeg: 25 },
			windTiltDeg: 25
		});
		let reach = 0;
		let lowest = Infinity;
		const low = Math.min(model.minTiltDeg, 25);
		for (let step = 0; step <= 4500; step++) {
			const tilt = low + ((model.maxTiltDeg - low) * step) / 4500;
			const { u, v, n } = tableAxes(0, tilt);
			for (const [a, b] of [
				[1, 1],
				[1, -1]
			]) {
				const x = a * (model.widthM / 2 + model.frameMarginM);
				const y = b * (model.heightM / 2 + model.frameMarginM) + model.centreShiftM;
				const [east, north, up] = [0, 1, 2].map((c) => x * u[c] + y * v[c] + model.tableOffsetM * n[c]);
				reach = Math.max(reach, Math.hypot(east, north + model.tiltAxisOffsetM));
				lowest = Math.min(lowest, model.axisHeightM + up);
			}
		}
		yield [`reach of machine ${k}`, reachRadiusM(model), reach];
		yield [`lowest corner of machine ${k}`, lowestCornerM(model), lowest];
	}
}

export const machineChecks: Check[] = [
	{
		id: 'aim-nearest',
		effect: 'machine',
		title: 'Angle left to the sun by random stops (through north too) and tilt ranges',
		against: `the least angle of a search over all reachable aims (seed ${SEED})`,
		source: 'Definition: the nearest reachable aim in angle',
		provenance: 'formula',
		unit: '°',
		tolerance: within(0.01, 0.001),
		measure: () => distances(aimRows())
	},
	{
		id: 'machine-reach',
		effect: 'machine',
		title: 'Radius of reach and lowest corner of random machines',
		against: `corners walked through all tilts in steps of 0.02° (seed ${SEED})`,
		source: 'Definition',
		provenance: 'formula',
		unit: 'm',
		tolerance: within(0.001),
		measure: () => distances(reachRows())
	}
];
