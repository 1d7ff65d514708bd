import { describe, expect, it } from 'vitest';
import type { Place } from '$lib/core';
import {
	bandDay,
	clockTicks,
	cutSpans,
	hoursPerTick,
	shareAt,
	skylineRuns,
	solarTicks,
	topOfScaleDeg
} from './day-band';

const place = (latitudeDeg: number, longitudeDeg: number, timeZone: string): Place => ({
	latitudeDeg,
	longitudeDeg,
	altitudeM: 0,
	timeZone,
	magneticDeclinationDeg: 0
});
const hillside = place(41.2, 14.5, 'Europe/Rome');
const farNorth = place(70, 25, 'Europe/Oslo');

describe('the day band', () => {
	it('spans first to last light of the shortest day', () => {
		const day = bandDay('2026-12-21', hillside);
		expect(day.sun.kind).toBe('normal');
		// Noon height on the shortest day is about 90 - latitude - obliquity of 23.44 degrees.
		expect(day.noonDeg).toBeCloseTo(90 - 41.2 - 23.44, 0);
		const first = day.hill[0];
		const last = day.hill.at(-1);
		expect(first.elevationDeg).toBeLessThan(0);
		expect(last?.elevationDeg).toBeLessThan(0);
		expect(first.timeMs).toBe(day.fromMs);
		expect(last?.timeMs).toBe(day.toMs);
	});

	it('marks whole clock hours of the site', () => {
		const labels = clockTicks(bandDay('2026-12-21', hillside), 'Europe/Rome', 1).map((tick) => tick.label);
		expect(labels).toEqual(['08:00', '09:00', '10:00', '11:00', '12:00', '13:00', '14:00', '15:00', '16:00']);
	});

	it('marks whole solar hours, with twelve at the transit', () => {
		const day = bandDay('2026-12-21', hillside);
		const noon = solarTicks(day, hillside.longitudeDeg, 1).find((tick) => tick.label === '12:00');
		expect(Math.abs((noon?.timeMs ?? 0) - day.sun.transitMs)).toBeLessThan(1000);
	});

	it('shows the whole day where the sun does not rise or does not set', () => {
		const night = bandDay('2026-12-21', farNorth);
		expect(night.sun.kind).toBe('polar-night');
		expect(night.toMs - night.fromMs).toBe(86_400_000);
		expect(Math.max(...night.hill.map((point) => point.elevationDeg))).toBeLessThan(0);
		const light = bandDay('2026-06-21', farNorth);
		expect(light.sun.kind).toBe('polar-day');
		expect(Math.min(...light.hill.map((point) => point.elevationDeg))).toBeGreaterThan(0);
		expect(clockTicks(light, farNorth.timeZone, 6).length).toBe(4);
	});

	it('thins its labels on a narrow screen', () => {
		const day = bandDay('2026-12-21', hillside);
		expect(hoursPerTick(day, 1000)).toBe(1);
		expect(hoursPerTick(day, 300)).toBe(2);
	});

	it('keeps the rule on the scale', () => {
		expect(topOfScaleDeg(3, 12)).toBe(15);
		expect(topOfScaleDeg(50, 12)).toBeCloseTo(56);
	});

	it('joins spans that touch and cuts them to the band', () => {
		const spans = [
			{ fromMs: 20, toMs: 30 },
			{ fromMs: 0, toMs: 10 },
			{ fromMs: 10, toMs: 12 },
			{ fromMs: 90, toMs: 120 },
			{ fromMs: 200, toMs: 210 }
		];
		expect(cutSpans(spans, 5, 100)).toEqual([
			{ fromMs: 5, toMs: 12 },
			{ fromMs: 20, toMs: 30 },
			{ fromMs: 90, toMs: 100 }
		]);
	});

	it('reads the share between two computed times and not outside them', () => {
		const day = { timesMs: [10, 20], fieldShare: [0.2, 0.4] };
		expect(shareAt(day, 15)).toBeCloseTo(0.3, 12);
		expect(shareAt(day, 20)).toBe(0.4);
		expect(shareAt(day, 9)).toBeNull();
		expect(shareAt(day, 21)).toBeNull();
	});

	it('keeps the time behind the skyline apart from the shade of neighbours', () => {
		const runs = skylineRuns({
			timesMs: [0, 1, 2, 3, 4],
			fieldShare: [1, 1, 0.4, 0.2, 1],
			sunHidden: [true, true, false, false, true]
		});
		expect(runs.map((run) => [run.hidden, run.points.map((point) => point.timeMs)])).toEqual([
			[true, [0, 1, 2]],
			[false, [2, 3]],
			[true, [3, 4]]
		]);
		expect(runs[1].points.map((point) => point.share)).toEqual([0.4, 0.2]);
	});
});
