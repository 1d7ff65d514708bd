import { describe, expect, it } from 'vitest';
import { airMass, clearBeam, irradiance } from '../../src/lib/core';

describe('air mass of Kasten and Young 1989 (values from the published formula)', () => {
	const rows = [
		[0, 0.9997],
		[30, 1.154],
		[60, 1.9943],
		[75, 3.8129],
		[80, 5.586],
		[85, 10.3058],
		[88, 19.4332],
		[90, 37.9196]
	];
	for (const [zenith, expected] of rows) {
		it(`zenith ${zenith}`, () => expect(Math.abs(airMass(zenith) - expected)).toBeLessThan(0.0001));
	}
});

describe('clear beam', () => {
	// Meinel and Meinel 1976 with 1353 W/m² and the air mass of Kasten and Young; tolerance 0.1 W/m².
	const meinel = [
		[0, 947.2],
		[30, 913.3],
		[45, 862.0],
		[60, 765.5],
		[75, 559.1],
		[80, 430.6],
		[85, 238.8]
	];
	for (const [zenith, expected] of meinel) {
		it(`Meinel at zenith ${zenith}`, () => {
			expect(Math.abs(clearBeam(90 - zenith, 0, 1353) - expected)).toBeLessThan(0.1);
		});
	}
	// Laue 1970 at 1 km.
	for (const [zenith, expected] of [
		[0, 1004.0],
		[60, 847.8],
		[80, 559.7]
	]) {
		it(`Laue at 1 km, zenith ${zenith}`, () => {
			expect(Math.abs(clearBeam(90 - zenith, 1000, 1353) - expected)).toBeLessThan(0.1);
		});
	}
	it('is nothing at and below the horizon', () => expect([clearBeam(0), clearBeam(-3)]).toEqual([0, 0]));
});

describe('sky diffuse on a two-axis tracker (Perez et al. 1990, Hay and Davies 1980, isotropic; from the formulas)', () => {
	// Tilt = zenith, diffuse horizontal, direct normal; extraterrestrial 1361; Perez, isotropic, Hay-Davies; 0.05 W/m².
	const rows = [
		[30, 100, 900, 113.34, 93.3, 107.96],
		[60, 100, 800, 151.7, 75.0, 148.48],
		[75, 80, 600, 145.83, 50.35, 164.42],
		[80, 60, 450, 123.36, 35.21, 137.81],
		[60, 200, 200, 211.84, 150.0, 186.74],
		[45, 300, 0, 265.7, 256.07, 256.07]
	];
	for (const [zenithDeg, diffuseHorizontal, directNormal, perez, isotropic, hayDavies] of rows) {
		it(`zenith ${zenithDeg}, diffuse ${diffuseHorizontal}, direct ${directNormal}`, () => {
			const ask = (model: 'perez' | 'isotropic' | 'hay-davies') =>
				irradiance({
					tiltDeg: zenithDeg,
					zenithDeg,
					angleOfIncidenceDeg: 0,
					directNormal,
					diffuseHorizontal,
					extraterrestrialNormal: 1361,
					model
				}).skyDiffuse;
			expect(Math.abs(ask('perez') - perez)).toBeLessThan(0.05);
			expect(Math.abs(ask('isotropic') - isotropic)).toBeLessThan(0.05);
			expect(Math.abs(ask('hay-davies') - hayDavies)).toBeLessThan(0.05);
		});
	}
});
