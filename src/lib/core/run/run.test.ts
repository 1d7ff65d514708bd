import { describe, expect, it, vi } from 'vitest';
import { prepareField } from '../field';
import type { RunInput } from '../results';
import { testGrid, testLayout, testPlace, testPlot, testTracker } from '../test-field';
import { dayShade } from './day-shade';
import { shadeYear } from './shade-year';
import { winterVerdict } from './winter';

// Years of many steps: a loaded machine must not fail them.
vi.setConfig({ testTimeout: 60000 });

const input = (changes: Partial<RunInput> = {}): RunInput => ({
	place: testPlace,
	plot: testPlot(),
	layout: testLayout(testGrid(3, 3, 12, 10)),
	winterRule: { kind: 'clear-above', elevationDeg: 15 },
	year: 2026,
	stepMinutes: 20,
	utcOffsetMinutes: 60,
	treeYears: 0,
	...changes
});

describe('the winter rule', () => {
	// One tracker 12 m south of the other: shade at noon while 12 sin e < 4, so up to 19.4712 degrees. The sun
	// crosses the meridian higher than that at 45 north (21.6), so the shade ends on the way up and down.
	const layout = testLayout([testTracker(0, 0, 0), testTracker(1, 0, 12)]);
	const field = prepareField({ place: testPlace, plot: testPlot(), layout });
	const day = dayShade(field, '2026-12-21', 5, 60);

	it('finds the height of sun at which the shade ends, on closed geometry', () => {
		expect(day.shadedUpToDeg[0]).toBeNull();
		// Off the meridian by A the along-sun distance is 12 cos A; the end is where 12 cos A sin e = 4 (1 - 0.001 of it),
		// while the sideways shift 12 sin A still leaves an overlap.
		const { sunAzimuthDeg, sunElevationDeg } = day;
		let expected = 0;
		for (let k = 0; k + 1 < sunAzimuthDeg.length; k++) {
			for (let f = 0; f < 1; f += 0.01) {
				const a = ((sunAzimuthDeg[k] + f * (sunAzimuthDeg[k + 1] - sunAzimuthDeg[k])) * Math.PI) / 180;
				const e = ((sunElevationDeg[k] + f * (sunElevationDeg[k + 1] - sunElevationDeg[k])) * Math.PI) / 180;
				const along = -12 * Math.cos(a);
				const side = Math.abs(12 * Math.sin(a));
				const share = Math.max(0, 1 - side / 6) * Math.max(0, 1 - (along * Math.sin(e)) / 4);
				if (share > 0.001) expected = Math.max(expected, (e * 180) / Math.PI);
			}
		}
		expect(expected).toBeGreaterThan(15);
		expect(Math.abs((day.shadedUpToDeg[1] ?? 0) - expected)).toBeLessThan(0.02);
	});

	it('is met above that height, broken below it, and names the tracker', () => {
		const upTo = day.shadedUpToDeg[1] ?? 0;
		const met = winterVerdict(day, layout, testPlace, { kind: 'clear-above', elevationDeg: upTo + 0.1 });
		expect(met).toMatchObject({ met: true, brokenBy: [], clearAboveDeg: upTo });
		const broken = winterVerdict(day, layout, testPlace, { kind: 'clear-above', elevationDeg: upTo - 0.5 });
		expect(broken.met).toBe(false);
		expect(broken.brokenBy.map((b) => b.tag)).toEqual(['A02']);
		expect(broken.brokenBy[0].minutes).toBeGreaterThan(0);
	});

	it('keeps to its solar hours', () => {
		const noon = winterVerdict(day, layout, testPlace, {
			kind: 'clear-window',
			fromSolarHour: 11.7,
			toSolarHour: 12.3
		});
		expect(noon.met).toBe(true);
		const morning = winterVerdict(day, layout, testPlace, {
			kind: 'clear-window',
			fromSolarHour: 9,
			toSolarHour: 15
		});
		expect(morning.met).toBe(false);
	});

	it('does not blame trackers for the skyline', () => {
		const plot = testPlot({
			skyline: [
				{ azimuthDeg: 0, elevationDeg: 30 },
				{ azimuthDeg: 180, elevationDeg: 30 }
			]
		});
		const dark = dayShade(prepareField({ place: testPlace, plot, layout }), '2026-12-21', 10, 60);
		expect(dark.sunHidden.every(Boolean)).toBe(true);
		expect(winterVerdict(dark, layout, testPlace, { kind: 'clear-above', elevationDeg: 5 }).met).toBe(true);
	});

	it('says for how long of the day it was put to the test', () => {
		// At 45 north the sun climbs to 21.6 degrees: above 21 for about an hour, above 22 never.
		const at = (elevationDeg: number) =>
			winterVerdict(day, layout, testPlace, { kind: 'clear-above', elevationDeg });
		expect(at(22)).toMatchObject({ met: true, judgedMinutes: 0 });
		expect(at(21).judgedMinutes).toBeGreaterThan(30);
		const night = { kind: 'clear-window', fromSolarHour: 0, toSolarHour: 3 } as const;
		expect(winterVerdict(day, layout, testPlace, night).judgedMinutes).toBe(0);
		const noon = { kind: 'clear-window', fromSolarHour: 11, toSolarHour: 13 } as const;
		expect(winterVerdict(day, layout, testPlace, noon).judgedMinutes).toBe(120);
	});

	it('has an empty day in the polar night and a whole one in the polar day', () => {
		const north = { ...testPlace, latitudeDeg: 75 };
		const polar = prepareField({ place: north, plot: testPlot(), layout });
		expect(dayShade(polar, '2026-12-21', 20, 60).timesMs).toHaveLength(0);
		expect(dayShade(polar, '2026-06-21', 20, 60).timesMs).toHaveLength(72);
	});
});

describe('a year of shade', () => {
	const result = shadeYear(input());

	it('adds up: months make the year, trackers make the field', () => {
		expect(result).not.toBeNull();
		if (!result) return;
		const mean = (key: 'beamKwhM2' | 'beamLitKwhM2') =>
			result.trackers.reduce((sum, t) => sum + t[key], 0) / result.trackers.length;
		expect(result.field.beamKwhM2).toBeCloseTo(mean('beamKwhM2'), 6);
		expect(result.field.beamLoss).toBeCloseTo(1 - mean('beamLitKwhM2') / mean('beamKwhM2'), 9);
		expect(result.field.beamLoss).toBeGreaterThan(0.01);
		for (const tracker of result.trackers) {
			expect(tracker.beamLoss).toBeCloseTo(1 - tracker.beamLitKwhM2 / tracker.beamKwhM2, 9);
			expect(tracker.beamLoss).toBeLessThanOrEqual(1);
		}
		const worst = result.trackers.find((t) => t.trackerId === result.field.worstTrackerId);
		expect(worst?.beamLoss).toBe(Math.max(...result.trackers.map((t) => t.beamLoss)));
		expect(result.model.daylightHours).toBeGreaterThan(4380);
		expect(result.model.steps).toBe((365 * 24 * 60) / 20);
	});

	it('same inputs, same bytes', () => {
		expect(JSON.stringify(shadeYear(input()))).toBe(JSON.stringify(result));
	});

	it('can be stopped, and tells how far it is', () => {
		const heard: number[] = [];
		expect(shadeYear(input(), (done) => heard.push(done) < 5)).toBeNull();
		expect(heard).toHaveLength(5);
		expect([...heard].sort((a, b) => a - b)).toEqual(heard);
	});

	it('a skyline takes beam from both sides of the loss', () => {
		const skyline = [
			{ azimuthDeg: 0, elevationDeg: 15 },
			{ azimuthDeg: 180, elevationDeg: 15 }
		];
		const hidden = shadeYear(input({ plot: testPlot({ skyline }) }));
		expect(hidden?.field.beamKwhM2).toBeLessThan(result?.field.beamKwhM2 ?? 0);
		expect(hidden?.field.beamLoss).toBeLessThan(result?.field.beamLoss ?? 0);
	});

	it('an empty layout has an empty result without NaN', () => {
		const empty = shadeYear(input({ layout: testLayout([]) }));
		expect(empty?.field).toMatchObject({ beamLoss: 0, beamKwhM2: 0, worstTrackerId: null });
		expect(JSON.stringify(empty)).not.toContain('NaN');
	});
});
