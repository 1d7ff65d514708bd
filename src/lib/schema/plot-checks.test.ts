import { describe, expect, it } from 'vitest';
import type { PlanPoint } from '../core/document';
import { ringProblems, ringProblemSentence, signedDoubleArea, strayHole } from './plot-checks';

const square: PlanPoint[] = [
	[0, 0],
	[10, 0],
	[10, 10],
	[0, 10]
];

describe('checks of a ring', () => {
	it('find nothing wrong with plain land, concave land or a triangle', () => {
		expect(ringProblems(square)).toEqual([]);
		expect(ringProblems([...square.slice(0, 3), [5, 4], [0, 10]])).toEqual([]);
		expect(ringProblems(square.slice(0, 3))).toEqual([]);
		expect(signedDoubleArea(square)).toBe(200);
	});

	it('find a crossing and say where', () => {
		const [problem] = ringProblems([square[0], square[2], square[1], square[3]]);
		expect(problem).toEqual({ kind: 'crosses', edges: [1, 3], at: [5, 5] });
		expect(ringProblemSentence(problem)).toContain('5.0 m east, 5.0 m north');
	});

	it('write no negative zero', () => {
		const words = ringProblemSentence({ kind: 'crosses', edges: [1, 3], at: [-0.04, -0.06] });
		expect(words).toContain('0.0 m east, -0.1 m north');
		expect(words).not.toContain('-0.0');
	});

	it('find a corner that lies on another edge, a corner used twice and an edge that runs back', () => {
		expect(
			ringProblems([
				[0, 0],
				[10, 0],
				[10, 10],
				[5, 0],
				[0, 10]
			])[0].kind
		).toBe('touches');
		expect(
			ringProblems([
				[0, 0],
				[5, 5],
				[10, 0],
				[10, 10],
				[5, 5],
				[0, 10]
			])[0].kind
		).toBe('touches');
		expect(
			ringProblems([
				[0, 0],
				[10, 0],
				[10, 10],
				[10, 4],
				[0, 10]
			])[0].kind
		).toBe('touches');
	});

	it('find too few corners, no area, no numbers and equal neighbours', () => {
		expect(ringProblems(square.slice(0, 2))[0].kind).toBe('too-few-corners');
		expect(
			ringProblems([
				[0, 0],
				[5, 0],
				[10, 0]
			])[0].kind
		).toBe('no-area');
		expect(
			ringProblems([
				[0, 0],
				[NaN, 0],
				[10, 0]
			])[0]
		).toEqual({ kind: 'not-a-number', corner: 2 });
		expect(ringProblems([...square, [0, 0]])[0]).toMatchObject({ kind: 'same-point', corner: 5, next: 1 });
	});

	it('find holes that leave their part', () => {
		const hole: PlanPoint[] = [
			[2, 2],
			[4, 2],
			[4, 4]
		];
		expect(strayHole({ outer: square, holes: [hole] })).toBeNull();
		expect(
			strayHole({
				outer: square,
				holes: [
					hole,
					[
						[8, 8],
						[12, 8],
						[9, 9]
					]
				]
			})
		).toBe(2);
	});
});
