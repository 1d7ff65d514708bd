import { describe, expect, it } from 'vitest';
import type { DayShade, Layout, PlanPoint, Tracker, TrackerModel } from '$lib/core';
import { alignPoint } from './align';
import { minutesToClear } from './clear-time';
import { boxRing } from '$lib/core';
import { castOutline, castPoint, convexHull, groundPlane, groundPlanes } from './ground-shadow';
import {
	addTrackers,
	changeModel,
	changeTrackers,
	removeTrackers,
	retag,
	shiftTrackers
} from './layout-edit';
import { measure } from './measure';
import { boxOf, extentOf, idsInBox, nearestFoot, selectionAfterClick } from './pick';
import { pickTable, rayToGround, type TableQuad } from './ray-pick';

function tracker(id: string, eastM: number, northM: number, modelId = 'm'): Tracker {
	return {
		id,
		tag: id.toUpperCase(),
		modelId,
		eastM,
		northM,
		axisHeightM: null,
		posture: { kind: 'following' }
	};
}

// Only the id matters to these edits.
const model = { id: 'm', name: 'M' } as TrackerModel;
const other = { id: 'o', name: 'O' } as TrackerModel;

function layoutOf(...trackers: Tracker[]): Layout {
	return { version: 1, models: [model], trackers, mounts: { common: null, exceptions: {}, fromRunId: null } };
}

describe('layout edits', () => {
	it('shift what is selected and share what is not', () => {
		const before = layoutOf(tracker('a', 0, 0), tracker('b', 10, 0));
		const after = shiftTrackers(before, new Set(['b']), 0.1, -2);
		expect(after.trackers[1]).toMatchObject({ eastM: 10.1, northM: -2 });
		expect(after.trackers[0]).toBe(before.trackers[0]);
		expect(before.trackers[1].eastM).toBe(10);
	});

	it('keep places to the millimetre, so that a thousand nudges of 0.1 m add up to 100 m', () => {
		let layout = layoutOf(tracker('a', 0, 0));
		for (let i = 0; i < 1000; i += 1) layout = shiftTrackers(layout, new Set(['a']), 0.1, 0);
		expect(layout.trackers[0].eastM).toBe(100);
	});

	it('answer the same layout when nothing is shifted', () => {
		const before = layoutOf(tracker('a', 0, 0));
		expect(shiftTrackers(before, new Set(['a']), 0, 0)).toBe(before);
	});

	it('change several trackers at once', () => {
		const after = changeTrackers(layoutOf(tracker('a', 0, 0), tracker('b', 1, 1)), new Set(['a', 'b']), {
			axisHeightM: 3,
			posture: { kind: 'flat' }
		});
		expect(after.trackers.map((t) => t.axisHeightM)).toEqual([3, 3]);
		expect(after.trackers[1].posture).toEqual({ kind: 'flat' });
	});

	it('keep the models that are used, and only those', () => {
		const before = layoutOf(tracker('a', 0, 0), tracker('b', 1, 1));
		const mixed = changeModel(before, new Set(['a']), other);
		expect(mixed.models.map((m) => m.id)).toEqual(['m', 'o']);
		const all = changeModel(mixed, new Set(['b']), other);
		expect(all.models.map((m) => m.id)).toEqual(['o']);
	});

	it('take a tracker away together with its own mount', () => {
		const before = layoutOf(tracker('a', 0, 0), tracker('b', 1, 1));
		before.mounts.exceptions = { a: { edge: 'top', alongM: 0, outM: 0, forwardM: 0 } };
		const after = removeTrackers(before, new Set(['a']));
		expect(after.trackers.map((t) => t.id)).toEqual(['b']);
		expect(after.mounts.exceptions).toEqual({});
		expect(before.mounts.exceptions).toHaveProperty('a');
	});

	it('add trackers that follow the sun at the model’s own height', () => {
		const empty: Layout = { ...layoutOf(), models: [] };
		const after = addTrackers(empty, model, [{ id: 'x', tag: 'A01', point: [1.23456, 2] }]);
		expect(after.models).toEqual([model]);
		expect(after.trackers[0]).toEqual({
			id: 'x',
			tag: 'A01',
			modelId: 'm',
			eastM: 1.235,
			northM: 2,
			axisHeightM: null,
			posture: { kind: 'following' }
		});
	});

	it('give new tags in layout order', () => {
		const after = retag(layoutOf(tracker('a', 0, 0), tracker('b', 1, 1)), ['Z1', 'Z2']);
		expect(after.trackers.map((t) => t.tag)).toEqual(['Z1', 'Z2']);
	});
});

describe('picking', () => {
	const trackers = [tracker('a', 0, 0), tracker('b', 10, 0), tracker('c', 10, 10)];

	it('finds the nearest foot within reach and none beyond it', () => {
		expect(nearestFoot(trackers, [9, 1], 3)).toBe(1);
		expect(nearestFoot(trackers, [5, 5], 3)).toBe(-1);
	});

	it('takes every foot in a box, whichever way the box was drawn', () => {
		const box = boxOf([11, 11], [9, -1]);
		expect(idsInBox(trackers, box)).toEqual(['b', 'c']);
	});

	it('selects alone by click, and adds or takes away with shift', () => {
		expect(selectionAfterClick(['a'], 'b', false)).toEqual(['b']);
		expect(selectionAfterClick(['a'], 'b', true)).toEqual(['a', 'b']);
		expect(selectionAfterClick(['a', 'b'], 'a', true)).toEqual(['b']);
		expect(selectionAfterClick(['a'], null, false)).toEqual([]);
		expect(selectionAfterClick(['a'], null, true)).toEqual(['a']);
	});

	it('has no extent without points', () => {
		expect(extentOf([])).toBeNull();
		expect(
			extentOf([
				[1, 2],
				[-3, 4]
			])
		).toEqual({ westM: -3, eastM: 1, southM: 2, northM: 4 });
	});

	it('meets the nearer of two upright tables, from either side', () => {
		const table = (north: number): TableQuad => ({
			centre: [0, north, 2],
			u: [1, 0, 0],
			v: [0, 0, 1],
			n: [0, -1, 0],
			widthM: 6,
			heightM: 4
		});
		const tables = [table(20), table(10)];
		expect(pickTable([0, 0, 2], [0, 1, 0], tables, 0)).toBe(1);
		expect(pickTable([0, 40, 2], [0, -1, 0], tables, 0)).toBe(0);
		expect(pickTable([4, 0, 2], [0, 1, 0], tables, 0)).toBe(-1);
		expect(pickTable([3.2, 0, 2], [0, 1, 0], tables, 0.5)).toBe(1);
	});

	it('finds the ground below a point on a rise of 10 % to the east', () => {
		const plane = groundPlane({ kind: 'plane', heightM: 1, risePercent: 10, riseTowardsDeg: 90 });
		const hit = rayToGround([20, 5, 100], [0, 0, -1], plane);
		expect(hit?.[0]).toBe(20);
		expect(hit?.[2]).toBeCloseTo(3, 12);
		expect(rayToGround([0, 0, 100], [0, 0, 1], plane)).toBeNull();
	});
});

describe('alignment', () => {
	const others = [tracker('a', 0, 0), tracker('b', 13, 10.5)];

	it('falls into line with east, north or both within the tolerance', () => {
		expect(alignPoint([0.2, 5], others, 0.3)).toEqual({
			point: [0, 5],
			guides: [{ axis: 'east', valueM: 0 }]
		});
		expect(alignPoint([12.8, 10.4], others, 0.3).point).toEqual([13, 10.5]);
	});

	it('leaves a point alone that is near nothing', () => {
		expect(alignPoint([6, 5], others, 0.3)).toEqual({ point: [6, 5], guides: [] });
	});
});

describe('measuring', () => {
	it('gives distance and bearing clockwise from true north', () => {
		expect(measure([0, 0], [3, 4])).toMatchObject({ distanceM: 5, eastM: 3, northM: 4 });
		expect(measure([0, 0], [10, 0]).bearingDeg).toBe(90);
		expect(measure([0, 0], [-10, 0]).bearingDeg).toBe(270);
		expect(measure([0, 0], [0, -1]).bearingDeg).toBe(180);
	});
});

describe('shadows on the ground', () => {
	const level = groundPlane({ kind: 'level', heightM: 0 });
	// Sun in the south at 45 degrees: a shadow is as long as the thing is high, towards the north.
	const half = Math.SQRT1_2;

	it('are as long as the height at 45 degrees', () => {
		const landed = castPoint([1, 2, 3], [0, -half, half], level);
		expect(landed?.[0]).toBeCloseTo(1, 12);
		expect(landed?.[1]).toBeCloseTo(5, 12);
		expect(landed?.[2]).toBeCloseTo(0, 12);
	});

	it('fall nowhere when the sun is down', () => {
		expect(castPoint([0, 0, 1], [0, -1, 0], level)).toBeNull();
		expect(castOutline([[0, 0, 1]], [0, -1, -0.1], () => level)).toBeNull();
	});

	it('end where the ground bends up to meet them', () => {
		// Level up to 10 m north, from there rising 1 in 1: the shadow of a 20 m tip at 45 degrees lands at 15 m, 5 m up.
		const bank = groundPlanes({
			kind: 'points',
			points: [-50, 50].flatMap((e): [number, number, number][] => [
				[e, -50, 0],
				[e, 10, 0],
				[e, 60, 50]
			])
		});
		const [tip] = castOutline([[0, 0, 20]], [0, -half, half], bank)!;
		expect(tip[0]).toBeCloseTo(0, 6);
		expect(tip[1]).toBeCloseTo(15, 6);
	});

	it('have a convex outline', () => {
		const points: PlanPoint[] = [
			[0, 0],
			[2, 0],
			[1, 1],
			[2, 2],
			[0, 2]
		];
		expect(convexHull(points)).toHaveLength(4);
	});

	it('turn a box clockwise: its long side along east points south-east after 45 degrees', () => {
		const corners = boxRing({
			eastM: 0,
			northM: 0,
			sizeXM: 10,
			sizeYM: 0.001,
			turnDeg: 45
		});
		const east = corners.reduce((far, corner) => (corner[0] > far[0] ? corner : far));
		expect(east[0]).toBeCloseTo(5 * half, 2);
		expect(east[1]).toBeCloseTo(-5 * half, 2);
	});
});

describe('time to clear', () => {
	const day = { timesMs: [0, 300_000, 600_000], shares: [[0.5, 0.2, 0]] } as unknown as DayShade;

	it('counts minutes to the next clear step', () => {
		expect(minutesToClear(day, 0, 0)).toBe(10);
		expect(minutesToClear(day, 0, 600_000)).toBe(0);
		expect(minutesToClear(day, 0, 900_000)).toBeNull();
		expect(minutesToClear(day, 3, 0)).toBeNull();
	});
});
