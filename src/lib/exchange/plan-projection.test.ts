import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { localFromLonLat, lonLatFromLocal, roughBearingDeg, roughDistanceM } from './plan-projection';

/** Metres per degree on WGS84, latitude then longitude, from the ellipsoid's radii of curvature M and N (computed to 1 mm). */
const metresPerDegree: [latitudeDeg: number, north: number, east: number][] = [
	[0, 110574.276, 111319.491],
	[23.4, 110749.637, 102217.957],
	[40, 111034.633, 85393.857],
	[45, 111131.777, 78846.835],
	[68, 111535.714, 41821.529]
];

describe('the plan projection', () => {
	it.each(metresPerDegree)('agrees with the metres per degree at latitude %s', (latitudeDeg, north, east) => {
		const project = localFromLonLat({ latitudeDeg, longitudeDeg: 8 });
		// Small steps to both sides: the derivative at the place itself.
		const step = 1e-3;
		const [, above] = project(8, latitudeDeg + step);
		const [, below] = project(8, latitudeDeg - step);
		const [right] = project(8 + step, latitudeDeg);
		const [left] = project(8 - step, latitudeDeg);
		expect((above - below) / (2 * step)).toBeCloseTo(north, 2);
		expect((right - left) / (2 * step)).toBeCloseTo(east, 2);
	});

	it('puts the place at the origin', () => {
		const [eastM, northM] = localFromLonLat({ latitudeDeg: -35, longitudeDeg: 149 })(149, -35);
		expect(eastM).toBeCloseTo(0, 6);
		expect(northM).toBeCloseTo(0, 6);
	});

	it('matches a geodesic of 1400.705 m at azimuth 37.5577 degrees', () => {
		// Geodesic from 40 N 3.7 W to 40.01 N 3.69 W on WGS84, computed with an independent geodesic library.
		const [eastM, northM] = localFromLonLat({ latitudeDeg: 40, longitudeDeg: -3.7 })(-3.69, 40.01);
		expect(Math.hypot(eastM, northM)).toBeCloseTo(1400.705, 2);
		expect((Math.atan2(eastM, northM) * 180) / Math.PI).toBeCloseTo(37.5577, 2);
	});

	it('comes back to the same degrees within 1e-9', () => {
		fc.assert(
			fc.property(
				fc.double({ min: -75, max: 75, noNaN: true }),
				fc.double({ min: -179, max: 179, noNaN: true }),
				fc.double({ min: -0.1, max: 0.1, noNaN: true }),
				fc.double({ min: -0.1, max: 0.1, noNaN: true }),
				(latitudeDeg, longitudeDeg, dLat, dLon) => {
					const origin = { latitudeDeg, longitudeDeg };
					const [eastM, northM] = localFromLonLat(origin)(longitudeDeg + dLon, latitudeDeg + dLat);
					const [lon, lat] = lonLatFromLocal(origin)(eastM, northM);
					expect(Math.abs(lon - longitudeDeg - dLon)).toBeLessThan(1e-9);
					expect(Math.abs(lat - latitudeDeg - dLat)).toBeLessThan(1e-9);
				}
			)
		);
	});

	it('tells rough distances and directions', () => {
		expect(roughDistanceM([-3.7, 40], [-3.69, 40.01])).toBeGreaterThan(1400.705 * 0.994);
		expect(roughDistanceM([-3.7, 40], [-3.69, 40.01])).toBeLessThan(1400.705 * 1.006);
		expect(roughBearingDeg([8, 45], [8.01, 45])).toBeCloseTo(90, 6);
	});
});
