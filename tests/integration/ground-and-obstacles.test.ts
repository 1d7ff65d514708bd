import { beforeAll, describe, expect, it } from 'vitest';
import { callApi, tokenOf } from './helpers/api';
import { place, squarePlot } from './helpers/field';
import { makePerson } from './helpers/people';
import { useTemporaryDatabase } from './helpers/temporary-database';

useTemporaryDatabase();

let token = '';
let path = '';
let revision = 1;

beforeAll(async () => {
	token = await tokenOf(await makePerson('Surveyor'));
	const made = await callApi('POST', '/api/v1/projects', { token, body: { name: 'Uneven land', place } });
	path = `/api/v1/projects/${made.body.id}/plot`;
});

const save = async (changes: object) => {
	const answer = await callApi('PUT', path, {
		token,
		headers: { 'if-match': `"${revision}"` },
		body: { document: { ...squarePlot(), ...changes } }
	});
	if (answer.status === 200) revision = answer.body.revision;
	return answer;
};
const building = {
	id: 'b',
	kind: 'building',
	name: 'Barn',
	eastM: 4,
	northM: 5,
	corners: [
		[0, 0],
		[8, 0],
		[8, 5],
		[0, 5]
	],
	heightM: 4,
	roof: { kind: 'pitched', riseM: 2, ridgeDeg: 90 }
};

describe('a plot over the API', () => {
	it('keeps measured ground and every kind of obstacle as it was sent', async () => {
		const ground = {
			kind: 'points',
			points: [
				[-50, -50, 1],
				[50, -50, 2],
				[0, 60, 4.25]
			]
		};
		const mast = { id: 'm', kind: 'mast', name: 'Pole', eastM: 0, northM: 9, heightM: 9, radiusM: 0.15 };
		expect((await save({ ground, obstacles: [building, mast] })).status).toBe(200);
		const kept = await callApi('GET', path, { token });
		expect(kept.body.document.ground).toEqual(ground);
		expect(kept.body.document.obstacles).toEqual([building, mast]);
	});

	it('refuses a footprint that crosses itself, with its field and the remedy, and keeps what was there', async () => {
		const crossed = { ...building, corners: [[0, 0], [8, 5], [8, 0], [0, 5]] }; // prettier-ignore
		const answer = await save({ obstacles: [crossed] });
		expect(answer.status).toBe(422);
		expect(answer.body.errors[0].path).toBe('document.obstacles.0.corners');
		expect(answer.body.errors[0].message).toContain('Move a corner');
		const kept = await callApi('GET', path, { token });
		expect(kept.body.document.obstacles[0]).toEqual(building);
	});

	it('takes 20,000 heights in one go', async () => {
		const points = Array.from({ length: 20_000 }, (_, k) => [
			(k % 200) * 2 - 200,
			Math.floor(k / 200) * 2 - 100,
			Math.round(100 * Math.sin(k / 500)) / 100
		]);
		expect((await save({ ground: { kind: 'points', points } })).status).toBe(200);
		const kept = await callApi('GET', path, { token });
		expect(kept.body.document.ground.points).toHaveLength(20_000);
	});
});

describe('the API documentation', () => {
	it('tells the kinds of ground and obstacles', async () => {
		const { body } = await callApi('GET', '/api/v1/openapi.json');
		const text = JSON.stringify(body);
		for (const kind of ['building', 'wall', 'mast', 'raster', 'points'])
			expect(text).toContain(`"const":"${kind}"`);
	});
});
