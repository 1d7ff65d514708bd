/** Invented documents for checks that need a whole field: a machine without extras, level ground. */
import type { Place, Plot, RunInput, Tracker, TrackerModel } from '../../core';

export const plainPlace: Place = {
	latitudeDeg: 45,
	longitudeDeg: 8,
	altitudeM: 0,
	timeZone: 'UTC',
	magneticDeclinationDeg: 0
};

export const plainModel = (changes: Partial<TrackerModel> = {}): TrackerModel => ({
	...{ id: 'plain', name: 'Plain', widthM: 6, heightM: 4, frameMarginM: 0, centreGapM: 0, axisHeightM: 3 },
	...{ tiltAxisOffsetM: 0, tableOffsetM: 0, centreShiftM: 0, minTiltDeg: 0, maxTiltDeg: 90, stops: null },
	...{ night: { azimuthDeg: null, tiltDeg: 0 }, windTiltDeg: 0, slewDegPerS: 0.5, sensorHeadRadiusM: 0 },
	...{ sensorViewDeg: 85, sensorLeadM: 6, moduleColumns: 6, moduleRows: 2, powerW: 5000 },
	...changes
});

export const plainPlot = (changes: Partial<Plot> = {}): Plot => ({
	version: 1,
	boundary: [],
	ground: { kind: 'level', heightM: 0 },
	skyline: [],
	obstacles: [],
	setBackM: 0,
	...changes
});

export const plainTrackers = (
	places: readonly (readonly [eastM: number, northM: number])[],
	posture: Tracker['posture'] = { kind: 'following' }
): Tracker[] =>
	places.map(([eastM, northM], k) => ({
		...{ id: `t${k}`, tag: `A${k + 1}`, modelId: 'plain', eastM, northM, axisHeightM: null, posture }
	}));

export const plainRun = (trackers: Tracker[], changes: Partial<RunInput> = {}): RunInput => ({
	place: plainPlace,
	plot: plainPlot(),
	layout: {
		version: 1,
		models: [plainModel()],
		trackers,
		mounts: { common: null, exceptions: {}, fromRunId: null }
	},
	winterRule: { kind: 'clear-above', elevationDeg: 15 },
	year: 2025,
	stepMinutes: 20,
	utcOffsetMinutes: 0,
	treeYears: 0,
	...changes
});
