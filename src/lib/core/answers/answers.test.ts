import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Layout, Plot, Tracker } from '../document';
import { prepareField } from '../field';
import type { RunInput } from '../results';
import { testGrid, testLayout, testModel, testPlace, testPlot, testTracker } from '../test-field';
import { answersPart, answersYear, joinAnswers } from './answers-year';
import { answerSuns } from './answer-suns';
import { highestSunDeg } from './clear-height';
import { lightLedger, removalOf } from './light-ledger';
import { fieldChanges, MOVE_STEP_M, stepMoves, WAYS } from './which-way';

/** What sliding a clipped shadow may be off under grazing suns, share of the light without shade; 8e-7 was met in 400 fields. */
const GRAZED_SHARE = 5e-6;

const noMoves = { perTracker: 0, vectors: new Float64Array(0) };

function runInput(
	trackers: Tracker[],
	changes: Partial<RunInput> = {},
	layout: Partial<Layout> = {}
): RunInput {
	return {
		place: testPlace,
		plot: testPlot(),
		layout: { ...testLayout(trackers), ...layout },
		winterRule: { kind: 'clear-above', elevationDeg: 12 },
		year: 2026,
		stepMinutes: 20,
		utcOffsetMinutes: 60,
		treeYears: 0,
		...changes
	};
}

const ledgerOf = (input: RunInput, everyDays = 28, moves = noMoves) => {
	const field = prepareField(input);
	const { suns } = answerSuns(field, input, everyDays);
	return lightLedger(field, suns, { from: 0, to: input.layout.trackers.length }, moves)!;
};

const tree: Plot['obstacles'][number] = {
	id: 'oak',
	kind: 'tree',
	name: 'Oak',
	eastM: 12,
	northM: -14,
	heightM: 12,
	crownBaseM: 3,
	crownRadiusM: 4,
	trunkRadiusM: 0.4,
	crownTransmission: 0.3,
	growthMPerYear: 0,
	maxHeightM: 12
};
const barn: Plot['obstacles'][number] = {
	id: 'barn',
	kind: 'box',
	name: 'Barn',
	eastM: -16,
	northM: -12,
	sizeXM: 10,
	sizeYM: 8,
	heightM: 7,
	turnDeg: 20
};

/** Fields of a few trackers that keep clear of each other, alike or not, with and without obstacles. */
const fields = fc
	.record({
		places: fc.array(fc.tuple(fc.integer({ min: 0, max: 4 }), fc.integer({ min: 0, max: 3 })), {
			minLength: 2,
			maxLength: 7
		}),
		pitch: fc.double({ min: 8.5, max: 16, noNaN: true }),
		shear: fc.double({ min: -0.4, max: 0.4, noNaN: true }),
		rise: fc.double({ min: 0, max: 12, noNaN: true }),
		towards: fc.integer({ min: 0, max: 359 }),
		standing: fc.boolean(),
		gap: fc.constantFrom(0, 0.4),
		obstacles: fc.boolean()
	})
	.map(({ places, pitch, shear, rise, towards, standing, gap, obstacles }) => {
		const cells = [...new Map(places.map((cell) => [cell.join(), cell])).values()];
		const trackers = cells.map(([x, y], k) =>
			testTracker(k, (x + shear * y) * pitch, y * pitch, {
				posture:
					standing && k === 0 ? { kind: 'standing', azimuthDeg: 150, tiltDeg: 60 } : { kind: 'following' }
			})
		);
		return runInput(
			trackers,
			{
				plot: testPlot({
					ground: { kind: 'plane', heightM: 0, risePercent: rise, riseTowardsDeg: towards },
					obstacles: obstacles ? [tree, barn] : []
				})
			},
			{ models: [testModel({ centreGapM: gap, frameMarginM: 0.05 })] }
		);
	});

const check = (runs: number, property: fc.IProperty<[RunInput]>) =>
	// A failure prints its seed and path.
	fc.assert(property, { numRuns: runs });

describe('who takes whose light', () => {
	it('agrees with the engine on the loss of every tracker', () => {
		check(
			12,
			fc.property(fields, (input) => {
				const field = prepareField(input);
				const { suns } = answerSuns(field, input, 28);
				const ledger = ledgerOf(input);
				const lost = new Float64Array(field.engine.count);
				for (const sun of suns) {
					field.engine.setDay(sun.dayOfYear);
					field.engine.setSun(sun.azimuthDeg, sun.elevationDeg);
					for (let i = 0; i < lost.length; i++) {
						const cosine = field.engine.cosine(i);
						if (cosine > 0) lost[i] += sun.kwh * cosine * field.engine.share(i);
					}
				}
				lost.forEach((kwh, i) => expect(ledger.lost[i]).toBeCloseTo(kwh, 9));
			})
		);
	});

	it('a removal is never negative nor more than the taker alone, and all alone take at least what is lost', () => {
		check(
			20,
			fc.property(fields, (input) => {
				const ledger = ledgerOf(input);
				input.layout.trackers.forEach((_, i) => {
					let sum = 0;
					for (let p = ledger.pairStart[i]; p < ledger.pairStart[i + 1]; p++) {
						const removal = removalOf(ledger, p);
						expect(removal).toBeGreaterThanOrEqual(0);
						expect(removal).toBeLessThanOrEqual(ledger.pairAlone[p] + 1e-12);
						sum += ledger.pairAlone[p];
					}
					expect(sum).toBeGreaterThanOrEqual(ledger.lost[i] - 1e-9);
				});
			})
		);
	});

	it('what a removal gives back is what the field without that tracker loses less, and never more shade', () => {
		check(
			12,
			fc.property(fields, (input) => {
				const ledger = ledgerOf(input);
				const gone = input.layout.trackers.length - 1;
				const fewer = {
					...input,
					layout: { ...input.layout, trackers: input.layout.trackers.slice(0, gone) }
				};
				const without = ledgerOf(fewer);
				for (let i = 0; i < gone; i++) {
					let removal = 0;
					for (let p = ledger.pairStart[i]; p < ledger.pairStart[i + 1]; p++) {
						if (ledger.pairBy[p] === gone) removal += removalOf(ledger, p);
					}
					expect(without.lost[i]).toBeLessThanOrEqual(ledger.lost[i] + 1e-9);
					expect(ledger.lost[i] - without.lost[i]).toBeCloseTo(removal, 8);
				}
			})
		);
	});

	it('names an obstacle, all its parts together', () => {
		const found = answersYear(
			runInput([testTracker(0, 0, 0)], { plot: testPlot({ obstacles: [tree, barn] }) })
		)!;
		const [tracker] = found.trackers;
		expect(tracker.takers.map((taker) => [taker.kind, taker.id]).sort()).toEqual([
			['obstacle', 'barn'],
			['obstacle', 'oak']
		]);
		expect(tracker.takers[0].removalLoss + tracker.takers[1].removalLoss).toBeCloseTo(tracker.beamLoss, 2);
		expect(tracker.takers.find((taker) => taker.id === 'barn')?.half).toBe('afternoon');
		expect(tracker.takers.find((taker) => taker.id === 'oak')?.half).toBe('morning');
	});

	it('tells nothing of a tracker that stands alone', () => {
		const found = answersYear(runInput([testTracker(0, 0, 0)]))!;
		expect(found.trackers[0]).toMatchObject({
			beamLoss: 0,
			takers: [],
			rest: null,
			clearAboveDeg: null,
			move: { bestAzimuthDeg: null, gainPerMetre: 0, smooth: true }
		});
		expect(found.field).toMatchObject({ beamLoss: 0, pairs: [], worst: [], clearAboveDeg: null });
		const { window } = found.field;
		expect(window!.toMs - window!.fromMs).toBeGreaterThan(8 * 3600000);
	});

	it('tells nothing of an empty layout', () => {
		const found = answersYear(runInput([]))!;
		expect(found.field).toMatchObject({ beamLoss: 0, window: null, clearAboveDeg: null });
		expect(JSON.stringify(found)).not.toContain('NaN');
	});
});

describe('which way to move', () => {
	it('the change by a step is that of the field with the tracker really there', () => {
		check(
			10,
			fc.property(fields, (input) => {
				const field = prepareField(input);
				const { suns } = answerSuns(field, input, 56);
				const range = { from: 0, to: input.layout.trackers.length };
				const ledger = lightLedger(field, suns, range, stepMoves(field))!;
				const changes = fieldChanges(ledger, WAYS);
				const total = (lost: Float64Array) => lost.reduce((sum, kwh) => sum + kwh, 0);
				const ways = [
					[MOVE_STEP_M, 0],
					[-MOVE_STEP_M, 0],
					[0, MOVE_STEP_M],
					[0, -MOVE_STEP_M]
				];
				const i = input.layout.trackers.length - 1;
				ways.forEach(([e, n], m) => {
					const trackers = input.layout.trackers.map((t, k) =>
						k === i ? { ...t, eastM: t.eastM + e, northM: t.northM + n } : t
					);
					const moved = lightLedger(
						prepareField({ ...input, layout: { ...input.layout, trackers } }),
						suns,
						range,
						noMoves
					)!;
					const off = changes[i * WAYS + m] - (total(moved.lost) - total(ledger.lost));
					// A table that stands still is grazed: then a thrower that crosses its plane counts, see `lightLedger`.
					const grazed = input.layout.trackers.some(({ posture }) => posture.kind === 'standing');
					expect(Math.abs(off)).toBeLessThan(grazed ? GRAZED_SHARE * total(ledger.without) : 1e-8);
				});
			})
		);
	});

	it('one metre the best way gains about what the derivative says, where it is smooth', () => {
		const found = answersYear(runInput(testGrid(4, 3, 13, 11)))!;
		expect(found.field.bestMoves.length).toBeGreaterThan(3);
		const gains = found.field.bestMoves.map(
			({ trackerId }) => found.trackers.find((each) => each.trackerId === trackerId)!.move.gainOfOneMetre!
		);
		expect(gains).toEqual([...gains].sort((a, b) => b - a));
		for (const { trackerId } of found.field.bestMoves) {
			const { move } = found.trackers.find((tracker) => tracker.trackerId === trackerId)!;
			expect(move.gainOfOneMetre).toBeGreaterThan(0);
			if (move.smooth) expect(Math.abs(move.gainOfOneMetre! / move.gainPerMetre - 1)).toBeLessThan(0.5);
		}
	});

	it('two in an east-west line part along it, and what is in the way is named', () => {
		const boundary: Plot['boundary'] = [
			{
				outer: [
					[-60, -60],
					[17.2, -60],
					[17.2, 60],
					[-60, 60]
				],
				holes: []
			}
		];
		const input = runInput([testTracker(0, 0, 0), testTracker(1, 13, 0)], { plot: testPlot({ boundary }) });
		const [west, east] = answersYear(input)!.trackers;
		expect(Math.abs(west.move.bestAzimuthDeg! - 270)).toBeLessThan(3);
		expect(Math.abs(east.move.bestAzimuthDeg! - 90)).toBeLessThan(3);
		expect(west.move.blockedBy).toBeNull();
		expect(east.move.blockedBy).toMatchObject({ kind: 'boundary' });
	});
});

describe('heights and windows', () => {
	const input = runInput(testGrid(3, 3, 12, 9));
	const found = answersYear(input)!;

	it('nothing is shaded above the clear height, and something just below it', () => {
		const { engine } = prepareField(input);
		const { clearAboveDeg, clearAtAzimuthDeg, clearProfile } = found.field;
		expect(clearAboveDeg).toBe(Math.max(...clearProfile.map((point) => point.elevationDeg)));
		const shadedAt = (elevationDeg: number) => {
			engine.setSun(clearAtAzimuthDeg!, elevationDeg);
			return Array.from({ length: engine.count }, (_, i) => engine.share(i)).some((share) => share > 0.001);
		};
		expect(shadedAt(clearAboveDeg! + 0.01)).toBe(false);
		expect(shadedAt(clearAboveDeg! - 0.02)).toBe(true);
		const heights = found.trackers.map((tracker) => tracker.clearAboveDeg!);
		expect(Math.max(...heights)).toBeCloseTo(clearAboveDeg!, 1);
	});

	it('a sector of a tracker is never below what the tracker needs there', () => {
		for (const tracker of found.trackers) {
			if (tracker.clearAboveDeg === null) continue;
			const sector = tracker.clearBySectorDeg[Math.floor(tracker.clearAtAzimuthDeg! / 30)];
			expect(sector).toBeGreaterThanOrEqual(tracker.clearAboveDeg);
		}
	});

	it('the field has its window inside that of each tracker that shares it, around noon', () => {
		const pair = answersYear(runInput([testTracker(0, 0, 0), testTracker(1, 14, 0)]))!;
		const { window } = pair.field;
		expect(window!.fromSolarHour).toBeGreaterThan(7);
		expect(window!.toSolarHour).toBeLessThan(17);
		for (const tracker of pair.trackers) {
			expect(tracker.window!.fromMs).toBeLessThanOrEqual(window!.fromMs);
			expect(tracker.window!.toMs).toBeGreaterThanOrEqual(window!.toMs);
		}
		// Two alike on level ground shade each other alike, morning and evening: within a minute of mirror hours.
		expect(window!.fromSolarHour + window!.toSolarHour).toBeCloseTo(24, 1);
	});

	it('the polar night has no window', () => {
		const polar = runInput(testGrid(2, 1, 13, 10), { place: { ...testPlace, latitudeDeg: 75 } });
		expect(answersYear(polar)!.field.window).toBeNull();
	});
});

describe('the whole', () => {
	it('a field mirrored east-west has mirrored answers', () => {
		const trackers = [testTracker(0, 0, 0), testTracker(1, 13, 2), testTracker(2, -4, 12)];
		const mirrored = trackers.map((tracker) => ({ ...tracker, eastM: -tracker.eastM }));
		const a = answersYear(runInput(trackers))!;
		const b = answersYear(runInput(mirrored))!;
		a.trackers.forEach((tracker, i) => {
			const other = b.trackers[i];
			// Morning and evening suns of a day are no exact mirrors: the sun's declination moves on.
			expect(other.beamLoss).toBeCloseTo(tracker.beamLoss, 4);
			expect(other.move.lossPerMetreEast).toBeCloseTo(-tracker.move.lossPerMetreEast, 4);
			expect(other.move.lossPerMetreNorth).toBeCloseTo(tracker.move.lossPerMetreNorth, 4);
			expect(other.clearAboveDeg).toBeCloseTo(tracker.clearAboveDeg!, 1);
			expect(other.takers[0]?.id).toBe(tracker.takers[0]?.id);
			expect(other.takers[0]?.half).not.toBe(tracker.takers[0]?.half);
		});
	});

	it('same inputs, same bytes, in one part or many', () => {
		const stops = { fromDeg: 110, toDeg: 250 };
		const plot = testPlot({
			obstacles: [tree, barn],
			ground: { kind: 'plane', heightM: 0, risePercent: 4, riseTowardsDeg: 70 }
		});
		for (const models of [[testModel()], [testModel({ stops })]]) {
			const input = runInput(testGrid(6, 4, 12.3, 10.1), { plot, stepMinutes: 30 }, { models });
			const whole = JSON.stringify(answersYear(input));
			for (const parts of [2, 3, 7]) {
				const n = input.layout.trackers.length;
				const ranges = Array.from({ length: parts }, (_, k) => ({
					from: Math.floor((k * n) / parts),
					to: Math.floor(((k + 1) * n) / parts)
				}));
				const found = ranges.map((range) => answersPart(input, undefined, range)!);
				expect(JSON.stringify(joinAnswers(input, found))).toBe(whole);
			}
		}
	}, 60_000);

	it('the highest sun stands at noon of the longest day, overhead between the tropics', () => {
		// 90 - 45 + 23.44, and 0.4 arc minutes of refraction.
		expect(highestSunDeg(45)).toBeCloseTo(68.446, 2);
		expect(highestSunDeg(-45)).toBe(highestSunDeg(45));
		expect(highestSunDeg(10)).toBe(90);
	});

	it('one day in seven is within 0.01 points of every day', () => {
		const input = runInput(testGrid(4, 3, 13, 11), { stepMinutes: 10 });
		const sampled = answersYear(input)!;
		const every = answersYear(input, undefined, { everyDays: 1 })!;
		expect(every.model.days).toBe(365);
		expect(Math.abs(sampled.field.beamLoss - every.field.beamLoss)).toBeLessThan(1e-4);
	});

	it('one day in seven tells losses within 3 % of themselves where trees shed leaves', () => {
		const oaks = [-8, 6, 20].map((eastM, k): Plot['obstacles'][number] => ({
			...tree,
			id: `oak${k}`,
			eastM,
			northM: -9,
			crownTransmission: 0.7,
			leafTransmission: 0.05,
			leafDays: [100, 305]
		}));
		const input = runInput(testGrid(3, 2, 13, 11), { plot: testPlot({ obstacles: oaks }), stepMinutes: 20 });
		const sampled = answersYear(input)!;
		const every = answersYear(input, undefined, { everyDays: 1 })!;
		expect(every.field.beamLoss).toBeGreaterThan(0.01);
		expect(Math.abs(sampled.field.beamLoss - every.field.beamLoss)).toBeLessThan(0.03 * every.field.beamLoss);
		sampled.trackers.forEach(({ beamLoss }, i) =>
			expect(Math.abs(beamLoss - every.trackers[i].beamLoss)).toBeLessThan(0.03 * every.trackers[i].beamLoss)
		);
	});

	it('can be stopped, and tells how far it is', () => {
		const heard: number[] = [];
		const input = runInput(testGrid(3, 2, 13, 11));
		expect(answersYear(input, (done) => heard.push(done) < 30)).toBeNull();
		expect(heard).toHaveLength(30);
		expect([...heard].sort((a, b) => a - b)).toEqual(heard);
	});
});
