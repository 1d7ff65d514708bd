/** The energy of a field over a year: closed sums, parts that add up, bounds, sources that keep what was given. */
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { gunzipSync } from 'node:zlib';
import { describe, expect, it, vi } from 'vitest';
import {
	checkEnergy,
	defaultLinkeTurbidity,
	energySteps,
	energyYear,
	energyYearPart,
	findCorners,
	followAim,
	joinEnergyYear,
	nodeSun,
	planeOfArray,
	prepareField,
	skyCorners,
	skyDirections,
	skyParts,
	skyView,
	splitSky,
	trackingGain,
	weatherSky,
	weatherSums,
	weatherYearOf,
	type EnergyResult,
	type EnergySettings,
	type EnergySkyModel,
	type RunInput
} from '../../src/lib/core';
import type { Plot, Tracker } from '../../src/lib/core/document';
import {
	testGrid,
	testLayout,
	testModel,
	testPlace,
	testPlot,
	testTracker
} from '../../src/lib/core/test-field';
import { readWeather } from '../../src/lib/exchange/weather';

// Whole years of small fields; the machine may be busy with others.
vi.setConfig({ testTimeout: 60_000 });

const golden = readWeather(
	gunzipSync(readFileSync(join(import.meta.dirname, '../fixtures/weather/golden-tmy3.csv.gz')))
);
if (!golden.ok) throw new Error(golden.message);
const goldenPlace = { ...testPlace, latitudeDeg: 39.742, longitudeDeg: -105.179, altitudeM: 1829 };

/** Monthly sums on level ground in kWh/m², invented. */
const sums = [45, 62, 105, 140, 172, 185, 198, 168, 118, 78, 48, 38];
const model = testModel({ moduleColumns: 6, moduleRows: 2, powerW: 5000 });
const clear: EnergySettings = { sky: { source: 'clear' }, skyModel: 'hay-davies', albedo: 0.2 };

function runOf(
	trackers: Tracker[],
	energy: EnergySettings = clear,
	changes: Partial<RunInput> = {},
	plot: Plot = testPlot()
): RunInput {
	return {
		place: testPlace,
		plot,
		layout: testLayout(trackers, [model]),
		winterRule: { kind: 'clear-above', elevationDeg: 15 },
		year: 2026,
		stepMinutes: 20,
		utcOffsetMinutes: 60,
		treeYears: 0,
		energy,
		...changes
	};
}

function yearOf(input: RunInput): EnergyResult {
	const result = energyYear(input);
	if (!result) throw new Error('the run stopped');
	return result;
}

const near = (a: number, b: number, tolerance: number) =>
	expect(Math.abs(a - b), `${a} and ${b}`).toBeLessThanOrEqual(tolerance);

describe('a table alone', () => {
	for (const skyModel of ['hay-davies', 'perez', 'isotropic'] as const) {
		it(`receives what the plane's own sums give, ${skyModel}, and loses nothing`, () => {
			const input = runOf([testTracker(0, 0, 0)], { ...clear, skyModel });
			const result = yearOf(input);
			const steps = energySteps(input);
			const total = { beam: 0, circumsolar: 0, isotropic: 0, horizon: 0, ground: 0, total: 0 };
			for (let s = 0; s < steps.count; s++) {
				const sun = { azimuthDeg: steps.azimuthDeg[s], elevationDeg: steps.elevationDeg[s] };
				const light = planeOfArray({
					...followAim(model, sun),
					sun,
					directNormal: steps.directNormal[s],
					diffuseHorizontal: steps.diffuse[s],
					globalHorizontal: steps.global[s],
					extraterrestrialNormal: steps.extraterrestrial[s],
					albedo: 0.2,
					model: skyModel
				});
				for (const key of ['beam', 'circumsolar', 'isotropic', 'horizon', 'ground', 'total'] as const) {
					total[key] += (light[key] * steps.hours[s]) / 1000;
				}
			}
			for (const key of ['beam', 'circumsolar', 'isotropic', 'horizon', 'ground', 'total'] as const) {
				near(result.field.without[key], total[key], 1e-6);
				expect(result.field.with[key]).toBe(result.field.without[key]);
			}
			expect(result.field.losses).toEqual({
				beam: 0,
				sky: 0,
				electrical: { low: 0, likely: 0, high: 0 },
				total: { low: 0, likely: 0, high: 0 }
			});
			// A table square to the sun receives the whole direct light.
			near(result.field.without.beam, result.horizontal.directNormalKwhM2, 1e-6);
			expect(result.field.worstTrackerId).toBeNull();
		});
	}
});

describe('parts of the sky', () => {
	it('taken apart before any plane is known are those of the plane (Hay and Davies 1980, Perez et al. 1990)', () => {
		const out = { circumsolar: 0, isotropic: 0, horizon: 0 };
		for (const skyModel of ['hay-davies', 'perez', 'isotropic'] as EnergySkyModel[]) {
			for (const [zenithDeg, dni, dhi, tiltDeg, angleOfIncidenceDeg] of [
				[30, 900, 100, 30, 0],
				[60, 200, 200, 25, 41],
				[80, 450, 60, 80, 0],
				[45, 0, 300, 45, 10],
				[88, 20, 15, 70, 100],
				[50, 500, 0, 50, 0]
			]) {
				const whole = skyParts({
					tiltDeg,
					zenithDeg,
					angleOfIncidenceDeg,
					directNormal: dni,
					diffuseHorizontal: dhi,
					extraterrestrialNormal: 1361,
					model: skyModel
				});
				splitSky(skyModel, zenithDeg, dni, dhi, 1361, out);
				const tilt = (tiltDeg * Math.PI) / 180;
				const facing = Math.max(0, Math.cos((angleOfIncidenceDeg * Math.PI) / 180));
				near(out.circumsolar * facing, whole.circumsolar, 1e-9);
				near((out.isotropic * (1 + Math.cos(tilt))) / 2, whole.isotropic, 1e-9);
				near(out.horizon * Math.sin(tilt), whole.horizon, 1e-9);
			}
		}
	});
});

describe('the energy of a field', () => {
	const trackers = testGrid(3, 3, 11, 9);
	const tree = {
		id: 'o1',
		kind: 'tree' as const,
		name: '',
		eastM: 10,
		northM: -8,
		heightM: 9,
		crownBaseM: 2,
		crownRadiusM: 2.5,
		trunkRadiusM: 0.2,
		crownTransmission: 0.4,
		growthMPerYear: 0,
		maxHeightM: 9
	};
	const plot = testPlot({
		obstacles: [tree],
		skyline: [
			{ azimuthDeg: 0, elevationDeg: 2 },
			{ azimuthDeg: 180, elevationDeg: 6 }
		]
	});
	const input = runOf(trackers, { ...clear, skyModel: 'perez' }, {}, plot);
	const result = yearOf(input);

	it('adds up: parts, losses, months, hours, trackers', () => {
		for (const one of [result.field, ...result.trackers]) {
			const { without, with: left, losses } = one;
			for (const light of [without, left]) {
				const { beam, circumsolar, isotropic, horizon, ground, total } = light;
				near(beam + circumsolar + isotropic + horizon + ground, total, 1e-9);
			}
			near(losses.beam, (without.beam - left.beam) / without.total, 1e-12);
			const sky =
				without.circumsolar +
				without.isotropic +
				without.horizon -
				(left.circumsolar + left.isotropic + left.horizon);
			near(losses.sky, sky / without.total, 1e-12);
			expect(left.ground).toBe(without.ground);
			for (const bound of ['low', 'likely', 'high'] as const) {
				near(losses.total[bound], losses.beam + losses.sky + losses.electrical[bound], 1e-12);
			}
		}
		const { field } = result;
		near(
			field.monthlyWithoutKwhM2.reduce((a, b) => a + b, 0),
			field.without.total,
			1e-9
		);
		const months = field.monthlyWithoutKwhM2.reduce(
			(sum, light, m) => sum + light * ((field.months.beam[m] ?? 0) + (field.months.electrical[m] ?? 0)),
			0
		);
		near(months / field.without.total, field.losses.beam + field.losses.electrical.likely, 1e-12);
		const mean = result.trackers.reduce((sum, one) => sum + one.with.total, 0) / result.trackers.length;
		near(mean, field.with.total, 1e-9);
		near(field.referenceYieldH.high, field.with.total, 1e-9);
		expect(field.ratedKw).toBe(45);
	});

	it('keeps every loss between the shaded area and the whole of the light', () => {
		for (const { losses, without } of result.trackers) {
			expect(losses.beam).toBeGreaterThan(0);
			expect(losses.sky).toBeGreaterThan(0);
			expect(losses.electrical.low).toBe(0);
			expect(losses.electrical.likely).toBeGreaterThan(0);
			expect(losses.electrical.high).toBeGreaterThanOrEqual(losses.electrical.likely);
			// The worst wiring loses no more than all beam and circumsolar light.
			expect(losses.beam + losses.electrical.high).toBeLessThanOrEqual(
				(without.beam + without.circumsolar) / without.total
			);
		}
	});

	it('is the same, byte for byte, asked again and put together from parts', () => {
		expect(JSON.stringify(yearOf(input))).toBe(JSON.stringify(result));
		const parts = [
			[0, 2],
			[2, 7],
			[7, 9]
		].map(([from, to]) => energyYearPart(input, undefined, { from, to }));
		const joined = joinEnergyYear(
			input,
			parts.map((part) => {
				if (!part) throw new Error('a part stopped');
				return part;
			})
		);
		expect(JSON.stringify(joined)).toBe(JSON.stringify(result));
		expect(() =>
			joinEnergyYear(
				input,
				parts.slice(1).flatMap((part) => part ?? [])
			)
		).toThrow('missing');
	});

	it('loses no more anywhere when a neighbour goes', () => {
		const without = yearOf({ ...input, layout: testLayout(trackers.slice(1), [model]) });
		for (const one of without.trackers) {
			const before = result.trackers.find((other) => other.trackerId === one.trackerId);
			if (!before) throw new Error(one.trackerId);
			const rounding = 1e-12;
			expect(one.losses.beam).toBeLessThanOrEqual(before.losses.beam + rounding);
			expect(one.losses.sky).toBeLessThanOrEqual(before.losses.sky + rounding);
			for (const bound of ['low', 'likely', 'high'] as const) {
				expect(one.losses.total[bound]).toBeLessThanOrEqual(before.losses.total[bound] + rounding);
			}
		}
		expect(without.field.losses.total.likely).toBeLessThan(result.field.losses.total.likely);
	});

	it('stops when it is told to, and wants its settings', () => {
		expect(energyYear(input, () => false)).toBeNull();
		expect(energyYear(input, (done) => done < 0.7)).toBeNull();
		expect(() => energyYear({ ...input, energy: undefined })).toThrow('settings');
	});

	it('says why it could be otherwise', () => {
		expect(result.reasons.map((reason) => reason.id)).toEqual([
			'strings',
			'sky-model',
			'weather',
			'heights',
			'ground',
			'sky-view',
			'steps'
		]);
		const other = yearOf({ ...input, energy: clear });
		// Each run shows the other's model.
		near(result.field.otherModel.withoutKwhM2, other.field.without.total, 1e-9);
		near(result.field.otherModel.totalLoss, other.field.losses.total.likely, 1e-9);
	});
});

describe('alike tables', () => {
	it('by rectangles give what they give by cutting, on level and on rising ground', () => {
		// A kerb in the north, too low to shade anything, sends every table the long way.
		const kerb = {
			id: 'o1',
			kind: 'box' as const,
			name: '',
			eastM: 0,
			northM: 2000,
			sizeXM: 1,
			sizeYM: 1,
			heightM: 0.2,
			turnDeg: 0
		};
		const strung = testModel({ moduleColumns: 6, moduleRows: 2, modulesPerString: 4, frameMarginM: 0.05 });
		const average: EnergySettings = { ...clear, sky: { source: 'average', monthlyHorizontalKwhM2: sums } };
		for (const risePercent of [0, 6]) {
			const ground = { kind: 'plane' as const, heightM: 0, risePercent: -risePercent, riseTowardsDeg: 0 };
			const ask = (plot: Plot) =>
				yearOf(
					runOf([], average, { plot, layout: testLayout(testGrid(4, 4, 9, 8), [strung]), stepMinutes: 20 })
				);
			const quick = ask(testPlot({ ground }));
			const long = ask(testPlot({ ground, obstacles: [kerb] }));
			quick.trackers.forEach((one, k) => {
				const other = long.trackers[k];
				near(one.losses.beam, other.losses.beam, 1e-9);
				near(one.losses.sky, other.losses.sky, 1e-9);
				near(one.losses.electrical.likely, other.losses.electrical.likely, 1e-6);
				near(one.losses.electrical.high, other.losses.electrical.high, 1e-6);
			});
			expect(quick.field.losses.electrical.high).toBeGreaterThan(0);
		}
	});
});

describe('the coarse grid of suns for the sky view', () => {
	it('gives between its suns what is computed there: mean of the loss within 0.3 points of the sky', () => {
		const field = prepareField({
			place: testPlace,
			plot: testPlot(),
			layout: testLayout(testGrid(5, 5, 13, 11), [model])
		});
		const { engine, skyline } = field;
		const directions = skyDirections();
		const shares = new Float64Array(engine.count);
		const mean = (sun: { azimuthDeg: number; elevationDeg: number }) =>
			skyView(engine, skyline, directions, sun, 0, engine.count, shares).lost.reduce((a, b) => a + b, 0) /
			engine.count;
		const corners = skyCorners();
		for (const azimuthDeg of [97.5, 142, 187.5]) {
			for (const elevationDeg of [4, 15, 27, 42, 60]) {
				findCorners(azimuthDeg, elevationDeg, corners);
				let between = 0;
				for (let c = 0; c < 4; c++) between += corners.weight[c] * mean(nodeSun(corners.node[c]));
				near(between, mean({ azimuthDeg, elevationDeg }), 0.003);
			}
		}
	});
});

describe('an average year from monthly sums', () => {
	it('gives the sums back', () => {
		const result = yearOf(
			runOf([testTracker(0, 0, 0)], { ...clear, sky: { source: 'average', monthlyHorizontalKwhM2: sums } })
		);
		result.horizontal.monthlyGlobalKwhM2.forEach((sum, month) => near(sum, sums[month], 1e-9));
		expect(result.horizontal.unplacedKwhM2).toBe(0);
		expect(result.model.linkeTurbidity).toBeNull();
		// Steps that do not fill a day are shortened.
		const odd = yearOf(
			runOf(
				[testTracker(0, 0, 0)],
				{ ...clear, sky: { source: 'average', monthlyHorizontalKwhM2: sums } },
				{ stepMinutes: 17 }
			)
		);
		expect(odd.model.stepMinutes).toBe(16);
	});
});

describe('the real year of Golden (public TMY3 data of the US government)', () => {
	const sky = weatherSky(golden);
	const weather = weatherSums(golden);
	const input = runOf([testTracker(0, 0, 0)], { ...clear, sky }, { place: goldenPlace, stepMinutes: 10 });
	const result = yearOf(input);

	it('is kept hour by hour and comes back as it was', () => {
		expect(sky.spans).toHaveLength(12);
		expect(weatherYearOf(sky).rows.map((row) => [row.startMs, row.ghi, row.dni, row.dhi])).toEqual(
			golden.rows.map((row) => [row.startMs, row.ghi, row.dni, row.dhi])
		);
	});

	it('keeps its sums: direct and diffuse to rounding, global within the closure', () => {
		// What the file gives while the sun is down by its own reckoning is all that may go.
		near(result.horizontal.directNormalKwhM2, weather.dni, 0.2);
		near(result.horizontal.diffuseKwhM2, weather.dhi, 1e-9);
		near(result.horizontal.globalKwhM2, weather.ghi, 0.005 * weather.ghi);
		expect(result.closure).toMatchObject({ hours: 3881 });
		near(result.closure?.meanWm2 ?? Number.NaN, 0.12, 1);
		expect(result.closure?.rmsWm2).toBeLessThan(2);
	});

	it('gives a table alone what mid-hour sums give, within 0.5 %', () => {
		const gain = trackingGain(golden, { model: 'hay-davies', albedo: 0.2 });
		near(result.field.without.total / gain.twoAxisKwhM2, 1, 0.005);
		// 2557.8 kWh/m², computed independently with mid-hour suns.
		near(result.field.without.total / 2557.8, 1, 0.005);
	});
});

describe('settings that cannot be computed', () => {
	const of = (sky: EnergySettings['sky'], place = testPlace) => checkEnergy(place, { ...clear, sky }, 10);

	it('are refused with the field and the remedy', () => {
		expect(of({ source: 'average', monthlyHorizontalKwhM2: sums })).toBeNull();
		expect(
			of({ source: 'average', monthlyHorizontalKwhM2: sums.map((sum, m) => (m === 3 ? 390 : sum)) })
		).toMatchObject({ path: 'sky.monthlyHorizontalKwhM2.3' });
		const sky = weatherSky(golden);
		expect(of(sky, goldenPlace)).toBeNull();
		expect(of(sky)?.message).toMatch(/km from this one/);
		expect(of({ ...sky, ghi: sky.ghi.slice(1) }, goldenPlace)).toMatchObject({ path: 'sky.ghi' });
		expect(of({ ...sky, spans: sky.spans.slice(1) }, goldenPlace)?.message).toMatch(/one whole year/);
	});
});

describe('turbidity where none was given (rule of thumb, no source)', () => {
	it('runs from 3 in the darkest month to 4 in the brightest, and is 4 between the tropics', () => {
		const north = defaultLinkeTurbidity(45);
		const south = defaultLinkeTurbidity(-35);
		expect([north[0], north[6]]).toEqual([3, 4]);
		expect([south[0], south[6]]).toEqual([4, 3]);
		expect(new Set(defaultLinkeTurbidity(10))).toEqual(new Set([4]));
	});
});
