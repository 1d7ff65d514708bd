/** How clear sky, decomposition, average year, transposition and string effect behave; their values stand in checks.test.ts. */
import { describe, expect, it } from 'vitest';
import {
	ashraeClearSky,
	averageYear,
	clearBeam,
	collaresPereiraRablHourShare,
	dayOfYear,
	extraterrestrialDayWh,
	groundReflected,
	haurwitz,
	hottelTransmittance,
	ineichenPerez,
	linkeTurbidityOf,
	liuJordanHourShare,
	MONTH_DAYS,
	planeOfArray,
	renormalise,
	stringEffect,
	sunsetHourAngleDeg,
	twoAxisPlane,
	type PlaneRequest
} from '../../src/lib/core';

const RAD = Math.PI / 180;

describe('outside the air', () => {
	it('the sun that stays up or down has its sunset at 180 or 0', () => {
		expect([sunsetHourAngleDeg(80, 23), sunsetHourAngleDeg(80, -23)]).toEqual([180, 0]);
		expect(extraterrestrialDayWh(80, 355)).toBe(0);
	});

	it('counts days in local time', () => {
		expect(dayOfYear(Date.UTC(2024, 11, 31, 23))).toBe(366);
		expect(dayOfYear(Date.UTC(2024, 11, 31, 23), 1)).toBe(1);
	});
});

describe('clear sky', () => {
	it('more haze, less beam; the beam never exceeds the global; a turbidity is taken by month', () => {
		for (const altitudeM of [0, 1500, 4000]) {
			for (let zenithDeg = 0; zenithDeg < 90; zenithDeg += 0.5) {
				let before = Infinity;
				for (let linkeTurbidity = 1; linkeTurbidity <= 8; linkeTurbidity++) {
					const sky = ineichenPerez({ zenithDeg, altitudeM, linkeTurbidity });
					expect(sky.directNormal).toBeLessThanOrEqual(before);
					expect(sky.directNormal * Math.cos(zenithDeg * RAD)).toBeLessThanOrEqual(
						sky.globalHorizontal * (1 + 1e-12)
					);
					expect(sky.diffuseHorizontal).toBeGreaterThanOrEqual(0);
					before = sky.directNormal;
				}
			}
		}
		const monthly = [2.5, 2.6, 3, 3.4, 3.6, 3.8, 4, 3.9, 3.5, 3, 2.7, 2.5];
		expect(linkeTurbidityOf(monthly, 6)).toBe(4);
		expect(() => linkeTurbidityOf(monthly.slice(1), 6)).toThrow(/12 monthly values/);
		expect(() => linkeTurbidityOf([...monthly.slice(0, 11), 0], 11)).toThrow(/month 12/);
	});

	it('is dark below the horizon', () => {
		expect([clearBeam(0), clearBeam(-3)]).toEqual([0, 0]);
		expect([haurwitz(90), haurwitz(120), hottelTransmittance(95, 0, 'tropical')]).toEqual([0, 0, 0]);
		expect(ineichenPerez({ zenithDeg: 91, altitudeM: 0, linkeTurbidity: 3 }).globalHorizontal).toBe(0);
		expect(ashraeClearSky(-1, 5).globalHorizontal).toBe(0);
	});
});

describe('decomposition', () => {
	it('hour shares are brought to the sum 1, end at sunset, and a day without light stays dark', () => {
		const middles = Array.from({ length: 24 }, (_, i) => i * 15 - 172.5);
		const sum = (values: number[]) => values.reduce((total, value) => total + value, 0);
		const rt = middles.map((w) => collaresPereiraRablHourShare(w, 90));
		const rd = middles.map((w) => liuJordanHourShare(w, 90));
		expect(sum(renormalise(rt))).toBeCloseTo(1, 12);
		expect(sum(renormalise(rd))).toBeCloseTo(1, 12);
		expect(Math.min(...rt)).toBe(0);
		expect(renormalise([0, 0])).toEqual([0, 0]);
	});
});

describe('average year', () => {
	const sums = [52, 74, 118, 148, 180, 198, 212, 186, 138, 92, 56, 44];
	const year = (latitude: number, monthly: readonly number[], step?: number) => {
		const answer = averageYear(latitude, monthly, step);
		if (!answer.ok) throw new Error(answer.message);
		return answer.months;
	};

	it.each([60, 20, 10])('gives the monthly sums back exactly, steps of %d minutes', (step) => {
		for (const month of year(42, sums, step)) {
			const kwh = (values: number[]) =>
				(values.reduce((sum, value) => sum + value, 0) * month.days * step) / 60 / 1000;
			const global = kwh(month.steps.map(({ globalHorizontal }) => globalHorizontal));
			const diffuse = kwh(month.steps.map(({ diffuseHorizontal }) => diffuseHorizontal));
			const beam = kwh(
				month.steps.map(
					({ directNormal, elevationDeg }) => directNormal * Math.max(0, Math.sin(elevationDeg * RAD))
				)
			);
			expect(global).toBeCloseTo(sums[month.month], 9);
			expect(diffuse).toBeCloseTo(sums[month.month] * month.diffuseShare, 9);
			expect(beam + diffuse).toBeCloseTo(global, 9);
			expect(month.days).toBe(MONTH_DAYS[month.month]);
		}
	});

	it('is alike before and after noon, highest at noon, and its beam stays below what the sun sends', () => {
		for (const { steps } of year(42, sums)) {
			for (let i = 0; i < 12; i++) {
				expect(steps[i].globalHorizontal).toBeCloseTo(steps[23 - i].globalHorizontal, 9);
				expect(steps[i].directNormal).toBeLessThan(1361);
				expect(steps[i].diffuseHorizontal).toBeLessThanOrEqual(steps[i].globalHorizontal);
			}
			const globals = steps.map(({ globalHorizontal }) => globalHorizontal);
			expect(Math.max(...globals)).toBe(Math.max(globals[11], globals[12]));
		}
	});

	it('a dull month keeps its diffuse sum though hours near sunset are all diffuse', () => {
		const dull = year(
			42,
			sums.map((sum) => sum * 0.35)
		);
		for (const month of dull) {
			const diffuse = month.steps.reduce((sum, step) => sum + step.diffuseHorizontal, 0);
			expect((diffuse * month.days) / 1000).toBeCloseTo(sums[month.month] * 0.35 * month.diffuseShare, 9);
		}
	});

	it('names a sum that cannot be, a list that is no year, and the light of a month without a sun', () => {
		expect(averageYear(42, [...sums.slice(0, 11), 440])).toMatchObject({
			ok: false,
			month: 11,
			message: expect.stringMatching(/sum of December is 440 kWh/)
		});
		expect(averageYear(42, [-1, ...sums.slice(1)])).toMatchObject({ ok: false, month: 0 });
		expect(averageYear(42, [Number.NaN, ...sums.slice(1)])).toMatchObject({ ok: false, month: 0 });
		expect(averageYear(42, sums.slice(1))).toMatchObject({ ok: false, month: null });
		const north = year(67.5, [0.4, 10, 45, 95, 140, 150, 140, 95, 50, 18, 2, 0]);
		expect(north[11].steps.every(({ globalHorizontal }) => globalHorizontal === 0)).toBe(true);
		expect(north[11].unplacedKwhM2).toBe(0);
	});
});

describe('transposition', () => {
	it('shade takes beam and circumsolar by the lit share, the even sky by the sky that is left', () => {
		const bare: Omit<PlaneRequest, 'azimuthDeg' | 'tiltDeg'> = {
			sun: { azimuthDeg: 120, elevationDeg: 25 },
			directNormal: 700,
			diffuseHorizontal: 90,
			extraterrestrialNormal: 1361,
			albedo: 0.2,
			model: 'hay-davies'
		};
		for (const model of ['isotropic', 'hay-davies', 'hdkr', 'perez'] as const) {
			const open = twoAxisPlane({ ...bare, model });
			expect(open.beam).toBeCloseTo(700, 9);
			const shaded = twoAxisPlane({ ...bare, model, litShare: 0.4, skyViewShare: 0.9, groundViewShare: 0.5 });
			expect(shaded.beam).toBeCloseTo(open.beam * 0.4, 9);
			expect(shaded.circumsolar).toBeCloseTo(open.circumsolar * 0.4, 9);
			expect(shaded.isotropic).toBeCloseTo(open.isotropic * 0.9, 9);
			expect(shaded.ground).toBeCloseTo(open.ground * 0.5, 9);
			expect(shaded.total).toBeCloseTo(
				shaded.beam + shaded.circumsolar + shaded.isotropic + shaded.horizon + shaded.ground,
				9
			);
		}
	});

	it('level ground gets its global back, a plane seen from behind no beam, and the night only what is given', () => {
		const level = {
			azimuthDeg: 0,
			tiltDeg: 0,
			sun: { azimuthDeg: 200, elevationDeg: 30 },
			directNormal: 500,
			diffuseHorizontal: 100,
			extraterrestrialNormal: 1361,
			albedo: 0.2
		};
		for (const model of ['isotropic', 'hay-davies', 'hdkr', 'perez'] as const) {
			expect(planeOfArray({ ...level, model }).total).toBeCloseTo(350, 9);
		}
		const behind = planeOfArray({ ...level, tiltDeg: 90, model: 'hay-davies' });
		expect([behind.beam, behind.circumsolar]).toEqual([0, 0]);
		const night = planeOfArray({
			...level,
			sun: { azimuthDeg: 0, elevationDeg: -5 },
			directNormal: 3,
			diffuseHorizontal: 2,
			model: 'perez'
		});
		expect([night.beam, night.circumsolar]).toEqual([0, 0]);
		expect(night.total).toBeGreaterThanOrEqual(0);
		expect(groundReflected(500, 0.2, 90)).toBeCloseTo(50, 12);
	});
});

describe('string effect of Martinez-Moreno, Munoz and Lorenzo 2010, eq. 6', () => {
	it('lies between the geometric share and all, and is the geometric share without a shaded block', () => {
		for (let share = 0; share <= 1; share += 0.05) {
			for (let shadedBlocks = 0; shadedBlocks <= 12; shadedBlocks++) {
				const found = stringEffect({ geometricShare: share, shadedBlocks, blocks: 12 });
				expect(found.loss).toBeGreaterThanOrEqual(share);
				expect(found.loss).toBeLessThanOrEqual(1);
				expect([found.least, found.most]).toEqual([share, 1]);
				if (shadedBlocks === 0) expect(found.loss).toBeCloseTo(share, 12);
				else if (share < 0.99) expect(found.loss).toBeLessThan(1);
			}
		}
	});

	it('refuses shares and counts that cannot be', () => {
		expect(() => stringEffect({ geometricShare: 1.1, shadedBlocks: 0, blocks: 3 })).toThrow(/1.1/);
		expect(() => stringEffect({ geometricShare: 0.1, shadedBlocks: 4, blocks: 3 })).toThrow(/4 shaded/);
		expect(() => stringEffect({ geometricShare: 0.1, shadedBlocks: 0, blocks: 0 })).toThrow();
	});
});
