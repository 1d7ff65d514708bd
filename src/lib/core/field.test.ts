import fc from 'fast-check';
import { describe, expect, it, vi } from 'vitest';
import { fieldLitPieces, fieldShade, moveTracker, prepareField, trackerPoses } from './field';
import type { Plot, Tracker } from './document';
import { testGrid, testLayout, testModel, testPlace, testPlot, testTracker } from './test-field';

// Shrinking a failure takes long: a loaded machine must not cut it off.
vi.setConfig({ testTimeout: 60000 });

// Every random test here prints its seed when it fails; the seed below makes runs repeatable.
const random = { seed: 20261201, numRuns: 60 };

const sunArbitrary = fc.record({
	azimuthDeg: fc.double({ min: 0, max: 360, noNaN: true }),
	elevationDeg: fc.double({ min: 0.5, max: 75, noNaN: true })
});
// One tracker at most in each cell of 8 m and whole degrees: tables that coincide within the engine's 1e-7 m belong to no field.
const trackersArbitrary = fc
	.uniqueArray(
		fc.record({
			column: fc.integer({ min: 0, max: 7 }),
			row: fc.integer({ min: 0, max: 7 }),
			eastM: fc.double({ min: 0, max: 4, noNaN: true }),
			northM: fc.double({ min: 0, max: 4, noNaN: true }),
			kind: fc.constantFrom('following', 'flat', 'standing'),
			azimuthDeg: fc.integer({ min: 0, max: 359 }),
			tiltDeg: fc.integer({ min: 0, max: 85 })
		}),
		{ minLength: 2, maxLength: 14, selector: (t) => t.column * 8 + t.row }
	)
	.map((list) =>
		list.map((t, k) =>
			testTracker(k, 8 * t.column + t.eastM, 8 * t.row + t.northM, {
				posture:
					t.kind === 'standing'
						? { kind: 'standing', azimuthDeg: t.azimuthDeg, tiltDeg: t.tiltDeg }
						: { kind: t.kind as 'following' | 'flat' }
			})
		)
	);

const fieldOf = (trackers: Tracker[], plot: Plot = testPlot()) =>
	prepareField({ place: testPlace, plot, layout: testLayout(trackers) });

const turned = (eastM: number, northM: number, deg: number): [number, number] => {
	const r = (deg * Math.PI) / 180;
	return [eastM * Math.cos(r) + northM * Math.sin(r), -eastM * Math.sin(r) + northM * Math.cos(r)];
};

describe('what must hold for any field', () => {
	it('turning, shifting and raising field and sky together changes no share', () => {
		fc.assert(
			fc.property(
				trackersArbitrary,
				sunArbitrary,
				fc.double({ min: 0, max: 360, noNaN: true }),
				(trackers, sun, turn) => {
					const before = fieldShade(fieldOf(trackers), sun);
					const moved = trackers.map((t): Tracker => {
						const [eastM, northM] = turned(t.eastM, t.northM, turn);
						const posture =
							t.posture.kind === 'standing'
								? { ...t.posture, azimuthDeg: t.posture.azimuthDeg + turn }
								: t.posture;
						return { ...t, eastM: eastM + 300, northM: northM - 170, posture };
					});
					const plot = testPlot({ ground: { kind: 'level', heightM: 55 } });
					const after = fieldShade(fieldOf(moved, plot), {
						azimuthDeg: (sun.azimuthDeg + turn) % 360,
						elevationDeg: sun.elevationDeg
					});
					before.forEach((share, i) => expect(after[i]).toBeCloseTo(share, 6));
				}
			),
			random
		);
	});

	it('scaling all lengths changes no share', () => {
		fc.assert(
			fc.property(
				trackersArbitrary,
				sunArbitrary,
				fc.double({ min: 0.2, max: 5, noNaN: true }),
				(trackers, sun, k) => {
					const before = fieldShade(fieldOf(trackers), sun);
					const model = testModel({ widthM: 6 * k, heightM: 4 * k, axisHeightM: 3 * k });
					const scaled = trackers.map((t) => ({ ...t, eastM: t.eastM * k, northM: t.northM * k }));
					const field = prepareField({
						place: testPlace,
						plot: testPlot(),
						layout: testLayout(scaled, [model])
					});
					fieldShade(field, sun).forEach((share, i) => expect(share).toBeCloseTo(before[i], 6));
				}
			),
			random
		);
	});

	it('mirroring field and sun east to west changes no share', () => {
		fc.assert(
			fc.property(trackersArbitrary, sunArbitrary, (trackers, sun) => {
				const before = fieldShade(fieldOf(trackers), sun);
				const mirrored = trackers.map((t): Tracker => ({
					...t,
					eastM: -t.eastM,
					posture:
						t.posture.kind === 'standing'
							? { ...t.posture, azimuthDeg: 360 - t.posture.azimuthDeg }
							: t.posture
				}));
				const after = fieldShade(fieldOf(mirrored), { ...sun, azimuthDeg: 360 - sun.azimuthDeg });
				before.forEach((share, i) => expect(after[i]).toBeCloseTo(share, 6));
			}),
			random
		);
	});

	it('taking a neighbour away never adds shade', () => {
		fc.assert(
			fc.property(trackersArbitrary, sunArbitrary, (trackers, sun) => {
				const before = fieldShade(fieldOf(trackers), sun);
				const after = fieldShade(fieldOf(trackers.slice(1)), sun);
				after.forEach((share, i) => expect(share).toBeLessThanOrEqual(before[i + 1] + 1e-9));
			}),
			random
		);
	});

	it('the lit pieces and the shaded share make up the whole table', () => {
		fc.assert(
			fc.property(trackersArbitrary, sunArbitrary, (trackers, sun) => {
				const field = fieldOf(trackers);
				const shares = fieldShade(field, sun);
				fieldLitPieces(field, sun).forEach((pieces, i) => {
					let lit = 0;
					for (const p of pieces) {
						for (let k = 0, j = p.length - 2; k < p.length; j = k, k += 2) {
							lit += (p[j] * p[k + 1] - p[k] * p[j + 1]) / 2;
						}
					}
					expect(lit / 24 + shares[i]).toBeCloseTo(1, 8);
				});
			}),
			random
		);
	});

	it('all flat on level ground: nobody shades anybody', () => {
		fc.assert(
			fc.property(sunArbitrary, (sun) => {
				const trackers = testGrid(4, 4, 7, 5).map((t): Tracker => ({ ...t, posture: { kind: 'flat' } }));
				expect([...fieldShade(fieldOf(trackers), sun)].every((share) => share === 0)).toBe(true);
			}),
			random
		);
	});
});

describe('single cases', () => {
	it('a tracker alone is never shaded', () => {
		const field = fieldOf([testTracker(0, 0, 0)]);
		for (let e = 0.1; e < 90; e += 7)
			expect(fieldShade(field, { azimuthDeg: 133, elevationDeg: e })[0]).toBe(0);
	});

	it('an overhead sun gives no NaN', () => {
		const field = fieldOf(testGrid(3, 3, 9, 9));
		for (const share of fieldShade(field, { azimuthDeg: 0, elevationDeg: 90 })) expect(share).toBe(0);
	});

	it('a moved tracker gives the same shares as preparing the field anew', () => {
		const trackers = testGrid(4, 3, 10, 9);
		const sun = { azimuthDeg: 140, elevationDeg: 9 };
		const plot = testPlot({
			ground: { kind: 'plane', heightM: 2, risePercent: 8, riseTowardsDeg: 90 }
		});
		const moved = moveTracker(fieldOf(trackers, plot), 5, 13.3, 8.1);
		const anew = fieldOf(
			trackers.map((t, i) => (i === 5 ? { ...t, eastM: 13.3, northM: 8.1 } : t)),
			plot
		);
		expect([...fieldShade(moved, sun)]).toEqual([...fieldShade(anew, sun)]);
		expect(trackerPoses(moved, sun)[5].centre).toEqual(trackerPoses(anew, sun)[5].centre);
	});

	it('the clear slot in the middle lets light through and is not counted as glass', () => {
		const model = testModel({ centreGapM: 1 });
		// The second stands right behind the first and 3 m to the side: the first one's slot meets its left half.
		const trackers = [testTracker(0, 0, 0), testTracker(1, 1.5, 20)];
		const field = prepareField({ place: testPlace, plot: testPlot(), layout: testLayout(trackers, [model]) });
		const sun = { azimuthDeg: 180, elevationDeg: 0.001 };
		// Glass of the second: -3..-0.5 and 0.5..3; shadows: -4.5..-2 and -1..1.5; lit: -2..-1 and 1.5..3 of 5 m.
		expect(fieldShade(field, sun)[1]).toBeCloseTo(1 - 2.5 / 5, 3);
	});

	it('the frame margin throws shadow but takes none', () => {
		const model = testModel({ frameMarginM: 0.5 });
		const trackers = [testTracker(0, 0, 0), testTracker(1, 4, 20)];
		const field = prepareField({ place: testPlace, plot: testPlot(), layout: testLayout(trackers, [model]) });
		// Overlap across: -4+3.5 = -0.5, so the glass from -3 to -0.5 of 6 m.
		expect(fieldShade(field, { azimuthDeg: 180, elevationDeg: 0.001 })[1]).toBeCloseTo(2.5 / 6, 3);
	});

	it('offsets from the axes shift all alike tables equally and change nothing', () => {
		const sun = { azimuthDeg: 150, elevationDeg: 11 };
		const plain = fieldShade(fieldOf(testGrid(4, 4, 11, 9)), sun);
		const model = testModel({ tiltAxisOffsetM: 0.4, tableOffsetM: 0.3, centreShiftM: 0.2 });
		const field = prepareField({
			place: testPlace,
			plot: testPlot(),
			layout: testLayout(testGrid(4, 4, 11, 9), [model])
		});
		fieldShade(field, sun).forEach((share, i) => expect(share).toBeCloseTo(plain[i], 9));
	});

	it('a crown lets its part of the beam through, a growing tree reaches higher', () => {
		const tree = {
			id: 'o',
			kind: 'tree' as const,
			name: 'Oak',
			eastM: 0,
			northM: -20,
			heightM: 12,
			crownBaseM: 0,
			crownRadiusM: 10,
			trunkRadiusM: 0,
			crownTransmission: 0.4,
			growthMPerYear: 1,
			maxHeightM: 14
		};
		const at = (elevationDeg: number, treeYears: number) =>
			fieldShade(
				prepareField({
					place: testPlace,
					plot: testPlot({ obstacles: [tree] }),
					layout: testLayout([testTracker(0, 0, 0)]),
					treeYears
				}),
				{ azimuthDeg: 180, elevationDeg }
			)[0];
		expect(at(5, 0)).toBeCloseTo(0.6, 9);
		expect(at(45, 0)).toBeLessThan(at(45, 2));
		expect(at(45, 2)).toBe(at(45, 50));
	});

	it('a sun behind the skyline leaves every table without light', () => {
		const plot = testPlot({
			skyline: [
				{ azimuthDeg: 350, elevationDeg: 8 },
				{ azimuthDeg: 10, elevationDeg: 12 }
			]
		});
		const field = fieldOf([testTracker(0, 0, 0)], plot);
		expect(fieldShade(field, { azimuthDeg: 0, elevationDeg: 9.9 })[0]).toBe(1);
		expect(fieldShade(field, { azimuthDeg: 0, elevationDeg: 10.1 })[0]).toBe(0);
	});

	it('two at 12 m north to south at 38 north, 4 m high: no shade at solar noon on any day', () => {
		const field = fieldOf([testTracker(0, 0, 0), testTracker(1, 0, 12)]);
		// Noon heights at 38 north run from 28.5 to 75.5 degrees.
		for (let e = 28.5; e <= 75.5; e += 0.5) {
			expect(fieldShade(field, { azimuthDeg: 180, elevationDeg: e })[1]).toBe(0);
		}
	});
});
