import { describe, expect, it } from 'vitest';
import { sunVector, tableAxes } from '../conventions';
import { fieldSunHidden, prepareField } from '../field';
import type { Ground, Mount } from '../document';
import type { RunInput } from '../results';
import { SunSky } from '../run/sun-steps';
import { testGrid, testLayout, testModel, testPlace, testPlot, testTracker } from '../test-field';
import { classifyMount } from './classes';
import { levelGroundTruth, mountYear } from './mount-year';
import { mountPlaces, mountPoint } from './places';
import { rayMeetsSolid, rayMeetsTable } from './ray';

const input = (changes: Partial<RunInput> = {}): RunInput => ({
	place: testPlace,
	plot: testPlot(),
	layout: testLayout(testGrid(3, 3, 12, 12)),
	winterRule: { kind: 'clear-above', elevationDeg: 15 },
	year: 2026,
	stepMinutes: 20,
	utcOffsetMinutes: 60,
	treeYears: 0,
	...changes
});
const slope: Ground = { kind: 'plane', heightM: 0, risePercent: 9, riseTowardsDeg: 95 };

describe('places', () => {
	it('are named from the front: right of someone who faces the glass is positive', () => {
		const mount: Mount = { edge: 'right', alongM: 1, outM: 0.1, forwardM: 0.03 };
		expect(mountPoint(testModel(), mount)).toEqual({ xM: 3.1, yM: 1, zM: 0.03 });
	});

	it('stand evenly from the middle and never inside the frame', () => {
		const places = mountPlaces(testModel({ frameMarginM: 0.2 }), {
			spacingM: 0.5,
			outM: 0.08,
			forwardM: 0.03
		});
		expect(places.edges.top.count).toBe(13);
		expect(places.edges.left.count).toBe(9);
		expect(places.mounts.every((m) => m.outM === 0.2)).toBe(true);
		expect(places.mounts.filter((m) => m.alongM === 0)).toHaveLength(4);
	});
});

describe('a year of sensors', () => {
	it('on level ground with equal followers no place on the top edge is ever shaded, and the result says so', () => {
		const result = mountYear(input());
		expect(result?.levelGroundTruth).toBe(true);
		expect(result?.common).toMatchObject({ edge: 'top', alongM: 0 });
		expect(result?.commonClassCounts.clear).toBe(9);
		for (const tracker of result?.trackers ?? []) {
			for (const place of tracker.edges.top) expect(place.shadedHours).toBe(0);
		}
		const bottom = result?.trackers[7].edges.bottom ?? [];
		expect(bottom[Math.floor(bottom.length / 2)].blindHours).toBeGreaterThan(100);
	}, 60000);

	it('claims no level-ground truth on a slope, with unlike heights, a standing table or an obstacle', () => {
		const truth = (changes: Partial<RunInput>) => levelGroundTruth(prepareField(input(changes)));
		const pair = [testTracker(0, 0, 0), testTracker(1, 15, 0)];
		expect(truth({ layout: testLayout(pair) })).toBe(true);
		expect(truth({ layout: testLayout(pair), plot: testPlot({ ground: slope }) })).toBe(false);
		expect(truth({ layout: testLayout([pair[0], { ...pair[1], axisHeightM: 3.4 }]) })).toBe(false);
		expect(truth({ layout: testLayout([pair[0], { ...pair[1], posture: { kind: 'flat' } }]) })).toBe(false);
	});

	it('on ground that rises g towards the sun a top head is shaded while tan e < g, and not above', () => {
		// One neighbour due east, 14 m away and 1.4 m higher; the sun due east: shaded while the neighbour's top edge, a
		// copy of ours, stands above the ray.
		const plot = testPlot({ ground: { kind: 'plane', heightM: 0, risePercent: 10, riseTowardsDeg: 90 } });
		const layout = testLayout([testTracker(0, 0, 0), testTracker(1, 14, 0)]);
		const { engine } = prepareField({ place: testPlace, plot, layout });
		const limit = (Math.atan(0.1) * 180) / Math.PI;
		for (const [e, shaded] of [
			[limit - 0.3, true],
			[limit + 0.3, false]
		] as const) {
			engine.setSun(90, e);
			engine.collect(0, 0.2);
			let hit = false;
			engine.shadowsAhead(0, 0, (shadow, corners) => {
				let top = -Infinity;
				for (let k = 0; k < corners; k++) top = Math.max(top, shadow[2 * k + 1]);
				hit ||= top > 2;
			});
			expect(hit).toBe(shaded);
		}
	});

	it('agrees with rays cast head by head through the year, with slope, stops, unlike machines, trees and a standing table', () => {
		const small = testModel({ id: 'small', widthM: 4, heightM: 3, stops: { fromDeg: 120, toDeg: 240 } });
		const layout = testLayout(
			[
				testTracker(0, 0, 0),
				testTracker(1, 9, 1),
				testTracker(2, 2, 8, { modelId: 'small' }),
				testTracker(3, 12, 9, { posture: { kind: 'standing', azimuthDeg: 250, tiltDeg: 70 } })
			],
			[testModel({ centreGapM: 0.4, frameMarginM: 0.05 }), small]
		);
		const plot = testPlot({
			ground: slope,
			skyline: [{ azimuthDeg: 100, elevationDeg: 2 }],
			obstacles: [
				{
					id: 'o',
					kind: 'tree',
					name: 'Oak',
					eastM: 14,
					northM: -6,
					heightM: 8,
					crownBaseM: 2,
					crownRadiusM: 2.5,
					trunkRadiusM: 0.3,
					crownTransmission: 0.2,
					growthMPerYear: 0,
					maxHeightM: 8
				}
			]
		});
		const run = input({ layout, plot });
		const result = mountYear(run, { spacingM: 1 });
		const field = prepareField(run);
		const sky = new SunSky(run.place);
		const shaded = layout.trackers.map((t) =>
			mountPlaces(layout.models.find((m) => m.id === t.modelId) ?? small, {
				spacingM: 1,
				outM: 0.08,
				forwardM: 0.03
			}).mounts.map(() => 0)
		);
		const { engine } = field;
		const stepMs = run.stepMinutes * 60000;
		for (
			let t = Date.UTC(2026, 0, 1) - 3600000 + stepMs / 2;
			t < Date.UTC(2027, 0, 1) - 3600000;
			t += stepMs
		) {
			const sun = sky.at(t);
			if (sun.elevationDeg <= 0 || fieldSunHidden(field, sun)) continue;
			engine.setSun(sun.azimuthDeg, sun.elevationDeg);
			const s = sunVector(sun.azimuthDeg, sun.elevationDeg);
			const tables = layout.trackers.map((_, j) => {
				const group = engine.groups[engine.groupOf[j]];
				const pose = engine.poses[engine.groupOf[j]];
				return {
					centre: engine.centre(j),
					...tableAxes(pose.azimuthDeg, pose.tiltDeg),
					halfWidth: group.steelHalfWidth,
					halfHeight: group.steelHalfHeight,
					halfGap: group.halfGap
				};
			});
			layout.trackers.forEach((_, i) => {
				const { centre, u, v, n } = tables[i];
				const places = mountPlaces(field.models[i], { spacingM: 1, outM: 0.08, forwardM: 0.03 });
				places.mounts.forEach((mount, k) => {
					const { xM, yM, zM } = mountPoint(field.models[i], mount);
					const p = [0, 1, 2].map((c) => centre[c] + xM * u[c] + yM * v[c] + zM * n[c]);
					if (
						tables.some((table) => rayMeetsTable(p, s, table)) ||
						engine.solids.some((solid) => rayMeetsSolid(p, s, solid))
					) {
						shaded[i][k]++;
					}
				});
			});
		}
		let total = 0;
		result?.trackers.forEach((tracker, i) => {
			const ours = [
				...tracker.edges.top,
				...tracker.edges.bottom,
				...tracker.edges.left,
				...tracker.edges.right
			];
			expect(ours).toHaveLength(shaded[i].length);
			ours.forEach((place, k) => {
				total += shaded[i][k];
				// A head exactly on a shadow edge may fall either way at a step.
				expect(Math.abs(place.shadedHours - shaded[i][k] / 3)).toBeLessThanOrEqual(1);
			});
		});
		expect(total).toBeGreaterThan(1000);
	}, 120000);

	it('names what blocks a place most, and stops when told to', () => {
		const barn = {
			id: 'b',
			kind: 'box' as const,
			name: 'Barn',
			eastM: 12,
			northM: 0,
			sizeXM: 4,
			sizeYM: 30,
			heightM: 12,
			turnDeg: 0
		};
		const run = input({ layout: testLayout([testTracker(0, 0, 0)]), plot: testPlot({ obstacles: [barn] }) });
		const result = mountYear(run);
		expect(result?.trackers[0].bestReason).toContain('Barn');
		expect(mountYear(run, {}, () => false)).toBeNull();
	}, 60000);
});

describe('classes', () => {
	const good = { blindHours: 0, shadedAbove5Hours: 0, longestRunMinutes: 0, runUpWorstMinutes: 0 };

	it('the worst row decides', () => {
		expect(classifyMount(good).class).toBe('clear');
		expect(classifyMount({ ...good, blindHours: 6 }).class).toBe('sound');
		expect(classifyMount({ ...good, longestRunMinutes: 30 }).class).toBe('watch');
		expect(classifyMount({ ...good, blindHours: 6, shadedAbove5Hours: 61 }, 'B05')).toEqual({
			class: 'unfit',
			reason: 'Shade with the sun above 5° 61 h a year (unfit above 60 h a year), mostly from B05.'
		});
	});
});
