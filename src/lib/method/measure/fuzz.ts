/** Whether anything at all comes out wrong on scenes that nobody would draw. */
import {
	fieldShade,
	LiveDay,
	mountScene,
	moveTracker,
	prepareField,
	shadeScene,
	shadeSums,
	sunTable,
	type Field,
	type MountEdge,
	type TableSun
} from '../../core';
import { distances, type Check, type Extent, type Row } from '../check';
import { plainPlot, plainRun, plainTrackers } from './fields';
import { randomField } from './random-fields';
import { randomScene, randomSun } from './random-scenes';
import { randomSource } from './random';

const SEED = 20_25;
type Random = () => number;

/** How far a share lies outside 0..1; infinite for what is no number. */
const outside = (share: number): number => (Number.isNaN(share) ? Infinity : Math.max(0, -share, share - 1));

function tryScene(random: Random): number {
	const scene = randomScene(random);
	return Math.max(...shadeScene(scene).map(({ shadedShare }) => outside(shadedShare)));
}

const EDGES: MountEdge[] = ['top', 'bottom', 'left', 'right'];

function tryMount(random: Random): number {
	const { sun, tables, obstacles, skyline } = randomScene(random);
	const [marks] = mountScene({
		tables,
		target: tables[0].id,
		obstacles,
		skyline,
		points: { count: 3, insetM: 0, forwardM: random() < 0.5 ? 0 : 0.05, edges: EDGES },
		steps: [{ sun, poses: tables }]
	});
	return EDGES.every((edge) => /^[01]{3}$/.test(marks[edge] ?? '')) ? 0 : 1;
}

/** Every question that the engine answers, and answers that must agree with one another. */
function tryField(random: Random): number {
	const field = prepareField(randomField(random));
	const { engine } = field;
	let worst = 0;
	for (let k = 0; k < 2; k++) {
		const sun = randomSun(random);
		engine.setDay(1 + Math.floor(366 * random()));
		if (random() < 0.8) engine.setSun(sun.azimuthDeg, sun.elevationDeg, random() < 0.5);
		else {
			const light = randomSun(random);
			engine.setLight(sun.azimuthDeg, sun.elevationDeg, light.azimuthDeg, light.elevationDeg, random() < 0.5);
		}
		const bulk = new Float64Array(engine.count);
		engine.shares(bulk);
		for (let i = 0; i < engine.count; i++) {
			const share = engine.share(i);
			worst = Math.max(worst, outside(share), outside(bulk[i]));
			// The bulk answer may take another way through the same geometry, not to another answer.
			if (Math.abs(share - bulk[i]) > 1e-9) worst = Math.max(worst, Math.abs(share - bulk[i]));
			if (!(engine.cosine(i) > 0)) continue;
			engine.collect(i);
			for (const j of engine.collectedTables()) {
				const without = engine.shareWithout(i, j);
				worst = Math.max(worst, outside(without), without - share > 1e-9 ? without - share : 0);
			}
			for (const piece of engine.litPolygons(i, 0.5)) {
				if (piece.some((value) => !Number.isFinite(value))) worst = Infinity;
			}
		}
		for (const share of fieldShade(field, sun)) worst = Math.max(worst, outside(share));
	}
	return worst;
}

const ROUNDING = 1e-7;
const beyond = (off: number): number => (off <= ROUNDING ? 0 : Number.isNaN(off) ? Infinity : off);

/** Regular, staggered and jittered grids of one kind of table. */
function gridField(random: Random): Field {
	const [columns, rows] = [2 + Math.floor(13 * random()), 2 + Math.floor(9 * random())];
	const [eastM, northM] = [7.5 + 17.5 * random(), 7.5 + 17.5 * random()];
	const stagger = random() < 0.3 ? 0.5 : 0;
	const jitterM = random() < 0.4 ? 1.5 * random() : 0;
	const places = Array.from({ length: columns * rows }, (_, k): [number, number] => {
		const row = Math.floor(k / columns);
		return [
			((k % columns) + (row % 2) * stagger) * eastM + jitterM * (random() - 0.5),
			row * northM + jitterM * (random() - 0.5)
		];
	});
	const risePercent = random() < 0.3 ? 15 * random() : 0;
	return prepareField(
		plainRun(plainTrackers(places), {
			plot: plainPlot({
				ground: { kind: 'plane', heightM: 0, risePercent, riseTowardsDeg: 360 * random() }
			})
		})
	);
}

/** Sums over suns as a year makes them, and a day that follows moves, against the plain question table by table. */
function trySums(random: Random): number {
	const field = gridField(random);
	const { engine } = field;
	const day = 1 + Math.floor(365 * random());
	const suns = Array.from({ length: 3 }, (): TableSun => ({
		...randomSun(random),
		weight: 0.1 + random(),
		bin: 0,
		day
	}));
	const weight = suns.reduce((sum, sun) => sum + sun.weight, 0);
	const lost = new Float64Array(engine.count);
	for (const sun of suns) {
		engine.setDay(day);
		engine.setSun(sun.azimuthDeg, sun.elevationDeg, false);
		for (let i = 0; i < engine.count; i++) {
			const cosine = engine.cosine(i);
			if (cosine > 0) lost[i] += sun.weight * cosine * engine.share(i);
		}
	}
	let worst = 0;
	const sums = shadeSums(engine, sunTable(suns), 1);
	if (!sums) return Infinity;
	lost.forEach((sum, i) => (worst = Math.max(worst, beyond(Math.abs(sum - sums.lost[i]) / weight))));

	const live = new LiveDay(field, suns, day);
	let moved = field;
	for (let k = 0; k < 2; k++) {
		const index = Math.floor(engine.count * random());
		const { eastM, northM } = moved.layout.trackers[index];
		const [east, north] = [eastM + 12 * (random() - 0.5), northM + 12 * (random() - 0.5)];
		live.move(index, east, north);
		moved = moveTracker(moved, index, east, north);
	}
	suns.forEach((sun, k) => {
		fieldShade(moved, sun, day).forEach((share, i) => {
			worst = Math.max(worst, beyond(Math.abs(share - live.shares[k][i])));
		});
	});
	return worst;
}

/** What is tried, and how often in the tests; a hundredth of it while building. */
const TRIES: readonly (readonly [kind: string, attempt: (random: Random) => number, count: number])[] = [
	['scene', tryScene, 100_000],
	['field', tryField, 8000],
	['mount', tryMount, 8000],
	['sums', trySums, 400]
];

function* rows(extent: Extent): Generator<Row> {
	// Each from its own seed, so that one can be looked at alone.
	let seed = SEED;
	for (const [kind, attempt, count] of TRIES) {
		for (let k = 0; k < (extent === 'whole' ? count : count / 100); k++) {
			const random = randomSource(++seed);
			let off: number;
			try {
				off = attempt(random);
			} catch (error) {
				// An exception is the very thing that is looked for: it is a value infinitely far off, with its words.
				yield [`${kind} of seed ${seed}: ${String(error)}`, Infinity, 0];
				continue;
			}
			yield [`${kind} of seed ${seed}`, off, 0];
		}
	}
}

export const fuzzChecks: Check[] = [
	{
		id: 'shade-fuzz',
		effect: 'shade',
		title:
			'Random scenes, fields, sensors and sums over suns: no exception, no NaN, no share outside 0 to 1, every way to the same answer',
		against: `nothing wrong at all: suns down to 0.0001° and in the zenith, tables that touch, coincide, straddle, stand edge-on, tiny and huge (seed ${SEED})`,
		source: 'Definition of a share',
		provenance: 'formula',
		unit: '',
		tolerance: { worst: 0, mean: 0 },
		measure: (extent) => distances(rows(extent))
	}
];
