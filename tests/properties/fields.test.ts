/** What must hold for fields of trackers: followers on level ground, on a rise, flat, between their stops. */
import fc from 'fast-check';
import { describe, expect, it, vi } from 'vitest';
import {
	arcContains,
	fieldLoss,
	fieldShade,
	followAim,
	mountScene,
	normaliseDeg,
	prepareField,
	sunDay,
	sunPosition,
	tableAxes,
	sunVector,
	trackerPoses,
	type Ground,
	type SunDirection,
	type Tracker,
	type TrackerModel
} from '../../src/lib/core';
import { testLayout, testModel, testPlace, testPlot, testTracker } from '../../src/lib/core/test-field';
import { holds } from './scenes';

// Long only on a machine that is busy with other things.
vi.setConfig({ testTimeout: 300_000 });

const between = (min: number, max: number) => fc.double({ min, max, noNaN: true });
const suns = fc.record({ azimuthDeg: between(0, 359.9), elevationDeg: between(0.01, 89.9) });
const level: Ground = { kind: 'level', heightM: 0 };

/** Places that keep their distance, as machines do. */
const places = fc
	.array(fc.tuple(between(-40, 40), between(-40, 40)), { minLength: 2, maxLength: 12 })
	.map((all) =>
		all.filter(
			([e, n], k) => !all.slice(0, k).some(([otherE, otherN]) => Math.hypot(e - otherE, n - otherN) < 8)
		)
	)
	.filter((all) => all.length > 1);

const machines = fc
	.record({
		widthM: between(2, 8),
		heightM: between(2, 6),
		tableOffsetM: between(0, 0.5),
		centreShiftM: between(-0.5, 0.5),
		tiltAxisOffsetM: between(0, 0.5)
	})
	.map((changes) => testModel(changes));

function fieldOf(
	at: readonly (readonly [number, number])[],
	model: TrackerModel,
	ground: Ground = level,
	posture: Tracker['posture'] = { kind: 'following' }
) {
	return prepareField({
		place: testPlace,
		plot: testPlot({ ground }),
		layout: testLayout(
			at.map(([east, north], k) => testTracker(k, east, north, { posture })),
			[model]
		)
	});
}

/** Whether the middle of the top edge of tracker `index` sees the sun, by a ray. */
function topMarks(field: ReturnType<typeof fieldOf>, index: number, sun: SunDirection): string {
	const poses = trackerPoses(field, sun);
	const [marks] = mountScene({
		tables: poses.map(({ centre, widthM, heightM }, k) => ({
			id: `${k}`,
			eastM: centre[0],
			northM: centre[1],
			upM: centre[2],
			widthM,
			heightM
		})),
		target: `${index}`,
		obstacles: [],
		points: { count: 5, insetM: 0, forwardM: 0, edges: ['top'] },
		steps: [{ sun, poses }]
	});
	return marks.top ?? '';
}

describe('fields of trackers', () => {
	it('a tracker alone loses nothing, at any sun and over the year', () => {
		holds(
			fc.property(machines, suns, (model, sun) => {
				expect([...fieldShade(fieldOf([[0, 0]], model), sun)]).toEqual([0]);
			})
		);
		const { trackers } = fieldLoss({
			latitudeDeg: 45,
			longitudeDeg: 0,
			year: 2025,
			stepMinutes: 20,
			model: { widthM: 6, heightM: 4 },
			trackers: [{ id: 'a', eastM: 0, northM: 0, upM: 0 }]
		});
		expect(trackers[0].beamLoss).toBe(0);
	});

	it('all flat on level ground throw no shade', () => {
		holds(
			fc.property(places, machines, suns, (at, model, sun) => {
				const flat = fieldOf(at, model, level, { kind: 'flat' });
				for (const share of fieldShade(flat, sun)) expect(share).toBe(0);
			})
		);
	});

	it('all following on level ground never shade a top edge', () => {
		holds(
			fc.property(places, machines, suns, (at, model, sun) => {
				const field = fieldOf(at, model);
				at.forEach((_, index) => expect(topMarks(field, index, sun)).toBe('00000'));
			})
		);
	});

	it('on a uniform rise g towards the sun a top sensor is shaded if and only if tan e < g', () => {
		let shaded = 0;
		let clear = 0;
		holds(
			fc.property(
				between(1, 25),
				between(0.2, 20),
				between(0, 359),
				(risePercent, elevationDeg, azimuthDeg) => {
					const gradient = risePercent / 100;
					const tangent = Math.tan((elevationDeg * Math.PI) / 180);
					// On the very line both answers are right.
					fc.pre(Math.abs(tangent - gradient) > 1e-6);
					// Rows close enough for each to stand less than a table's height above the last.
					const distance = Math.min(12, 3.5 / gradient);
					const t = (azimuthDeg * Math.PI) / 180;
					const row = Array.from({ length: 12 }, (_, k): [number, number] => [
						k * distance * Math.sin(t),
						k * distance * Math.cos(t)
					]);
					const field = fieldOf(row, testModel(), {
						kind: 'plane',
						heightM: 0,
						risePercent,
						riseTowardsDeg: azimuthDeg
					});
					const mark = topMarks(field, 0, { azimuthDeg, elevationDeg })[2];
					expect(mark).toBe(tangent < gradient ? '1' : '0');
					if (mark === '1') shaded++;
					else clear++;
				}
			)
		);
		expect(Math.min(shaded, clear)).toBeGreaterThan(50);
	});

	it('two at 12 m north-south at 38 N with 4 m tables have no noon shade all year', () => {
		const place = { latitudeDeg: 38, longitudeDeg: 0 };
		const field = fieldOf(
			[
				[0, 0],
				[0, 12]
			],
			testModel({ heightM: 4 })
		);
		for (let day = 0; day < 365; day++) {
			const date = new Date(Date.UTC(2025, 0, 1 + day)).toISOString().slice(0, 10);
			const { transitMs } = sunDay(date, place, 0);
			const { azimuthDeg, apparentElevationDeg } = sunPosition(transitMs, 38, 0);
			const noon = { azimuthDeg, elevationDeg: apparentElevationDeg };
			expect([...fieldShade(field, noon)], date).toEqual([0, 0]);
		}
		// The same field does know shade, and a pitch of 8 m loses the winter noon.
		expect(fieldShade(field, { azimuthDeg: 180, elevationDeg: 15 })[1]).toBeGreaterThan(0.1);
	});
});

describe('stops', () => {
	it('an arc from 240 to 120 runs through north: it holds 350, 0 and 10 and not 180', () => {
		const arc = { fromDeg: 240, toDeg: 120 };
		expect([350, 0, 10, 240, 120].map((azimuth) => arcContains(arc, azimuth))).toEqual(Array(5).fill(true));
		expect([180, 121, 239].map((azimuth) => arcContains(arc, azimuth))).toEqual([false, false, false]);
	});

	it('an aim stays on the arc and in the tilt range, and no reachable aim is nearer to the sun', () => {
		holds(
			fc.property(
				suns,
				fc.integer({ min: 0, max: 359 }),
				fc.integer({ min: 1, max: 359 }),
				fc.tuple(between(0, 30), between(50, 90)),
				between(0, 1),
				between(0, 1),
				(sun, fromDeg, span, [minTiltDeg, maxTiltDeg], along, up) => {
					const stops = { fromDeg, toDeg: normaliseDeg(fromDeg + span) };
					const aim = followAim({ stops, minTiltDeg, maxTiltDeg }, sun);
					expect(normaliseDeg(aim.azimuthDeg - fromDeg + 1e-9)).toBeLessThanOrEqual(span + 2e-9);
					expect(aim.tiltDeg).toBeGreaterThanOrEqual(minTiltDeg);
					expect(aim.tiltDeg).toBeLessThanOrEqual(maxTiltDeg);
					const cosine = (azimuthDeg: number, tiltDeg: number): number => {
						const { n } = tableAxes(azimuthDeg, tiltDeg);
						const s = sunVector(sun.azimuthDeg, sun.elevationDeg);
						return n[0] * s[0] + n[1] * s[1] + n[2] * s[2];
					};
					const other = cosine(fromDeg + span * along, minTiltDeg + (maxTiltDeg - minTiltDeg) * up);
					expect(cosine(aim.azimuthDeg, aim.tiltDeg)).toBeGreaterThanOrEqual(other - 1e-9);
				}
			),
			2000
		);
	});
});
