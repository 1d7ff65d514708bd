import type { Layout, Place, Plot, RunInput, Tracker, TrackerModel } from '../../src/lib/core';

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

export const place: Place = {
	latitudeDeg: 41.2,
	longitudeDeg: 14.5,
	altitudeM: 300,
	timeZone: 'Europe/Rome',
	magneticDeclinationDeg: 4
};

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

const plot: Plot = {
	version: 1,
	boundary: [],
	ground: { kind: 'level', heightM: 0 },
	skyline: [],
	obstacles: [],
	setBackM: 0
};

/** Level and alike: a square-ish grid of one model, all following. */
export function alikeField(count: number): RunInput {
	const columns = Math.ceil(Math.sqrt(count));
	const trackers = Array.from({ length: count }, (_, k): Tracker => ({
		id: `t${k}`,
		tag: `T${k}`,
		modelId: 'm',
		eastM: (k % columns) * 13,
		northM: Math.floor(k / columns) * 11,
		axisHeightM: null,
		posture: { kind: 'following' }
	}));
	const layout: Layout = {
		version: 1,
		models: [model],
		trackers,
		mounts: { common: null, exceptions: {}, fromRunId: null }
	};
	return {
		place,
		plot,
		layout,
		winterRule: { kind: 'clear-above', elevationDeg: 15 },
		year: 2026,
		stepMinutes: 10,
		utcOffsetMinutes: 60,
		treeYears: 0
	};
}

/** A slope with jittered pegs and heights, two models, a skyline, trees and a barn, some machines standing or flat. */
export function unlikeField(count: number, seed: number): RunInput {
	const random = seeded(seed);
	const input = alikeField(count);
	const large = {
		...model,
		id: 'l',
		widthM: 8,
		heightM: 5,
		axisHeightM: 3.3,
		maxTiltDeg: 80,
		centreGapM: 0.3
	};
	const trackers = input.layout.trackers.map((t, k): Tracker => ({
		...t,
		modelId: k % 3 === 0 ? 'l' : 'm',
		eastM: t.eastM * 1.15 + random() - 0.5,
		northM: t.northM * 1.15 + random() - 0.5,
		axisHeightM: k % 5 === 0 ? 3.2 : null,
		posture:
			k % 11 === 0
				? { kind: 'standing', azimuthDeg: 90 + random() * 180, tiltDeg: 20 + random() * 60 }
				: k % 7 === 0
					? { kind: 'flat' }
					: { kind: 'following' }
	}));
	const tree = (k: number) => ({
		id: `o${k}`,
		kind: 'tree' as const,
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
	return {
		...input,
		layout: { ...input.layout, models: [model, large], trackers },
		plot: {
			...input.plot,
			ground: { kind: 'plane', heightM: 0, risePercent: 9, riseTowardsDeg: 95 },
			skyline: [
				{ azimuthDeg: 60, elevationDeg: 2 },
				{ azimuthDeg: 140, elevationDeg: 5 },
				{ azimuthDeg: 250, elevationDeg: 3 }
			],
			obstacles: [
				...Array.from({ length: 8 }, (_, k) => tree(k)),
				{
					id: 'b',
					kind: 'box',
					name: 'Barn',
					eastM: 40,
					northM: -18,
					sizeXM: 18,
					sizeYM: 9,
					heightM: 6,
					turnDeg: 20
				}
			]
		}
	};
}
