/** How much of the sky each table sees: closed forms, rays, and a finer sum over directions. */
import { describe, expect, it, vi } from 'vitest';
import {
	gaussLegendre01,
	prepareField,
	skyDirections,
	skyView,
	sunVector,
	tableAxes,
	type Field,
	type SkyDirections
} from '../../src/lib/core';
import {
	testGrid,
	testLayout,
	testModel,
	testPlace,
	testPlot,
	testTracker
} from '../../src/lib/core/test-field';
import { SKY_VIEW_ERROR, SKY_VIEW_LEAST_ERROR } from '../../src/lib/core/run/energy-reasons';
import type { Posture, Tracker, TrackerModel } from '../../src/lib/core/document';
import { randomSource } from '../../src/lib/method/measure/random';

vi.setConfig({ testTimeout: 60_000 });

const radians = Math.PI / 180;

function viewOf(field: Field, directions: SkyDirections, sun = { azimuthDeg: 180, elevationDeg: 30 }) {
	const { engine, skyline } = field;
	return skyView(engine, skyline, directions, sun, 0, engine.count, new Float64Array(engine.count));
}

function fieldOf(trackers: Tracker[], model: TrackerModel = testModel()): Field {
	return prepareField({ place: testPlace, plot: testPlot(), layout: testLayout(trackers, [model]) });
}

/** What the Energy card states for a share of the sky that is lost. */
const stated = (lost: number) => Math.max(SKY_VIEW_ERROR * lost, SKY_VIEW_LEAST_ERROR);

/** Geometric sun by latitude, declination and hour angle (positive in the afternoon), all in degrees. */
function sunAt(latitudeDeg: number, declinationDeg: number, hourDeg: number) {
	const [p, d, h] = [latitudeDeg, declinationDeg, hourDeg].map((angle) => angle * radians);
	const up = Math.sin(p) * Math.sin(d) + Math.cos(p) * Math.cos(d) * Math.cos(h);
	const east = -Math.cos(d) * Math.sin(h);
	const north = Math.cos(p) * Math.sin(d) - Math.sin(p) * Math.cos(d) * Math.cos(h);
	return {
		azimuthDeg: (Math.atan2(east, north) / radians + 360) % 360,
		elevationDeg: Math.asin(up) / radians
	};
}

describe('the sum over directions', () => {
	it('has nodes of Gauss and Legendre: exact for powers up to 2 n - 1 (closed form 1 / (k + 1))', () => {
		for (const n of [1, 4, 6, 11]) {
			const { nodes, weights } = gaussLegendre01(n);
			for (let k = 0; k < 2 * n; k++) {
				const sum = nodes.reduce((total, x, i) => total + weights[i] * x ** k, 0);
				expect(Math.abs(sum - 1 / (k + 1))).toBeLessThan(1e-14);
			}
		}
	});

	it('covers the half sphere, and a bare plane sees pi (1 + cos tilt) / 2 of it', () => {
		const d = skyDirections();
		expect(Math.abs(d.weight.reduce((a, b) => a + b, 0) - 2 * Math.PI)).toBeLessThan(1e-12);
		for (const tilt of [0, 20, 45, 70, 90]) {
			const { n } = tableAxes(137, tilt);
			let sum = 0;
			for (let k = 0; k < d.count; k++) {
				const s = sunVector(d.azimuthDeg[k], d.elevationDeg[k]);
				sum += d.weight[k] * Math.max(0, n[0] * s[0] + n[1] * s[1] + n[2] * s[2]);
			}
			const exact = (Math.PI * (1 + Math.cos(tilt * radians))) / 2;
			expect(Math.abs(sum / exact - 1)).toBeLessThan(0.01);
		}
	});
});

describe('the sky that a table sees', () => {
	it('is all of it for a table alone, and for tables that lie flat on level ground', () => {
		const alone = viewOf(fieldOf([testTracker(0, 0, 0)]), skyDirections());
		expect([...alone.lost, ...alone.horizonLost]).toEqual([0, 0]);
		expect([...alone.open, ...alone.horizonOpen]).toEqual([1, 1]);
		const flat = testGrid(3, 3, 7, 5).map((t): Tracker => ({ ...t, posture: { kind: 'flat' } }));
		expect(Math.max(...viewOf(fieldOf(flat), skyDirections()).lost)).toBe(0);
	});

	it('is that of endless rows by crossed strings (Hottel 1954, from memory): (h + p - diagonal) / 2 h', () => {
		// Only what stands over the upper edge of the row ahead is seen; a table 6 km wide is endless enough.
		for (const [tiltDeg, pitchM, heightM] of [
			[30, 6, 4],
			[50, 6, 4],
			[90, 5, 3],
			[60, 12, 4]
		]) {
			const model = testModel({ widthM: 6000, heightM });
			const rows = Array.from({ length: 5 }, (_, k) =>
				testTracker(k, 0, -k * pitchM, { posture: { kind: 'standing', azimuthDeg: 180, tiltDeg } })
			);
			const field = fieldOf(rows, model);
			const view = (directions: SkyDirections) =>
				((1 + Math.cos(tiltDeg * radians)) / 2) * (1 - viewOf(field, directions).lost[0]);
			// From the foot of the glass to the upper edge of the row ahead.
			const up = heightM * Math.sin(tiltDeg * radians);
			const ahead = pitchM - heightM * Math.cos(tiltDeg * radians);
			const exact = (heightM + pitchM - Math.hypot(ahead, up)) / (2 * heightM);
			expect(Math.abs(view(skyDirections(40, 128)) - exact)).toBeLessThan(0.001);
			expect(Math.abs(view(skyDirections()) - exact)).toBeLessThan(0.008);
		}
	});

	it('agrees with a finer sum in fields: mean of the loss within 5 % of itself, or 0.5 % of the sky', () => {
		const coarse = skyDirections();
		const fine = skyDirections(24, 96);
		for (const elevationDeg of [8, 25, 50]) {
			for (const azimuthDeg of [100, 135, 180, 247]) {
				const field = fieldOf(testGrid(5, 5, 13, 11));
				const sun = { azimuthDeg, elevationDeg };
				const mean = (list: Float64Array) => list.reduce((a, b) => a + b, 0) / list.length;
				const a = mean(viewOf(field, coarse, sun).lost);
				const b = mean(viewOf(field, fine, sun).lost);
				expect(Math.abs(a - b), `sun ${azimuthDeg}, ${elevationDeg}: ${a} and ${b}`).toBeLessThan(stated(b));
			}
		}
	});

	it.each([
		[13, 11, 0.05],
		[25, 25, null]
	])(
		'agrees with a finer sum at 40 N over the suns of a year, pitches %s and %s m',
		(eastM, northM, within) => {
			const coarse = skyDirections();
			const fine = skyDirections(24, 96);
			const field = fieldOf(testGrid(5, 5, eastM, northM));
			const mean = (list: Float64Array) => list.reduce((sum, lost) => sum + lost, 0) / list.length;
			let [a, b, count] = [0, 0, 0];
			for (const declinationDeg of [-23.44, -11.7, 0, 11.7, 23.44]) {
				for (let hour = -6.5; hour <= 6.5; hour++) {
					const sun = sunAt(40, declinationDeg, 15 * hour);
					if (sun.elevationDeg <= 0) continue;
					a += mean(viewOf(field, coarse, sun).lost);
					b += mean(viewOf(field, fine, sun).lost);
					count++;
				}
			}
			[a, b] = [a / count, b / count];
			expect(count).toBeGreaterThan(50);
			expect(b).toBeGreaterThan(0.005);
			expect(Math.abs(a - b), `${a} and ${b}`).toBeLessThan(stated(b));
			// Where tables stand close, the lower bound is not needed.
			if (within !== null) expect(Math.abs(a / b - 1)).toBeLessThan(within);
		}
	);

	it('agrees with rays from the glass in random fields', () => {
		const seed = 20261201;
		console.log(`sky view by rays, seed ${seed}`);
		const random = randomSource(seed);
		for (let round = 0; round < 4; round++) {
			const trackers = Array.from({ length: 5 }, (_, k): Tracker => {
				const posture: Posture = {
					kind: 'standing',
					azimuthDeg: random() * 360,
					tiltDeg: 20 + random() * 60
				};
				return testTracker(k, (k % 3) * 9 + random() * 2, Math.floor(k / 3) * 8 + random() * 2, { posture });
			});
			const field = fieldOf(trackers);
			const view = viewOf(field, skyDirections(24, 96));
			const seen = rayView(field, 0, random, 60_000);
			// Half a percent of the hemisphere is four times the spread of so many rays.
			expect(Math.abs(view.lost[0] - seen)).toBeLessThan(0.008);
		}
	});
});

/** Share of a table's sky that other tables cover, by rays spread with the cosine over its front. */
function rayView(field: Field, target: number, random: () => number, rays: number): number {
	const { engine } = field;
	engine.setSun(180, 30, false);
	const { u, v, n } = engine.poses[engine.groupOf[target]];
	const group = engine.groups[engine.groupOf[target]];
	const centre = engine.centre(target);
	let sky = 0;
	let covered = 0;
	for (let r = 0; r < rays; r++) {
		const x = (2 * random() - 1) * group.halfWidth;
		const y = (2 * random() - 1) * group.halfHeight;
		const sine = Math.sqrt(random());
		const turn = 2 * Math.PI * random();
		const a = sine * Math.cos(turn);
		const b = sine * Math.sin(turn);
		const c = Math.sqrt(1 - sine * sine);
		const from = [0, 1, 2].map((k) => centre[k] + x * u[k] + y * v[k]);
		const way = [0, 1, 2].map((k) => a * u[k] + b * v[k] + c * n[k]);
		if (way[2] <= 0) continue;
		sky++;
		for (let j = 0; j < engine.count; j++) {
			if (j === target) continue;
			const other = engine.poses[engine.groupOf[j]];
			const to = engine.centre(j);
			const along = dot(other.n, way);
			if (Math.abs(along) < 1e-12) continue;
			const t = dot(other.n, [to[0] - from[0], to[1] - from[1], to[2] - from[2]]) / along;
			if (t <= 1e-9) continue;
			const hit = [0, 1, 2].map((k) => from[k] + t * way[k] - to[k]);
			const size = engine.groups[engine.groupOf[j]];
			if (
				Math.abs(dot(other.u, hit)) < size.steelHalfWidth &&
				Math.abs(dot(other.v, hit)) < size.steelHalfHeight
			) {
				covered++;
				break;
			}
		}
	}
	return covered / sky;
}

function dot(a: readonly number[], b: readonly number[]): number {
	return a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
}
