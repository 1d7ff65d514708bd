import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Obstacle, Tracker } from '../document';
import { fieldShade, moveTracker, prepareField, type Field } from '../field';
import { testGrid, testLayout, testTracker, testModel, testPlace, testPlot } from '../test-field';
import { ANY_SHADE } from '../shade/alike-kernel';
import { LEAST_COSINE } from '../shade/table-group';
import { LiveDay } from './live-day';
import { shadeSums } from './shade-sums';
import { sunTable, type TableSun } from './sun-table';

const BINS = 4;

/** The same sums table by table and light by light, from the engine's plain question. */
function plainSums(field: Field, suns: readonly TableSun[]) {
	const { engine } = field;
	const lost = new Float64Array(engine.count * BINS);
	const shaded = new Float64Array(engine.count);
	const shareSum = new Float64Array(engine.count);
	for (const sun of suns) {
		engine.setDay(sun.day);
		engine.setSun(sun.azimuthDeg, sun.elevationDeg, false);
		for (let i = 0; i < engine.count; i++) {
			const cosine = engine.cosine(i);
			if (cosine <= LEAST_COSINE) continue;
			const share = engine.share(i);
			if (share <= ANY_SHADE) continue;
			lost[i * BINS + sun.bin] += sun.weight * cosine * share;
			shaded[i]++;
			shareSum[i] += share;
		}
	}
	return { lost, shaded, share: shareSum };
}

const sunArbitrary = fc.record({
	azimuthDeg: fc.double({ min: 0, max: 359.999, noNaN: true }),
	elevationDeg: fc.oneof(
		fc.double({ min: 0.001, max: 4, noNaN: true }),
		fc.double({ min: 0.5, max: 60, noNaN: true })
	),
	weight: fc.double({ min: 0.1, max: 1, noNaN: true }),
	bin: fc.integer({ min: 0, max: BINS - 1 }),
	day: fc.integer({ min: 1, max: 365 })
});

const fieldArbitrary = fc.record({
	columns: fc.integer({ min: 1, max: 7 }),
	rows: fc.integer({ min: 1, max: 7 }),
	pitchM: fc.double({ min: 7.5, max: 16, noNaN: true }),
	stagger: fc.constantFrom(0, 0.5, 0.31),
	jitterM: fc.constantFrom(0, 0.6),
	risePercent: fc.constantFrom(0, 0, 4, 12),
	riseTowardsDeg: fc.integer({ min: 0, max: 359 }),
	stops: fc.constantFrom(null, { fromDeg: 60, toDeg: 300 }, { fromDeg: 110, toDeg: 250 }),
	maxTiltDeg: fc.constantFrom(90, 80),
	frameMarginM: fc.constantFrom(0, 0.05),
	centreGapM: fc.constantFrom(0, 0, 0.4),
	unlike: fc.boolean(),
	obstacle: fc.constantFrom('none', 'tree', 'box'),
	seed: fc.integer({ min: 1, max: 1e6 })
});

function fieldOf(shape: typeof fieldArbitrary extends fc.Arbitrary<infer T> ? T : never): Field {
	let state = shape.seed;
	const random = () => {
		state = (state * 48271) % 2147483647;
		return state / 2147483647 - 0.5;
	};
	const trackers: Tracker[] = [];
	for (let r = 0; r < shape.rows; r++) {
		for (let c = 0; c < shape.columns; c++) {
			const k = trackers.length;
			trackers.push({
				id: `t${k}`,
				tag: `T${k}`,
				modelId: shape.unlike && k % 3 === 0 ? 'large' : 'test',
				eastM: (c + (r % 2) * shape.stagger) * shape.pitchM + shape.jitterM * random(),
				northM: r * shape.pitchM + shape.jitterM * random(),
				axisHeightM: shape.jitterM > 0 ? 3 + random() : null,
				posture:
					shape.unlike && k % 5 === 0
						? { kind: 'standing', azimuthDeg: 180 + 90 * random(), tiltDeg: 45 }
						: { kind: 'following' }
			});
		}
	}
	const machine = {
		stops: shape.stops,
		maxTiltDeg: shape.maxTiltDeg,
		frameMarginM: shape.frameMarginM,
		centreGapM: shape.centreGapM,
		tiltAxisOffsetM: 0.2,
		tableOffsetM: 0.1
	};
	const obstacles: Record<string, Obstacle[]> = {
		none: [],
		tree: [
			{
				id: 'o',
				kind: 'tree',
				name: 'Tree',
				eastM: -6,
				northM: 4,
				heightM: 9,
				crownBaseM: 2,
				crownRadiusM: 2.5,
				trunkRadiusM: 0.3,
				crownTransmission: 0.4,
				growthMPerYear: 0,
				maxHeightM: 9
			}
		],
		box: [
			{
				id: 'o',
				kind: 'box',
				name: 'Shed',
				eastM: 20,
				northM: -8,
				sizeXM: 8,
				sizeYM: 5,
				heightM: 6,
				turnDeg: 20
			}
		]
	};
	const layout = testLayout([]);
	layout.models = [
		testModel({ ...machine, id: 'test' }),
		testModel({ ...machine, id: 'large', widthM: 8, heightM: 5, axisHeightM: 3.4 })
	];
	layout.trackers = trackers;
	const plot = testPlot({
		ground: {
			kind: 'plane',
			heightM: 0,
			risePercent: shape.risePercent,
			riseTowardsDeg: shape.riseTowardsDeg
		},
		obstacles: obstacles[shape.obstacle]
	});
	return prepareField({ place: testPlace, plot, layout });
}

describe('sums of shade over many suns', () => {
	// Neighbours' offsets are rounded to a nanometre: less than 1e-9 of a table for each light.
	it('are those of each table asked by itself, in any field', () => {
		fc.assert(
			fc.property(fieldArbitrary, fc.array(sunArbitrary, { minLength: 1, maxLength: 40 }), (shape, suns) => {
				const field = fieldOf(shape);
				const sums = shadeSums(field.engine, sunTable(suns), BINS);
				const plain = plainSums(field, suns);
				expect(sums).not.toBeNull();
				if (sums === null) return;
				sums.lost.forEach((lost, k) => expect(Math.abs(lost - plain.lost[k])).toBeLessThan(1e-8));
				// A share at the edge of nothing may fall on either side of it.
				sums.shadedSteps.forEach((steps, k) =>
					expect(Math.abs(steps - plain.shaded[k])).toBeLessThanOrEqual(1)
				);
			}),
			{ seed: 20261201, numRuns: 400 }
		);
	}, 60_000);

	it('miss no neighbour in any regular grid: the farthest row stands in the last cell of its strip', () => {
		const suns: TableSun[] = [
			{ azimuthDeg: 288.79, elevationDeg: 1.6, weight: 1, bin: 0, day: 1 },
			{ azimuthDeg: 178.75, elevationDeg: 2.6, weight: 1, bin: 1, day: 1 },
			...Array.from({ length: 12 }, (_, k) => ({
				azimuthDeg: k * 30 + 0.5,
				elevationDeg: 1.6 + k * 0.7,
				weight: 1,
				bin: k % BINS,
				day: 1
			}))
		];
		const table = sunTable(suns);
		for (let columns = 2; columns <= 12; columns++) {
			for (let rows = 2; rows <= 9; rows++) {
				for (const pitchM of [16, 20]) {
					const field = prepareField({
						place: testPlace,
						plot: testPlot(),
						layout: testLayout(testGrid(columns, rows, pitchM, pitchM))
					});
					const sums = shadeSums(field.engine, table, BINS);
					const plain = plainSums(field, suns);
					plain.lost.forEach((lost, k) =>
						expect(Math.abs(lost - (sums?.lost[k] ?? NaN)), `${columns} x ${rows}`).toBeLessThan(1e-7)
					);
				}
			}
		}
	}, 60_000);

	it('do not take one neighbourhood for another that has the same key', () => {
		// A thousand pairs far apart, each with an offset of its own.
		let state = 7;
		const random = () => {
			state = (state * 48271) % 2147483647;
			return state / 2147483647;
		};
		const trackers: Tracker[] = [];
		for (let k = 0; k < 1000; k++) {
			trackers.push(testTracker(2 * k, k * 4096, 0), testTracker(2 * k + 1, k * 4096, -11 - random() * 2));
		}
		const layout = testLayout(trackers);
		const field = prepareField({ place: testPlace, plot: testPlot(), layout });
		const suns: TableSun[] = [{ azimuthDeg: 180.5, elevationDeg: 7, weight: 1, bin: 0, day: 1 }];
		const sums = shadeSums(field.engine, sunTable(suns), BINS);
		const plain = plainSums(field, suns);
		plain.lost.forEach((lost, k) => expect(Math.abs(lost - (sums?.lost[k] ?? NaN))).toBeLessThan(1e-7));
	}, 60_000);

	it('of a part are the same numbers as in the whole', () => {
		fc.assert(
			fc.property(
				fieldArbitrary,
				fc.array(sunArbitrary, { minLength: 1, maxLength: 30 }),
				fc.double({ min: 0, max: 1, noNaN: true }),
				(shape, suns, cut) => {
					const { engine } = fieldOf(shape);
					const table = sunTable(suns);
					const middle = Math.round(cut * engine.count);
					const whole = shadeSums(engine, table, BINS);
					const parts = [shadeSums(engine, table, BINS, 0, middle), shadeSums(engine, table, BINS, middle)];
					expect(parts.flatMap((part) => Array.from(part?.lost ?? []))).toEqual(
						Array.from(whole?.lost ?? [])
					);
					for (const part of parts) expect(part?.without).toEqual(whole?.without);
				}
			),
			{ seed: 20261202, numRuns: 100 }
		);
	}, 60_000);

	it('of a day keep up with a tracker that is moved', () => {
		fc.assert(
			fc.property(
				fieldArbitrary,
				fc.array(sunArbitrary, { minLength: 1, maxLength: 8 }),
				fc.array(
					fc.tuple(
						fc.nat(),
						fc.double({ min: -10, max: 60, noNaN: true }),
						fc.double({ min: -10, max: 60, noNaN: true })
					),
					{
						minLength: 1,
						maxLength: 3
					}
				),
				(shape, suns, moves) => {
					const field = fieldOf(shape);
					const live = new LiveDay(field, suns, 20);
					let moved = field;
					for (const [pick, eastM, northM] of moves) {
						live.move(pick % field.engine.count, eastM, northM);
						moved = moveTracker(moved, pick % field.engine.count, eastM, northM);
					}
					suns.forEach((sun, k) => {
						fieldShade(moved, sun, 20).forEach((share, i) =>
							expect(Math.abs(share - live.shares[k][i])).toBeLessThan(1e-9)
						);
					});
				}
			),
			{ seed: 20261205, numRuns: 150 }
		);
	}, 60_000);

	it('of a moment agree with the plain question', () => {
		fc.assert(
			fc.property(fieldArbitrary, sunArbitrary, (shape, sun) => {
				const { engine } = fieldOf(shape);
				const bulk = new Float64Array(engine.count);
				engine.setSun(sun.azimuthDeg, sun.elevationDeg);
				engine.shares(bulk);
				engine.setSun(sun.azimuthDeg, sun.elevationDeg, false);
				bulk.forEach((share, i) => expect(Math.abs(share - engine.share(i))).toBeLessThan(1e-10));
			}),
			{ seed: 20261203, numRuns: 300 }
		);
	}, 60_000);
});
