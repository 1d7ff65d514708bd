import { describe, expect, it } from 'vitest';
import { tableAxes } from '../conventions';
import { testModel } from '../test-field';
import { aimOf, arcContains, followAim } from './aim';
import { poseOf } from './pose';
import { leastPitchM, lowestCornerM, reachRadiusM } from './reach';

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
