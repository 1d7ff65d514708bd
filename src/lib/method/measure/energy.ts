/** Sky that neighbours leave, the year of energy, and who takes whose light. */
import {
	answersYear,
	energyYear,
	prepareField,
	skyDirections,
	skyView,
	trackingGain,
	weatherSky,
	type EnergySettings
} from '../../core';
import { distances, single, within, type Check, type Row } from '../check';
import { goldenYear } from './weather';
import { plainModel, plainPlace, plainRun, plainTrackers } from './fields';

const radians = Math.PI / 180;

/** Endless rows: tilt, pitch, height of the table along its slope. */
const ROWS: readonly (readonly [number, number, number])[] = [
	[30, 6, 4],
	[50, 6, 4],
	[60, 12, 4],
	[90, 5, 3]
];

function* skyRows(rings: number, perRing: number): Generator<Row> {
	const directions = skyDirections(rings, perRing);
	for (const [tiltDeg, pitchM, heightM] of ROWS) {
		const model = plainModel({ widthM: 6000, heightM });
		const places = Array.from({ length: 5 }, (_, k): [number, number] => [0, -k * pitchM]);
		const { engine, skyline } = prepareField(
			plainRun(plainTrackers(places, { kind: 'standing', azimuthDeg: 180, tiltDeg }), {
				layout: {
					version: 1,
					models: [model],
					trackers: plainTrackers(places, { kind: 'standing', azimuthDeg: 180, tiltDeg }),
					mounts: { common: null, exceptions: {}, fromRunId: null }
				}
			})
		);
		const sun = { azimuthDeg: 180, elevationDeg: 30 };
		const shares = new Float64Array(engine.count);
		const { lost } = skyView(engine, skyline, directions, sun, 0, engine.count, shares);
		const seen = ((1 + Math.cos(tiltDeg * radians)) / 2) * (1 - lost[0]);
		// From the foot of the glass to the upper edge of the row ahead.
		const up = heightM * Math.sin(tiltDeg * radians);
		const ahead = pitchM - heightM * Math.cos(tiltDeg * radians);
		yield [
			`tilt ${tiltDeg}°, pitch ${pitchM} m`,
			seen,
			(heightM + pitchM - Math.hypot(ahead, up)) / (2 * heightM)
		];
	}
}

const clear: EnergySettings = { sky: { source: 'clear' }, skyModel: 'hay-davies', albedo: 0.2 };
const pair = (): [number, number][] => [
	[0, 0],
	[9, 1],
	[1, -8]
];

function yearOf(places: [number, number][]) {
	const result = energyYear(plainRun(plainTrackers(places), { energy: clear }));
	if (!result) throw new Error('Nothing stops this run');
	return result;
}

/** Light on a lone table at Golden, the file's own year, against sums of mid-hours. */
function goldenRow(): Row[] {
	const golden = goldenYear();
	const { latitudeDeg, longitudeDeg, altitudeM } = golden.place;
	const result = energyYear(
		plainRun(plainTrackers([[0, 0]]), {
			place: { ...plainPlace, latitudeDeg, longitudeDeg, altitudeM },
			stepMinutes: 20,
			energy: { ...clear, sky: weatherSky(golden) }
		})
	);
	const total = result?.field.without.total ?? Number.NaN;
	const gain = trackingGain(golden, { model: 'hay-davies', albedo: 0.2 });
	return [
		['sums of mid-hours here', (100 * total) / gain.twoAxisKwhM2, 100],
		['sums of mid-hours, computed independently', (100 * total) / 2557.8, 100]
	];
}

/** What each removal gives back, against the year without that tracker. */
function* takerRows(): Generator<Row> {
	const answers = (places: [number, number][]) => {
		const found = answersYear(plainRun(plainTrackers(places)), undefined, { everyDays: 28 });
		if (!found) throw new Error('Nothing stops this run');
		return found;
	};
	const places = pair();
	const all = answers(places);
	for (let gone = 0; gone < places.length; gone++) {
		const rest = answers(places.filter((_, k) => k !== gone));
		for (const [i, tracker] of all.trackers.entries()) {
			if (i === gone) continue;
			const taker = tracker.takers.find(({ id }) => id === `t${gone}`);
			const without = rest.trackers[i > gone ? i - 1 : i].beamLoss;
			yield [`t${gone} from t${i}`, taker?.removalLoss ?? 0, tracker.beamLoss - without];
		}
	}
}

export const energyChecks: Check[] = [
	{
		id: 'sky-view-rows',
		effect: 'sky-view',
		title: 'Sky seen between endless rows, as runs sum it: 6 rings of 16 directions',
		against: 'crossed strings: (h + p - diagonal) / 2h',
		source: 'Hottel 1954 (from memory)',
		provenance: 'memory',
		unit: '',
		tolerance: within(0.008),
		measure: () => distances(skyRows(6, 16))
	},
	{
		id: 'sky-view-fine',
		effect: 'sky-view',
		title: 'The same with 24 rings of 96: where the sum goes',
		against: 'crossed strings',
		source: 'Hottel 1954 (from memory)',
		provenance: 'memory',
		unit: '',
		tolerance: within(0.002),
		measure: () => distances(skyRows(24, 96))
	},
	{
		id: 'energy-lone-table',
		effect: 'energy-year',
		title: 'A year of light on a lone table at Golden, percent of the reference',
		against: 'sums of mid-hours over the same file, Hay and Davies, albedo 0.2',
		source: 'TMY3 of Golden, computed independently: 2557.8 kWh/m²',
		provenance: 'formula',
		unit: '%',
		tolerance: within(0.5),
		measure: () => distances(goldenRow())
	},
	{
		id: 'energy-balance',
		effect: 'energy-year',
		title: 'What shade leaves and what it takes add up to the light without shade',
		against: 'beam, circumsolar, even sky, horizon and ground of three trackers',
		source: 'Conservation of energy',
		provenance: 'formula',
		unit: 'kWh/m²',
		tolerance: within(1e-9),
		measure: () => {
			const { without, with: left } = yearOf(pair()).field;
			const sum = ({ total: _, ...parts }: typeof without) =>
				Object.values(parts).reduce((all, part) => all + part, 0);
			return distances([
				['parts without shade', sum(without), without.total],
				['parts with shade', sum(left), left.total],
				['ground, which is not reduced', left.ground, without.ground]
			]);
		}
	},
	{
		id: 'energy-alone',
		effect: 'energy-year',
		title: 'A table alone loses nothing',
		against: 'no loss at all',
		source: 'Definition',
		provenance: 'formula',
		unit: 'kWh/m²',
		tolerance: single(1e-9),
		measure: () => {
			const { without, with: left } = yearOf([[0, 0]]).field;
			return distances([['lone table', without.total - left.total, 0]]);
		}
	},
	{
		id: 'answers-removal',
		effect: 'answers',
		title: 'What the removal of each neighbour gives back',
		against: 'the year computed again without it',
		source: 'Definition: loss with all minus loss without this one',
		provenance: 'formula',
		unit: '',
		tolerance: within(1e-9),
		measure: () => distances(takerRows())
	}
];
