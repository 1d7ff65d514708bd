/** Random fields of documents: stops, gaps, offsets, postures, every kind of obstacle and of ground. */
import type { FieldInput, Ground, Obstacle, PlanPoint, Posture, Tracker, TrackerModel } from '../../core';

type Random = () => number;
const pick = <T>(random: Random, from: readonly T[]): T => from[Math.floor(random() * from.length)];
const between = (random: Random, low: number, high: number): number => low + (high - low) * random();

function randomModel(random: Random, id: string): TrackerModel {
	const widthM = between(random, 1, 14);
	return {
		id,
		name: id,
		widthM,
		heightM: between(random, 1, 9),
		frameMarginM: pick(random, [0, 0.2 * random()]),
		centreGapM: pick(random, [0, 0.3 * random(), widthM]),
		axisHeightM: between(random, 1, 6),
		tiltAxisOffsetM: pick(random, [0, random() - 0.3]),
		tableOffsetM: pick(random, [0, 0.4 * random()]),
		centreShiftM: pick(random, [0, random() - 0.5]),
		minTiltDeg: pick(random, [0, 5, 20]),
		maxTiltDeg: pick(random, [90, 80, 60]),
		stops: pick(random, [
			null,
			{ fromDeg: 50, toDeg: 310 },
			{ fromDeg: 240, toDeg: 120 },
			{ fromDeg: 360 * random(), toDeg: 360 * random() }
		]),
		night: { azimuthDeg: pick(random, [null, 90]), tiltDeg: pick(random, [0, 30]) },
		windTiltDeg: pick(random, [0, 15]),
		slewDegPerS: 0.5,
		sensorHeadRadiusM: 0.05,
		sensorViewDeg: 85,
		sensorLeadM: 6,
		moduleColumns: 5,
		moduleRows: 3,
		powerW: 5000
	};
}

function randomPosture(random: Random): Posture {
	const kind = random();
	if (kind < 0.7) return { kind: 'following' };
	if (kind < 0.78) return { kind: 'flat' };
	if (kind < 0.84) return { kind: 'wind' };
	if (kind < 0.9) return { kind: 'night' };
	return { kind: 'standing', azimuthDeg: 360 * random(), tiltDeg: pick(random, [0, 90, 90 * random()]) };
}

const L_SHAPE: PlanPoint[] = [
	[0, 0],
	[8, 0],
	[8, 3],
	[3, 3],
	[3, 9],
	[0, 9]
];

function randomObstacle(random: Random, id: string): Obstacle {
	const at = { id, name: id, eastM: between(random, -30, 30), northM: between(random, -30, 30) };
	const heightM = between(random, 0.1, 25);
	switch (Math.floor(6 * random())) {
		case 0:
			return {
				...at,
				kind: 'box',
				sizeXM: between(random, 0.1, 12),
				sizeYM: between(random, 0.1, 12),
				heightM,
				turnDeg: pick(random, [0, 90, 360 * random()])
			};
		case 1:
			return {
				...at,
				kind: 'building',
				corners: random() < 0.5 ? L_SHAPE : [...L_SHAPE].reverse(),
				heightM,
				roof: pick(random, [
					{ kind: 'flat' },
					{ kind: 'pitched', riseM: 4 * random(), ridgeDeg: 360 * random() }
				])
			};
		case 2:
			return {
				...at,
				kind: 'wall',
				line: [
					[0, 0],
					[between(random, 1, 20), between(random, -5, 5)],
					[between(random, 1, 20), between(random, 5, 15)]
				],
				heightM,
				thicknessM: between(random, 0.02, 1),
				transmission: pick(random, [0, 0.5, 1])
			};
		case 3:
			return { ...at, kind: 'mast', heightM, radiusM: between(random, 0.02, 1) };
		default:
			return {
				...at,
				kind: 'tree',
				heightM: heightM + 1,
				crownBaseM: pick(random, [0, heightM * random()]),
				crownRadiusM: between(random, 0.1, 6),
				trunkRadiusM: pick(random, [0, 0.3]),
				crownTransmission: pick(random, [0, 0.4, 1]),
				growthMPerYear: random(),
				maxHeightM: heightM + 10 * random(),
				crownShape: pick(random, ['cylinder', 'cone', 'ellipsoid']),
				...(random() < 0.5 && { leafTransmission: 0.1 })
			};
	}
}

function randomGround(random: Random): Ground {
	const kind = random();
	if (kind < 0.5) return { kind: 'level', heightM: 0 };
	if (kind < 0.97) {
		return { kind: 'plane', heightM: 5, risePercent: 30 * random(), riseTowardsDeg: 360 * random() };
	}
	if (kind < 0.985) {
		const points = Array.from({ length: 12 }, (): [number, number, number] => [
			between(random, -40, 40),
			between(random, -40, 40),
			8 * random()
		]);
		return { kind: 'points', points };
	}
	return {
		kind: 'raster',
		westM: -40,
		southM: -40,
		cellM: 20,
		columns: 5,
		rows: 5,
		heightsM: Array.from({ length: 25 }, () => (random() < 0.1 ? null : 8 * random()))
	};
}

export function randomField(random: Random): FieldInput {
	const models = [randomModel(random, 'a'), randomModel(random, 'b')];
	const spread = pick(random, [6, 12, 25]);
	const trackers = Array.from({ length: 2 + Math.floor(5 * random()) }, (_, k): Tracker => ({
		id: `t${k}`,
		tag: `A0${k}`,
		modelId: random() < 0.7 ? 'a' : 'b',
		// Half of them on a grid, so that edges coincide; some upon each other.
		eastM: k % 2 === 0 ? spread * (k % 3) : between(random, -spread, 2 * spread),
		northM: k % 2 === 0 ? spread * Math.floor(k / 3) : between(random, -spread, 2 * spread),
		axisHeightM: pick(random, [null, 3, 4]),
		posture: randomPosture(random)
	}));
	return {
		place: {
			latitudeDeg: between(random, -70, 70),
			longitudeDeg: 0,
			altitudeM: 0,
			timeZone: 'UTC',
			magneticDeclinationDeg: 0
		},
		plot: {
			version: 1,
			boundary: [],
			ground: randomGround(random),
			skyline: [],
			obstacles: Array.from({ length: Math.floor(3 * random()) }, (_, k) => randomObstacle(random, `o${k}`)),
			setBackM: 0
		},
		layout: { version: 1, models, trackers, mounts: { common: null, exceptions: {}, fromRunId: null } },
		treeYears: pick(random, [0, 10, 300])
	};
}
