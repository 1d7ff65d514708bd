import type { Layout, Place, Plot, Tracker, TrackerModel } from './document';

/** Plain documents for this room's tests: an invented machine, level ground, nothing else. */
export const testPlace: Place = {
	latitudeDeg: 45,
	longitudeDeg: 8,
	altitudeM: 0,
	timeZone: 'Europe/Rome',
	magneticDeclinationDeg: 0
};

export function testModel(changes: Partial<TrackerModel> = {}): TrackerModel {
	return {
		id: 'six-four',
		name: 'Six by four',
		widthM: 6,
		heightM: 4,
		frameMarginM: 0,
		centreGapM: 0,
		axisHeightM: 3,
		tiltAxisOffsetM: 0,
		tableOffsetM: 0,
		centreShiftM: 0,
		minTiltDeg: 0,
		maxTiltDeg: 90,
		stops: null,
		night: { azimuthDeg: null, tiltDeg: 0 },
		windTiltDeg: 0,
		slewDegPerS: 0.5,
		sensorHeadRadiusM: 0,
		sensorViewDeg: 85,
		sensorLeadM: 6,
		moduleColumns: 5,
		moduleRows: 3,
		powerW: 5000,
		...changes
	};
}

export function testPlot(changes: Partial<Plot> = {}): Plot {
	return {
		version: 1,
		boundary: [],
		ground: { kind: 'level', heightM: 0 },
		skyline: [],
		obstacles: [],
		setBackM: 0,
		...changes
	};
}

export function testTracker(
	index: number,
	eastM: number,
	northM: number,
	changes: Partial<Tracker> = {}
): Tracker {
	return {
		id: `t${index}`,
		tag: `A${String(index + 1).padStart(2, '0')}`,
		modelId: 'six-four',
		eastM,
		northM,
		axisHeightM: null,
		posture: { kind: 'following' },
		...changes
	};
}

export function testLayout(trackers: Tracker[], models: TrackerModel[] = [testModel()]): Layout {
	return { version: 1, models, trackers, mounts: { common: null, exceptions: {}, fromRunId: null } };
}

/** Places on a grid, row by row from the south. */
export function testGrid(columns: number, rows: number, pitchEastM: number, pitchNorthM: number): Tracker[] {
	return Array.from({ length: columns * rows }, (_, k) =>
		testTracker(k, (k % columns) * pitchEastM, Math.floor(k / columns) * pitchNorthM)
	);
}
