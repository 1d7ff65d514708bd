import { beforeAll, describe, expect, it } from 'vitest';
import type { PlanPoint, Plot } from '$lib/core';
import { MAX_BOUNDARY_CORNERS } from '$lib/schema';
import { callApi, tokenOf } from './helpers/api';
import { place, squarePlot } from './helpers/field';
import { makePerson } from './helpers/people';
import { useTemporaryDatabase } from './helpers/temporary-database';

useTemporaryDatabase();

let token = '';
let path = '';

beforeAll(async () => {
	token = await tokenOf(await makePerson('Surveyor'));
	const made = await callApi('POST', '/api/v1/projects', { token, body: { name: 'Bad rings', place } });
	path = `/api/v1/projects/${made.body.id}/plot`;
	const saved = await callApi('PUT', path, {
		token,
		headers: { 'if-match': '"1"' },
		body: { document: squarePlot() }
	});
	expect(saved.status).toBe(200);
});

function withOutline(outer: unknown): unknown {
	return { ...squarePlot(), boundary: [{ outer, holes: [] }] };
}

/** A circle of corners. */
function circle(count: number): PlanPoint[] {
	return Array.from({ length: count }, (_, i) => {
		const turn = (2 * Math.PI * i) / count;
		return [Math.round(50_000 * Math.cos(turn)) / 100, Math.round(50_000 * Math.sin(turn)) / 100];
	});
}

const bow = [
	[0, 0],
	[80, 60],
	[80, 0],
	[0, 60]
];
const tree = {
	id: 't1',
	kind: 'tree',
	name: 'Oak',
	eastM: 0,
	northM: 0,
	heightM: 9,
	crownBaseM: 2,
	crownRadiusM: 3,
	trunkRadiusM: 0.3,
	crownTransmission: 0,
	growthMPerYear: 0.4,
	maxHeightM: 15
};

const refusals: [name: string, document: () => unknown, errorPath: string][] = [
	['crosses itself', () => withOutline(bow), 'document.boundary.0.outer'],
	[
		'holds land twice',
		() => ({ ...squarePlot(), boundary: [...squarePlot().boundary, ...squarePlot().boundary] }),
		'document.boundary.1'
	],
	['has two corners', () => withOutline(bow.slice(0, 2)), 'document.boundary.0.outer'],
	['has no area', () => withOutline([[0, 0], [10, 0], [20, 0]]), 'document.boundary.0.outer'], // prettier-ignore
	['has a corner without a number', () => withOutline([[0, 0], [10, null], [20, 9]]), 'document.boundary.0.outer.1.1'], // prettier-ignore
	['has a corner of text', () => withOutline([[0, 0], ['NaN', 3], [20, 9]]), 'document.boundary.0.outer.1.0'], // prettier-ignore
	['leaves the plan', () => withOutline([[0, 0], [1e9, 3], [20, 9]]), 'document.boundary.0.outer.1.0'], // prettier-ignore
	['is no list', () => withOutline('somewhere'), 'document.boundary.0.outer'],
	[`has more than ${MAX_BOUNDARY_CORNERS} corners`, () => withOutline(circle(MAX_BOUNDARY_CORNERS + 1)), 'document.boundary.0.outer'], // prettier-ignore
	[
		'has a hole outside',
		() => {
			const plot: Plot = squarePlot();
			plot.boundary[0].holes = [
				[
					[9000, 9000],
					[9000, 9010],
					[9010, 9010]
				]
			];
			return plot;
		},
		'document.boundary.0.holes.0'
	],
	['has a ground steeper than a wall', () => ({ ...squarePlot(), ground: { kind: 'plane', heightM: 0, risePercent: 900, riseTowardsDeg: 0 } }), 'document.ground.risePercent'], // prettier-ignore
	['has a skyline with one bearing twice', () => ({ ...squarePlot(), skyline: [{ azimuthDeg: 10, elevationDeg: 1 }, { azimuthDeg: 10, elevationDeg: 2 }] }), 'document.skyline.1.azimuthDeg'], // prettier-ignore
	['has a tree whose crown begins above its top', () => ({ ...squarePlot(), obstacles: [{ ...tree, crownBaseM: 12 }] }), 'document.obstacles.0.crownBaseM'], // prettier-ignore
	['has a set-back below zero', () => ({ ...squarePlot(), setBackM: -1 }), 'document.setBackM']
];

describe('a plot is refused, named, and what was there stays, when it', () => {
	it.each(refusals)('%s', async (_name, document, errorPath) => {
		const answer = await callApi('PUT', path, {
			token,
			headers: { 'if-match': '"2"' },
			body: { document: document() }
		});
		expect(answer.status).toBe(422);
		expect(answer.headers.get('content-type')).toContain('application/problem+json');
		const paths = answer.body.errors.map((error: { path: string }) => error.path);
		expect(paths).toContain(errorPath);
		for (const error of answer.body.errors) expect(error.message.length).toBeGreaterThan(10);
		const kept = await callApi('GET', path, { token });
		expect(kept.body).toMatchObject({ revision: 2, document: squarePlot() });
	});

	it('has 100,000 corners, without working through them', async () => {
		const answer = await callApi('PUT', path, {
			token,
			headers: { 'if-match': '"2"' },
			body: { document: withOutline(circle(100_000)) }
		});
		expect([413, 422]).toContain(answer.status);
		expect((await callApi('GET', path, { token })).body.revision).toBe(2);
	});

	it('is not JSON', async () => {
		const answer = await callApi('PUT', path, {
			token,
			headers: { 'if-match': '"2"' },
			body: '{"document": {"boundary": [NaN'
		});
		expect(answer.status).toBe(400);
		expect((await callApi('GET', path, { token })).body.revision).toBe(2);
	});
});
