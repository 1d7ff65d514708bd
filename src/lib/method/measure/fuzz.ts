/** Whether anything at all comes out wrong on scenes that nobody would draw. */
import { fieldShade, mountScene, prepareField, shadeScene, type MountEdge } from '../../core';
import { distances, type Check, type Extent, type Row } from '../check';
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

const TRIES: readonly (readonly [string, (random: Random) => number])[] = [
	['scene', tryScene],
	['field', tryField],
	['scene', tryScene],
	['mount', tryMount],
	['scene', tryScene]
];

function* rows(extent: Extent): Generator<Row> {
	const count = extent === 'whole' ? 100_000 : 1000;
	for (let k = 0; k < count; k++) {
		const [kind, attempt] = TRIES[k % TRIES.length];
		// Each scene from its own seed, so that one can be looked at alone.
		const random = randomSource(SEED + k);
		let off: number;
		try {
			off = attempt(random);
		} catch (error) {
			// An exception is the very thing that is looked for: it is a value infinitely far off, with its words.
			yield [`${kind} of seed ${SEED + k}: ${String(error)}`, Infinity, 0];
			continue;
		}
		yield [`${kind} of seed ${SEED + k}`, off, 0];
	}
}

export const fuzzChecks: Check[] = [
	{
		id: 'shade-fuzz',
		effect: 'shade',
		title: 'Random scenes and fields: no exception, no NaN, no share outside 0 to 1',
		against: `nothing wrong at all: suns down to 0.0001° and in the zenith, tables that touch, coincide, straddle, stand edge-on, tiny and huge (seed ${SEED})`,
		source: 'Definition of a share',
		provenance: 'formula',
		unit: '',
		tolerance: { worst: 0, mean: 0 },
		measure: (extent) => distances(rows(extent))
	}
];
