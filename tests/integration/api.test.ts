import { readFileSync } from 'node:fs';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { createToken } from '$lib/server/auth/tokens';
import { stopJobs } from '$lib/server/jobs';
import { stopPool } from '$lib/server/compute/pool';
import { callApi, tokenOf, type ApiCall } from './helpers/api';
import { makePerson } from './helpers/people';
import { useTemporaryDatabase } from './helpers/temporary-database';

useTemporaryDatabase();
vi.setConfig({ testTimeout: 90_000, hookTimeout: 120_000 });

let token = '';

beforeAll(async () => {
	token = await tokenOf(await makePerson('Caller'));
});

afterAll(async () => {
	await stopJobs();
	await stopPool();
});

const fixture = (name: string) =>
	JSON.parse(readFileSync(new URL(`../fixtures/checks/${name}`, import.meta.url), 'utf8'));

const compute = (call: string, body: unknown, more: ApiCall = {}) =>
	callApi('POST', `/api/v1/compute/${call}`, { token, body, ...more });

/** Great-circle distance of two directions, degrees. */
function arcDeg(a: { azimuthDeg: number; elevationDeg: number }, b: typeof a): number {
	const rad = Math.PI / 180;
	const half =
		Math.sin(((a.elevationDeg - b.elevationDeg) * rad) / 2) ** 2 +
		Math.cos(a.elevationDeg * rad) *
			Math.cos(b.elevationDeg * rad) *
			Math.sin(((a.azimuthDeg - b.azimuthDeg) * rad) / 2) ** 2;
	return (2 * Math.asin(Math.sqrt(half))) / rad;
}

/** Values and their sources stand in the `about` of each file of tests/fixtures/checks. */
describe('the calculations agree with the reference scenes', () => {
	it('sun positions within 0.02 degrees of arc', async () => {
		const { positions } = fixture('sun.json');
		for (const one of positions) {
			const { latitudeDeg, longitudeDeg, elevationM, time, expected } = one;
			const got = await compute('sun', { latitudeDeg, longitudeDeg, elevationM, times: [time] });
			expect(got.status).toBe(200);
			const [position] = got.body.positions;
			expect(position.time).toBe(time);
			expect(arcDeg(position, expected), one.id).toBeLessThan(0.02);
			expect(Math.abs(position.apparentElevationDeg - expected.apparentElevationDeg), one.id).toBeLessThan(
				0.02
			);
		}
	});

	it('shaded shares within 1e-9', async () => {
		const { scenes } = fixture('shade-truth.json');
		expect(scenes.length).toBeGreaterThan(10);
		for (const scene of scenes) {
			const got = await compute('shade', scene);
			expect(got.status, scene.name).toBe(200);
			got.body.tables.forEach((table: Record<string, unknown>, index: number) => {
				expect(table.id).toBe(scene.tables[index].id);
				const difference = Math.abs((table.shadedShare as number) - scene.expected.shadedShare[index]);
				expect(difference, `${scene.name}, table ${table.id}`).toBeLessThan(1e-9);
				expect(table.frontLit).toBe(scene.expected.frontLit[index]);
				expect(table.hiddenBySkyline).toBe(scene.expected.hiddenBySkyline);
			});
		}
	});

	it('points on edges with no disagreement outside "?"', async () => {
		const { scenes } = fixture('mount-truth.json');
		let compared = 0;
		for (const scene of scenes) {
			const got = await compute('mount', scene);
			expect(got.status, scene.name).toBe(200);
			scene.expected.forEach((expected: Record<string, string>, step: number) => {
				for (const [edge, marks] of Object.entries(expected)) {
					const answer: string = got.body.steps[step][edge];
					expect(answer).toHaveLength(marks.length);
					for (let p = 0; p < marks.length; p += 1) {
						if (marks[p] === '?') continue;
						compared += 1;
						expect(answer[p], `${scene.name}, step ${step}, ${edge} ${p}`).toBe(marks[p]);
					}
				}
			});
		}
		expect(compared).toBeGreaterThan(1000);
	});

	it('losses of whole fields within 0.0005', async () => {
		const { cases } = fixture('field-loss.json');
		for (const [index, one] of cases.entries()) {
			const { widthM, heightM, pitchEastWestM, pitchNorthSouthM, stagger, expected } = one;
			const trackers = Array.from({ length: 169 }, (_, place) => {
				const row = Math.floor(place / 13);
				return {
					id: `t${place}`,
					eastM: ((place % 13) - 6) * pitchEastWestM + (row % 2 === 1 ? stagger * pitchEastWestM : 0),
					northM: (row - 6) * pitchNorthSouthM,
					upM: 0
				};
			});
			const got = await compute('field-loss', {
				latitudeDeg: one.latitudeDeg,
				longitudeDeg: one.longitudeDeg,
				year: 2025,
				stepMinutes: 10,
				refraction: false,
				beam: 'meinel',
				model: { widthM, heightM },
				trackers,
				// All 169 once, then the middle one alone.
				only: index === 0 ? undefined : ['t84']
			});
			expect(got.status, one.name).toBe(200);
			expect(got.body.daylightH).toBeCloseTo(expected.daylightH, 0);
			expect(got.body.trackers).toHaveLength(index === 0 ? 169 : 1);
			const middle = got.body.trackers.find((tracker: { id: string }) => tracker.id === 't84');
			expect(Math.abs(middle.beamLoss - expected.beamLoss), one.name).toBeLessThan(0.0005);
			expect(Math.abs(middle.meanShadedShare - expected.meanShadedShare), one.name).toBeLessThan(0.0005);
		}
	});

	it('isotropic sky diffuse is half of the horizontal on an upright plane (Liu and Jordan: (1 + cos tilt) / 2)', async () => {
		const got = await compute('irradiance', {
			tiltDeg: 90,
			zenithDeg: 60,
			angleOfIncidenceDeg: 30,
			directNormal: 600,
			diffuseHorizontal: 100,
			extraterrestrialNormal: 1361,
			model: 'isotropic'
		});
		expect(got.body.skyDiffuse).toBeCloseTo(50, 9);
	});
});

const scene = {
	sun: { azimuthDeg: 180, elevationDeg: 20 },
	tables: [{ id: 'a', eastM: 0, northM: 0, upM: 3, widthM: 6, heightM: 4, azimuthDeg: 180, tiltDeg: 70 }]
};

describe('bad input', () => {
	it.each([
		['a body that is no JSON', '{"sun":', 400, ''],
		['NaN, which is not JSON', '{"sun":{"azimuthDeg":NaN,"elevationDeg":1},"tables":[]}', 400, ''],
		['NaN as text', { ...scene, sun: { azimuthDeg: 'NaN', elevationDeg: 1 } }, 422, 'sun.azimuthDeg'],
		[
			'a number beyond all',
			'{"sun":{"azimuthDeg":1e999,"elevationDeg":1},"tables":[]}',
			422,
			'sun.azimuthDeg'
		],
		['a list in place of an object', [], 422, ''],
		['nothing', '', 400, ''],
		['no tables', { ...scene, tables: [] }, 422, 'tables'],
		[
			'a table of no width',
			{ ...scene, tables: [{ ...scene.tables[0], widthM: 0 }] },
			422,
			'tables.0.widthM'
		],
		['the same id twice', { ...scene, tables: [scene.tables[0], scene.tables[0]] }, 422, 'tables.1.id'],
		['an obstacle of no kind', { ...scene, obstacles: [{ kind: 'cloud' }] }, 422, 'obstacles.0.kind'],
		[
			'more tables than a call may have',
			{ ...scene, tables: Array.from({ length: 2001 }, (_, n) => ({ ...scene.tables[0], id: `t${n}` })) },
			422,
			'tables'
		]
	])('%s is refused with the field and what to do', async (_what, body, status, path) => {
		const got = await compute('shade', body);
		expect(got.status).toBe(status);
		expect(got.headers.get('content-type')).toBe('application/problem+json');
		expect(got.body).toMatchObject({
			status,
			title: expect.any(String),
			type: expect.stringMatching(/^urn:/)
		});
		expect(got.body.errors[0].path).toBe(path);
		expect(got.body.errors[0].message.length).toBeGreaterThan(10);
	});

	it('other types than JSON, text that is not UTF-8 and bodies that are too long are refused', async () => {
		const text = await compute('shade', JSON.stringify(scene), { headers: { 'content-type': 'text/plain' } });
		expect(text.status).toBe(415);
		const long = await compute('irradiance', JSON.stringify({ padding: 'x'.repeat(300 * 1024) }));
		expect(long.status).toBe(413);
		const huge = await compute('shade', '{}', { headers: { 'content-length': String(50 * 1024 * 1024) } });
		expect(huge.status).toBe(413);
	});

	it('a time without an offset is refused', async () => {
		const got = await compute('sun', { latitudeDeg: 0, longitudeDeg: 0, times: ['2026-12-21T11:00:00'] });
		expect(got.body.errors[0].path).toBe('times.0');
	});

	it('a mount scene whose poses or target do not fit is refused', async () => {
		const got = await compute('mount', {
			tables: scene.tables,
			target: 'none',
			points: { count: 3, insetM: 0, forwardM: 0.05, edges: ['top'] },
			steps: [{ sun: scene.sun, poses: [] }]
		});
		expect(got.body.errors.map((one: { path: string }) => one.path)).toEqual(['target', 'steps.0.poses']);
	});
});

describe('tokens', () => {
	it('are listed without their text, and hold no longer once withdrawn', async () => {
		const made = await callApi('POST', '/api/v1/tokens', { token, body: { name: 'One', scopes: ['read'] } });
		expect(made.status).toBe(201);
		const own = made.body.token as string;
		expect((await callApi('GET', '/api/v1/me', { token: own })).status).toBe(200);
		const list = await callApi('GET', '/api/v1/tokens', { token });
		expect(list.text).not.toContain(own);
		expect((await callApi('DELETE', `/api/v1/tokens/${made.body.id}`, { token })).status).toBe(204);
		expect((await callApi('GET', '/api/v1/me', { token: own })).status).toBe(401);
	});

	it('that may only read compute and read, and do not write', async () => {
		const me = await callApi('GET', '/api/v1/me', { token });
		const reader = await createToken(
			{ userId: me.body.id },
			{ name: 'r', scopes: ['read'], expiresInDays: 1 }
		);
		const call = { token: reader.token };
		expect((await callApi('POST', '/api/v1/compute/shade', { ...call, body: scene })).status).toBe(200);
		expect((await callApi('POST', '/api/v1/tokens', { ...call, body: { name: 'x' } })).status).toBe(403);
	});
});

describe('the allowance', () => {
	it('ends many calls at once with the seconds to wait', async () => {
		const busy = await tokenOf(await makePerson('Busy'));
		let refused = null;
		for (let n = 0; n < 5000 && !refused; n += 1) {
			const got = await callApi('POST', '/api/v1/projects/none/plans', { token: busy, body: {} });
			if (got.status === 429) refused = got;
		}
		expect(refused).not.toBeNull();
		expect(Number(refused!.headers.get('retry-after'))).toBeGreaterThan(0);
	});
});
