import { describe, expect, it } from 'vitest';
import { fieldShade, prepareField, type Layout, type Plot } from '$lib/core';
import { emptyPlot, modelLibrary } from '$lib/schema';
import { castersOf, dayCauses, noSunWords, obstacleCastersOf } from './shaded-by';

const place = {
	latitudeDeg: 41.2,
	longitudeDeg: 14.5,
	altitudeM: 300,
	timeZone: 'Europe/Rome',
	magneticDeclinationDeg: 0
};
const model = modelLibrary[1];
/** Three in a line from west to east, 13 m apart, and one far to the north. */
const spots: [string, number, number][] = [
	['west', 0, 0],
	['middle', 13, 0],
	['east', 26, 0],
	['north', 13, 60]
];
const layout: Layout = {
	version: 1,
	models: [model],
	trackers: spots.map(([id, eastM, northM]) => ({
		id,
		tag: id,
		modelId: model.id,
		eastM,
		northM,
		axisHeightM: null,
		posture: { kind: 'following' }
	})),
	mounts: { common: null, exceptions: {}, fromRunId: null }
};
const field = prepareField({ place, plot: emptyPlot(), layout });

describe('who shades a tracker', () => {
	it('names the neighbours that stand up-sun, the one that shades most first', () => {
		expect(castersOf(field, 0, { azimuthDeg: 90, elevationDeg: 5 })).toEqual([1, 2]);
		expect(castersOf(field, 1, { azimuthDeg: 270, elevationDeg: 5 })).toEqual([0]);
	});

	it('names none exactly when the tracker is in full sun', () => {
		for (const sun of [
			{ azimuthDeg: 90, elevationDeg: 5 },
			{ azimuthDeg: 120, elevationDeg: 9 },
			{ azimuthDeg: 180, elevationDeg: 25 },
			{ azimuthDeg: 240, elevationDeg: 6 }
		]) {
			const shares = fieldShade(field, sun);
			layout.trackers.forEach((_, index) => {
				expect(castersOf(field, index, sun).length > 0).toBe(shares[index] > 1e-9);
			});
		}
	});

	it('names obstacles too, and sums over the moments of a day', () => {
		const low = { azimuthDeg: 90, elevationDeg: 5 };
		const plot: Plot = {
			...emptyPlot(),
			obstacles: [
				{
					id: 'o1',
					kind: 'box',
					name: 'Barn',
					eastM: 45,
					northM: 0,
					sizeXM: 4,
					sizeYM: 30,
					heightM: 12,
					turnDeg: 0
				}
			]
		};
		const beside = prepareField({ place, plot, layout });
		expect(obstacleCastersOf(beside, 2, low, 355)).toEqual(['Barn']);
		expect(castersOf(beside, 2, low)).toEqual([]);
		expect(obstacleCastersOf(field, 2, low, 355)).toEqual([]);
		// From the east the barn shades the eastern one alone, from the west the middle one does.
		expect(dayCauses(beside, 2, [low], 355)).toEqual(['Barn']);
		expect(dayCauses(beside, 2, [{ azimuthDeg: 270, elevationDeg: 5 }], 355)[0]).toBe('middle');
		expect(new Set(dayCauses(beside, 2, [low, { azimuthDeg: 270, elevationDeg: 5 }], 355))).toEqual(
			new Set(['Barn', 'middle', 'west'])
		);
		expect(dayCauses(beside, 2, [{ azimuthDeg: 90, elevationDeg: -5 }], 355)).toEqual([]);
	});

	it('sees a tree in leaf or bare by the day of the year', () => {
		const plot: Plot = {
			...emptyPlot(),
			obstacles: [
				{
					id: 'o1',
					kind: 'tree',
					name: 'Lime',
					eastM: 45,
					northM: 0,
					heightM: 12,
					crownBaseM: 0,
					crownRadiusM: 6,
					trunkRadiusM: 0,
					crownTransmission: 1,
					leafTransmission: 0.1,
					growthMPerYear: 0,
					maxHeightM: 12,
					crownShape: 'cylinder'
				}
			]
		};
		const beside = prepareField({ place, plot, layout });
		const low = { azimuthDeg: 90, elevationDeg: 5 };
		// Bare, this invented crown lets all light through: only in leaf does it shade.
		expect(obstacleCastersOf(beside, 2, low, 172)).toEqual(['Lime']);
		expect(obstacleCastersOf(beside, 2, low, 355)).toEqual([]);
		expect(dayCauses(beside, 2, [low], 172)).toEqual(['Lime']);
		expect(dayCauses(beside, 2, [low], 355)).toEqual([]);
	});

	it('blames nobody at night, behind the skyline or for a table with its back to the sun', () => {
		const night = { azimuthDeg: 300, elevationDeg: -10 };
		expect(castersOf(field, 1, night)).toEqual([]);
		expect(noSunWords(field, 1, night)).toBe('the sun is down');
		const low = { azimuthDeg: 90, elevationDeg: 5 };
		expect(noSunWords(field, 0, low)).toBeNull();
		const skyline = [
			{ azimuthDeg: 0, elevationDeg: 8 },
			{ azimuthDeg: 180, elevationDeg: 8 }
		];
		const hemmed = prepareField({ place, plot: { ...emptyPlot(), skyline }, layout });
		expect(castersOf(hemmed, 0, low)).toEqual([]);
		expect(noSunWords(hemmed, 0, low)).toBe('the sun is behind the skyline');
		const west = structuredClone(layout);
		west.trackers[0].posture = { kind: 'standing', azimuthDeg: 270, tiltDeg: 80 };
		expect(noSunWords(prepareField({ place, plot: emptyPlot(), layout: west }), 0, low)).toBe(
			'its back is to the sun'
		);
	});
});
