import { describe, expect, it } from 'vitest';
import { RADIANS_PER_DEGREE } from '../conventions';
import type { Ground, GroundPoint } from '../document';
import { prepareField, fieldShade, moveTracker } from '../field';
import { testLayout, testPlace, testPlot, testTracker } from '../test-field';
import { groundHeightM, groundSurface } from './ground';
import { HORIZON_STEP_DEG, terrainHorizons } from './terrain-horizon';

const rolling = (e: number, n: number) =>
	4 * Math.sin(e / 23) * Math.cos(n / 31) + 0.02 * e + 3 * Math.exp(-((e - 60) ** 2 + (n - 20) ** 2) / 400);
const millimetre = (value: number) => Math.round(value * 1000) / 1000;
const points: Ground = {
	kind: 'points',
	points: Array.from({ length: 2500 }, (_, k): GroundPoint => {
		const e = millimetre((((k * 7919 + 13) % 10007) / 10007 - 0.5) * 240);
		const n = millimetre((((k * 6311 + 71) % 9973) / 9973 - 0.5) * 240);
		return [e, n, rolling(e, n)];
	})
};
const raster: Ground = {
	kind: 'raster',
	westM: -120,
	southM: -120,
	cellM: 6,
	columns: 41,
	rows: 41,
	heightsM: Array.from({ length: 41 * 41 }, (_, k) =>
		rolling(-120 + (k % 41) * 6, -120 + Math.floor(k / 41) * 6)
	)
};

/** Highest elevation of the ground along a bearing by a march of 1 cm steps. */
function marched(ground: Ground, e: number, n: number, up: number, azimuthDeg: number): number {
	const [s, c] = [Math.sin(azimuthDeg * RADIANS_PER_DEGREE), Math.cos(azimuthDeg * RADIANS_PER_DEGREE)];
	const [west, south, east, north] = groundSurface(ground).extent!;
	let best = -Infinity;
	for (let d = 0.01; d < 400; d += 0.01) {
		const [x, y] = [e + d * s, n + d * c];
		if (x < west || x > east || y < south || y > north) continue;
		best = Math.max(best, (groundHeightM(ground, x, y) - up) / d);
	}
	return Math.max(0, Math.atan(best) / RADIANS_PER_DEGREE);
}

const eyes: [number, number][] = [
	[0, 0],
	[-70, 40],
	[31.5, -55.25]
];

describe.each([
	['points', points],
	['a raster', raster]
] as const)('the near skyline of %s', (_, ground) => {
	const east = Float64Array.from(eyes, (p) => p[0]);
	const north = Float64Array.from(eyes, (p) => p[1]);
	const up = Float64Array.from(eyes, (p) => groundHeightM(ground, ...p) + 2.6);
	const horizons = terrainHorizons(ground, east, north, up)!;

	it('agrees with marching along rays at its own bearings, to 0.01 degrees', () => {
		for (let i = 0; i < eyes.length; i++) {
			for (let azimuth = 0; azimuth < 360; azimuth += 8 * HORIZON_STEP_DEG) {
				const march = marched(ground, east[i], north[i], up[i], azimuth);
				const ours = horizons.heightDeg(i, azimuth);
				// A march by steps can only miss the top.
				expect(ours).toBeGreaterThan(march - 1e-6);
				expect(ours - march).toBeLessThan(0.01);
			}
		}
	});

	it('is within half a degree of it between its bearings, on ground that rolls by 10 m over 150 m', () => {
		let worst = 0;
		for (let azimuth = 1.5; azimuth < 360; azimuth += 12) {
			const march = marched(ground, east[0], north[0], up[0], azimuth);
			worst = Math.max(worst, Math.abs(horizons.heightDeg(0, azimuth) - march));
		}
		expect(worst).toBeLessThan(0.5);
	});

	it('hides what stands below it and nothing above', () => {
		const height = horizons.heightDeg(1, 100);
		expect(horizons.hides(1, 100, height - 0.01)).toBe(true);
		expect(horizons.hides(1, 100, height + 0.01)).toBe(false);
		expect(horizons.hides(1, 460, height - 0.01)).toBe(true);
	});
});

describe('near ground and the field', () => {
	it('a dam of known height hides the sun exactly below its elevation', () => {
		// Level ground at 0 with a dam 5 m high, its crest along north at 30 m east.
		const dam: Ground = {
			kind: 'points',
			points: [-100, 100].flatMap((n): GroundPoint[] => [
				[-100, n, 0],
				[25, n, 0],
				[30, n, 5],
				[35, n, 0],
				[100, n, 0]
			])
		};
		const field = prepareField({
			place: testPlace,
			plot: testPlot({ ground: dam }),
			layout: testLayout([testTracker(0, 0, 0), testTracker(1, -40, 0)])
		});
		// Axes at 3 m: the crest stands 2 m above them, 30 m and 70 m away.
		const crest = (away: number) => Math.atan(2 / away) / RADIANS_PER_DEGREE;
		expect(field.horizons!.heightDeg(0, 90)).toBeCloseTo(crest(30), 9);
		expect(field.horizons!.heightDeg(1, 90)).toBeCloseTo(crest(70), 9);
		const sun = { azimuthDeg: 90, elevationDeg: 2.5 };
		const shares = fieldShade(field, sun);
		expect(shares[0]).toBe(1);
		expect(shares[1]).toBeLessThan(1);
		// The same after a move as when it is prepared there.
		const moved = moveTracker(field, 1, 5, 30);
		const there = prepareField({ place: testPlace, plot: field.plot, layout: moved.layout });
		expect([...fieldShade(moved, sun)]).toEqual([...fieldShade(there, sun)]);
		expect(fieldShade(moved, sun)[1]).toBe(1);
		expect([...fieldShade(field, sun)]).toEqual([...shares]);
	});

	it('has none on level ground and planes', () => {
		const none = new Float64Array(1);
		expect(terrainHorizons({ kind: 'level', heightM: 3 }, none, none, none)).toBeNull();
		expect(
			terrainHorizons({ kind: 'plane', heightM: 3, risePercent: 9, riseTowardsDeg: 10 }, none, none, none)
		).toBeNull();
	});

	it('sees a hill from outside of what was measured', () => {
		const hill: Ground = {
			kind: 'points',
			points: [
				[0, -20, 0],
				[40, -20, 0],
				[40, 20, 0],
				[0, 20, 0],
				[20, 0, 12]
			]
		};
		const eye = (e: number) => Float64Array.of(e);
		const horizons = terrainHorizons(hill, eye(-30), eye(0), eye(2))!;
		expect(horizons.heightDeg(0, 90)).toBeCloseTo(Math.atan(10 / 50) / RADIANS_PER_DEGREE, 9);
		expect(horizons.heightDeg(0, 270)).toBe(0);
	});
});
