import { describe, expect, it, vi } from 'vitest';
import { readFileSync } from 'node:fs';
import { fieldLoss } from '../../src/lib/core';

vi.setConfig({ testTimeout: 60000 });

interface LossCase {
	latitudeDeg: number;
	longitudeDeg: number;
	name: string;
	widthM: number;
	heightM: number;
	pitchEastWestM: number;
	pitchNorthSouthM: number;
	stagger: number;
	expected: {
		beamLoss: number;
		meanShadedShare: number;
		anyShadeShareOfDaylight: number;
		daylightH: number;
		points: { xM: number; yM: number; shadedShareOfDaylight: number }[];
	};
}
const { cases } = JSON.parse(
	readFileSync(new URL('../fixtures/checks/field-loss.json', import.meta.url), 'utf8')
) as { cases: LossCase[] };

/** Middle of 13 x 13 on level ground; every second row moved east by a part of the pitch. */
function grid(check: LossCase) {
	const trackers = [];
	for (let row = -6; row <= 6; row++) {
		for (let column = -6; column <= 6; column++) {
			const shift = row % 2 !== 0 ? check.stagger * check.pitchEastWestM : 0;
			trackers.push({
				id: `${row} ${column}`,
				eastM: column * check.pitchEastWestM + shift,
				northM: row * check.pitchNorthSouthM,
				upM: 0
			});
		}
	}
	return trackers;
}

describe('annual beam loss of level fields against polygon unions made with Shapely and astronomy-engine', () => {
	it('has cases to compare', () => expect(cases.length).toBeGreaterThan(10));
	for (const check of cases) {
		it(`${check.name} at ${check.latitudeDeg} degrees: loss within 0.0005`, () => {
			const { daylightH, trackers } = fieldLoss({
				latitudeDeg: check.latitudeDeg,
				longitudeDeg: check.longitudeDeg,
				year: 2025,
				stepMinutes: 10,
				refraction: false,
				beam: 'meinel',
				model: { widthM: check.widthM, heightM: check.heightM },
				trackers: grid(check),
				only: ['0 0'],
				points: check.expected.points.map(({ xM, yM }) => ({ xM, yM }))
			});
			const [middle] = trackers;
			expect(Math.abs(daylightH - check.expected.daylightH)).toBeLessThan(1);
			expect(Math.abs(middle.beamLoss - check.expected.beamLoss)).toBeLessThan(0.0005);
			expect(Math.abs(middle.meanShadedShare - check.expected.meanShadedShare)).toBeLessThan(0.0005);
			expect(Math.abs(middle.anyShadeShareOfDaylight - check.expected.anyShadeShareOfDaylight)).toBeLessThan(
				0.001
			);
			middle.points?.forEach((point, k) => {
				const expected = check.expected.points[k].shadedShareOfDaylight;
				expect(Math.abs(point.shadedShareOfDaylight - expected)).toBeLessThan(0.001);
			});
		});
	}
});
