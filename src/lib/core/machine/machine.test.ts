import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { arcDeg, tableAxes, turnBetweenDeg } from '../conventions';
import type { Posture } from '../document';
import { testModel } from '../test-field';
import { aimOf, arcContains, followAim } from './aim';
import { moduleGrid } from './modules';
import { poseOf } from './pose';
import { HEAD_OUT_M, leastPitchM, lowestCornerM, reachRadiusM } from './reach';
import { azimuthTravelDeg, slewSeconds } from './slew';
import { mountPlaces } from '../mount/places';

describe('axes of a table', () => {
	it('facing south, u is east and v points north and up', () => {
		const { u, v, n } = tableAxes(180, 40);
		expect(u[0]).toBeCloseTo(1, 12);
		expect(v[1]).toBeGreaterThan(0.7);
		expect(v[2]).toBeGreaterThan(0.6);
		expect(n[1]).toBeLessThan(0);
	});
});

describe('stops and tilt range', () => {
	it('an arc from 240 to 120 contains 350, 0 and 10 and not 180', () => {
		const arc = { fromDeg: 240, toDeg: 120 };
		expect([350, 0, 10].every((a) => arcContains(arc, a))).toBe(true);
		expect(arcContains(arc, 180)).toBe(false);
	});

	it('follows freely inside its limits', () => {
		expect(followAim(testModel(), { azimuthDeg: 123, elevationDeg: 30 })).toEqual({
			azimuthDeg: 123,
			tiltDeg: 60
		});
	});

	it('takes the nearest reachable direction at a stop: no other reachable one is nearer in angle', () => {
		const model = { minTiltDeg: 5, maxTiltDeg: 85, stops: { fromDeg: 110, toDeg: 250 } };
		const cosine = (
			azimuthDeg: number,
			tiltDeg: number,
			sun: { azimuthDeg: number; elevationDeg: number }
		) => {
			const { n } = tableAxes(azimuthDeg, tiltDeg);
			const s = tableAxes(sun.azimuthDeg, 90 - sun.elevationDeg).n;
			return n[0] * s[0] + n[1] * s[1] + n[2] * s[2];
		};
		for (const sun of [
			{ azimuthDeg: 70, elevationDeg: 9 },
			{ azimuthDeg: 300, elevationDeg: 25 },
			{ azimuthDeg: 5, elevationDeg: 60 }
		]) {
			const aim = followAim(model, sun);
			const ours = cosine(aim.azimuthDeg, aim.tiltDeg, sun);
			for (let a = 110; a <= 250; a += 5) {
				for (let t = 5; t <= 85; t += 2.5) expect(cosine(a, t, sun)).toBeLessThanOrEqual(ours + 1e-9);
			}
		}
	});

	it('rests at night once the sun is down', () => {
		const model = testModel({ night: { azimuthDeg: 90, tiltDeg: 30 } });
		expect(aimOf(model, { kind: 'following' }, { azimuthDeg: 280, elevationDeg: -5 })).toEqual({
			azimuthDeg: 90,
			tiltDeg: 30
		});
	});
});

describe('pose and reach', () => {
	it('puts the middle of the glass ahead of the pole by its offsets', () => {
		const model = testModel({ tiltAxisOffsetM: 0.5, tableOffsetM: 0.3, centreShiftM: 0.1 });
		const upright = poseOf(
			model,
			null,
			10,
			20,
			1,
			{ kind: 'standing', azimuthDeg: 180, tiltDeg: 90 },
			{
				azimuthDeg: 0,
				elevationDeg: 10
			}
		);
		expect(upright.centre[0]).toBeCloseTo(10, 9);
		expect(upright.centre[1]).toBeCloseTo(20 - 0.8, 9);
		expect(upright.centre[2]).toBeCloseTo(1 + 3 + 0.1, 9);
	});

	it('a 6 x 4 m table on one axis reaches the corner of the flat table', () => {
		expect(reachRadiusM(testModel())).toBeCloseTo(Math.hypot(3, 2), 12);
		expect(leastPitchM(testModel(), 0.6)).toBeCloseTo(2 * Math.hypot(3, 2) + 0.6, 12);
	});

	it('no posture puts a corner of the steel outside the reach circle or below the lowest corner', () => {
		const model = testModel({
			frameMarginM: 0.1,
			tiltAxisOffsetM: 0.4,
			tableOffsetM: 0.3,
			centreShiftM: -0.2,
			maxTiltDeg: 85
		});
		const reach = reachRadiusM(model);
		const lowest = lowestCornerM(model);
		let farthest = 0;
		let least = Infinity;
		for (let t = 0; t <= 85; t += 0.25) {
			const pose = poseOf(
				model,
				null,
				0,
				0,
				0,
				{ kind: 'standing', azimuthDeg: 0, tiltDeg: t },
				{
					azimuthDeg: 0,
					elevationDeg: 10
				}
			);
			const { u, v } = tableAxes(0, t);
			for (const x of [-3.1, 3.1]) {
				for (const y of [-2.1, 2.1]) {
					const corner = [0, 1, 2].map((c) => pose.centre[c] + x * u[c] + y * v[c]);
					farthest = Math.max(farthest, Math.hypot(corner[0], corner[1]));
					least = Math.min(least, corner[2]);
				}
			}
		}
		expect(farthest).toBeLessThanOrEqual(reach + 1e-9);
		expect(farthest).toBeGreaterThan(reach - 0.001);
		expect(least).toBeGreaterThanOrEqual(lowest - 1e-9);
		expect(least).toBeLessThan(lowest + 0.001);
	});

	it('ground that rises takes clearance from the uphill corner', () => {
		expect(lowestCornerM(testModel(), null, 0.1)).toBeLessThan(lowestCornerM(testModel()) - 0.2);
	});
});

describe('whatever the machine', () => {
	const angle = fc.double({ min: 0, max: 360, noNaN: true });
	const machine = fc
		.record({
			widthM: fc.double({ min: 1, max: 12, noNaN: true }),
			heightM: fc.double({ min: 1, max: 8, noNaN: true }),
			frameMarginM: fc.double({ min: 0, max: 0.3, noNaN: true }),
			tiltAxisOffsetM: fc.double({ min: -1, max: 1, noNaN: true }),
			tableOffsetM: fc.double({ min: -1, max: 1, noNaN: true }),
			centreShiftM: fc.double({ min: -1, max: 1, noNaN: true }),
			minTiltDeg: fc.double({ min: 0, max: 40, noNaN: true }),
			maxTiltDeg: fc.double({ min: 50, max: 90, noNaN: true }),
			windTiltDeg: fc.double({ min: 0, max: 90, noNaN: true }),
			stops: fc.option(fc.record({ fromDeg: angle, toDeg: angle })),
			sensorHeadRadiusM: fc.double({ min: 0.01, max: 0.1, noNaN: true })
		})
		.map((changes) => testModel(changes));
	const sky = fc.record({ azimuthDeg: angle, elevationDeg: fc.double({ min: -20, max: 90, noNaN: true }) });
	const standing = fc.record({
		kind: fc.constant('standing' as const),
		azimuthDeg: angle,
		tiltDeg: fc.double({ min: 0, max: 90, noNaN: true })
	});
	const posture = fc.oneof(
		fc.constantFrom('following', 'flat', 'night', 'wind').map((kind) => ({ kind }) as Posture),
		standing
	);

	it('no posture puts steel or a sensor head outside the reach circle, or a corner below the lowest', () => {
		fc.assert(
			fc.property(machine, posture, sky, (model, pose, sun) => {
				const at = poseOf(model, null, 0, 0, 0, pose, sun);
				const { u, v } = tableAxes(at.azimuthDeg, at.tiltDeg);
				const place = (x: number, y: number) => [0, 1, 2].map((c) => at.centre[c] + x * u[c] + y * v[c]);
				const reach = reachRadiusM(model, pose);
				const lowest = lowestCornerM(model, null, 0, pose);
				for (const sx of [-1, 1])
					for (const sy of [-1, 1]) {
						const corner = place(
							sx * (model.widthM / 2 + model.frameMarginM),
							sy * (model.heightM / 2 + model.frameMarginM)
						);
						expect(Math.hypot(corner[0], corner[1])).toBeLessThanOrEqual(reach + 1e-9);
						expect(corner[2]).toBeGreaterThanOrEqual(lowest - 1e-9);
					}
				const { xs, ys } = mountPlaces(model, { spacingM: 0.5, outM: HEAD_OUT_M, forwardM: 0 });
				xs.forEach((x, k) => {
					const onSide = Math.abs(x) > model.widthM / 2;
					const r = model.sensorHeadRadiusM;
					const [e, n] = onSide ? place(x + Math.sign(x) * r, ys[k]) : place(x, ys[k] + Math.sign(ys[k]) * r);
					expect(Math.hypot(e, n)).toBeLessThanOrEqual(reach + 1e-9);
				});
			}),
			{ numRuns: 300 }
		);
	});

	it('every aim is finite and reachable, under an overhead sun as well', () => {
		const high = fc.record({
			azimuthDeg: angle,
			elevationDeg: fc.constantFrom(90, 89.9999999, 90 - 1e-12, 60)
		});
		fc.assert(
			fc.property(machine, fc.oneof(sky, high), (model, sun) => {
				const aim = aimOf(model, { kind: 'following' }, sun);
				expect(Number.isFinite(aim.azimuthDeg + aim.tiltDeg)).toBe(true);
				if (sun.elevationDeg <= 0) return;
				expect(aim.tiltDeg).toBeGreaterThanOrEqual(model.minTiltDeg);
				expect(aim.tiltDeg).toBeLessThanOrEqual(model.maxTiltDeg);
				if (model.stops) {
					const { fromDeg, toDeg } = model.stops;
					const near = [fromDeg, toDeg].some((stop) => turnBetweenDeg(stop, aim.azimuthDeg) < 1e-9);
					expect(near || arcContains(model.stops, aim.azimuthDeg)).toBe(true);
				}
				// With the sun overhead the table misses it by no more than its smallest tilt.
				if (sun.elevationDeg > 89.999) {
					const off = arcDeg(sun, { azimuthDeg: aim.azimuthDeg, elevationDeg: 90 - aim.tiltDeg });
					expect(off).toBeLessThanOrEqual(model.minTiltDeg + 1e-3);
				}
			}),
			{ numRuns: 500 }
		);
	});

	it('turns along its sweep and never through the barred sector', () => {
		const north = { stops: { fromDeg: 240, toDeg: 120 } };
		expect(azimuthTravelDeg(north, 350, 10)).toBe(20);
		expect(azimuthTravelDeg(north, 100, 260)).toBe(-200);
		expect(azimuthTravelDeg({ stops: { fromDeg: 50, toDeg: 310 } }, 300, 60)).toBe(-240);
		expect(azimuthTravelDeg({ stops: null }, 350, 10)).toBe(20);
		expect(azimuthTravelDeg({ stops: null }, 10, 350)).toBe(-20);
		// A stop itself, taken from the other side of the barred sector.
		expect(azimuthTravelDeg({ stops: { fromDeg: 50, toDeg: 310 } }, 310, 49)).toBe(-260);
		const drive = { stops: null, slewDegPerS: 0.5 };
		const [low, high] = [
			{ azimuthDeg: 100, tiltDeg: 80 },
			{ azimuthDeg: 120, tiltDeg: 20 }
		];
		expect(slewSeconds(drive, low, high)).toBe(120);
		expect(slewSeconds({ ...drive, tiltSlewDegPerS: 2 }, low, high)).toBe(40);
	});
});

describe('modules of a table', () => {
	it('are read from the grid and the glass where the model is silent', () => {
		const model = testModel({ widthM: 6.2, heightM: 4, centreGapM: 0.2, moduleColumns: 3, moduleRows: 4 });
		expect(moduleGrid(model)).toEqual({
			columns: 3,
			rows: 4,
			orientation: 'landscape',
			groupsPerModule: 3,
			modulesPerString: 12,
			moduleWidthM: 2,
			moduleHeightM: 1
		});
		const said = {
			...model,
			moduleOrientation: 'portrait' as const,
			groupsPerModule: 2,
			modulesPerString: 6
		};
		expect(moduleGrid(said)).toMatchObject({
			orientation: 'portrait',
			groupsPerModule: 2,
			modulesPerString: 6
		});
	});
});
