import type {
	Layout,
	Obstacle,
	Place,
	Plot,
	Posture,
	RunInput,
	Tracker,
	TrackerModel
} from '../../src/lib/core';

export const SEED = 20261201;
export const BENCH_YEAR = 2026;
export const STEP_MINUTES = 10;
const PITCH_EAST_M = 13;
const PITCH_NORTH_M = 11;

/** Mulberry32: the same seed gives the same field on every machine. */
export function seeded(seed: number): () => number {
	let state = seed >>> 0;
	return () => {
		state = (state + 0x6d2b79f5) >>> 0;
		let t = state;
		t = Math.imul(t ^ (t >>> 15), t | 1);
		t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
		return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
	};
}

/** Invented. */
export const place: Place = {
	latitudeDeg: 41.2,
	longitudeDeg: 14.5,
	altitudeM: 300,
	timeZone: 'Europe/Rome',
	magneticDeclinationDeg: 4
};

/** Invented. */
export const model: TrackerModel = {
	id: 'm',
	name: 'Bench six by four',
	widthM: 6,
	heightM: 4,
	frameMarginM: 0.04,
	centreGapM: 0,
	axisHeightM: 2.8,
	tiltAxisOffsetM: 0.2,
	tableOffsetM: 0.15,
	centreShiftM: 0,
	minTiltDeg: 5,
	maxTiltDeg: 85,
	stops: { fromDeg: 50, toDeg: 310 },
	night: { azimuthDeg: 90, tiltDeg: 10 },
	windTiltDeg: 5,
	slewDegPerS: 0.5,
	sensorHeadRadiusM: 0.03,
	sensorViewDeg: 85,
	sensorLeadM: 6,
	moduleColumns: 5,
	moduleRows: 3,
	powerW: 5000
};

/** Larger, with a clear slot, and stops narrow enough to hold it back on summer mornings and evenings. */
const large: TrackerModel = {
	...model,
	id: 'l',
	name: 'Bench eight by five',
	widthM: 8,
	heightM: 5,
	axisHeightM: 3.3,
	maxTiltDeg: 80,
	centreGapM: 0.3,
	stops: { fromDeg: 80, toDeg: 280 }
};

export const FIELDS = ['regular', 'staggered', 'sloped', 'rough'] as const;
/**
 * Regular: a square-ish grid on level ground. Staggered: every second row half a pitch aside. Sloped: the grid on a
 * plane. Rough: the same plane with pegs and axis heights scattered.
 */
export type FieldName = (typeof FIELDS)[number];

export const emptyPlot: Plot = {
	version: 1,
	boundary: [],
	ground: { kind: 'level', heightM: 0 },
	skyline: [],
	obstacles: [],
	setBackM: 0
};

/** One model, all following: every table stands in the same pose at any one moment. */
export function alikeField(name: FieldName, count: number): RunInput {
	const random = seeded(SEED);
	const columns = Math.ceil(Math.sqrt(count));
	const scatter = (metres: number): number => (name === 'rough' ? (2 * random() - 1) * metres : 0);
	const trackers = Array.from({ length: count }, (_, k): Tracker => {
		const row = Math.floor(k / columns);
		const aside = name === 'staggered' && row % 2 === 1 ? 0.5 : 0;
		const heightM = model.axisHeightM + scatter(0.4);
		return {
			id: `t${k}`,
			tag: `T${k}`,
			modelId: model.id,
			eastM: ((k % columns) + aside) * PITCH_EAST_M + scatter(0.6),
			northM: row * PITCH_NORTH_M + scatter(0.6),
			axisHeightM: name === 'rough' ? heightM : null,
			posture: { kind: 'following' }
		};
	});
	const layout: Layout = {
		version: 1,
		models: [model],
		trackers,
		mounts: { common: null, exceptions: {}, fromRunId: null }
	};
	const sloped = name === 'sloped' || name === 'rough';
	return {
		place,
		plot: sloped
			? { ...emptyPlot, ground: { kind: 'plane', heightM: 0, risePercent: 9, riseTowardsDeg: 95 } }
			: emptyPlot,
		layout,
		winterRule: { kind: 'clear-above', elevationDeg: 15 },
		year: BENCH_YEAR,
		stepMinutes: STEP_MINUTES,
		utcOffsetMinutes: 60,
		treeYears: 0
	};
}

/**
 * The same field with unlike poses: every third tracker is the larger model, whose stops clamp when the others still
 * follow; one of eleven stands still somewhere, one of seven is flat. Pitches a little wider for the larger ones.
 */
export function unlikeField(name: FieldName, count: number): RunInput {
	const random = seeded(SEED + 1);
	const input = alikeField(name, count);
	const postureOf = (k: number): Posture => {
		const azimuthDeg = 90 + random() * 180;
		const tiltDeg = 20 + random() * 60;
		if (k % 11 === 0) return { kind: 'standing', azimuthDeg, tiltDeg };
		return k % 7 === 0 ? { kind: 'flat' } : { kind: 'following' };
	};
	const trackers = input.layout.trackers.map((tracker, k): Tracker => ({
		...tracker,
		modelId: k % 3 === 0 ? large.id : model.id,
		eastM: tracker.eastM * 1.15,
		northM: tracker.northM * 1.15,
		axisHeightM:
			k % 3 === 0 && tracker.axisHeightM !== null ? tracker.axisHeightM + 0.5 : tracker.axisHeightM,
		posture: postureOf(k)
	}));
	return { ...input, layout: { ...input.layout, models: [model, large], trackers } };
}

/** Eight trees along the west side, half of them in leaf-thin light, a barn in the south and a skyline. */
export function planted(input: RunInput): RunInput {
	const tree = (k: number): Obstacle => ({
		id: `o${k}`,
		kind: 'tree',
		name: `Oak ${k}`,
		eastM: -12,
		northM: k * 9,
		heightM: 9,
		crownBaseM: 2,
		crownRadiusM: 3,
		trunkRadiusM: 0.25,
		crownTransmission: k % 2 === 0 ? 0.3 : 0,
		growthMPerYear: 0.4,
		maxHeightM: 14
	});
	const barn: Obstacle = {
		id: 'b',
		kind: 'box',
		name: 'Barn',
		eastM: 40,
		northM: -18,
		sizeXM: 18,
		sizeYM: 9,
		heightM: 6,
		turnDeg: 20
	};
	return {
		...input,
		plot: {
			...input.plot,
			skyline: [
				{ azimuthDeg: 60, elevationDeg: 2 },
				{ azimuthDeg: 140, elevationDeg: 5 },
				{ azimuthDeg: 250, elevationDeg: 3 }
			],
			obstacles: [...Array.from({ length: 8 }, (_, k) => tree(k)), barn]
		}
	};
}
