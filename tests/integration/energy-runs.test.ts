/** Shade runs that ask for the year's energy too. */
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { eq } from 'drizzle-orm';
import { energyYear, weatherSky } from '$lib/core';
import { readWeather } from '$lib/exchange/weather';
import { db } from '$lib/server/db';
import { runs } from '$lib/server/db/schema';
import { startJobs, stopJobs } from '$lib/server/jobs';
import { roundedJson } from '$lib/server/compute/rounded-json';
import { callApi, tokenOf } from './helpers/api';
import { gridLayout, place } from './helpers/field';
import { makePerson } from './helpers/people';
import { useTemporaryDatabase } from './helpers/temporary-database';

useTemporaryDatabase();
vi.setConfig({ testTimeout: 90_000, hookTimeout: 120_000 });

let token = '';
let projectId = '';
let layoutId = '';
/** kWh/m², invented. */
const sums = [55, 72, 118, 148, 182, 198, 210, 182, 132, 92, 58, 46];

beforeAll(async () => {
	token = await tokenOf(await makePerson('Owner'));
	const project = await callApi('POST', '/api/v1/projects', { token, body: { name: 'Field', place } });
	projectId = project.body.id as string;
	const layouts = await callApi('GET', `/api/v1/projects/${projectId}/layouts`, { token });
	layoutId = layouts.body.items[0].id as string;
	await callApi('PUT', `/api/v1/layouts/${layoutId}`, {
		token,
		headers: { 'if-match': '"1"' },
		body: { document: gridLayout(2, 2) }
	});
});

afterAll(async () => {
	await stopJobs();
});

const ask = (request: Record<string, unknown>) =>
	callApi('POST', `/api/v1/projects/${projectId}/runs`, {
		token,
		body: { kind: 'shade', layoutId, year: 2026, stepMinutes: 20, ...request }
	});

describe('a shade run with energy', () => {
	it('stores what the core computes, tells its settings, and stays up to date', async () => {
		startJobs();
		const energy = { sky: { source: 'average', monthlyHorizontalKwhM2: sums } };
		const asked = await ask({ energy });
		expect(asked.status).toBe(202);
		expect(asked.body.energy).toMatchObject({
			source: 'average',
			skyModel: 'hay-davies',
			albedo: 0.2,
			monthlyHorizontalKwhM2: sums
		});
		const done = await vi.waitFor(
			async () => {
				const run = (await callApi('GET', `/api/v1/runs/${asked.body.id}`, { token })).body;
				expect(run.status).toBe('done');
				return run;
			},
			{ timeout: 60_000, interval: 50 }
		);
		expect(done.outOfDate).toBe(false);
		const result = await callApi('GET', `/api/v1/runs/${asked.body.id}/result`, { token });
		const [row] = await db.select({ input: runs.input }).from(runs).where(eq(runs.id, asked.body.id));
		expect(JSON.stringify(result.body.energy)).toBe(roundedJson(energyYear(row.input)));
		// The same again is the stored run; another sky is another run; none at all is the shade alone.
		expect((await ask({ energy })).body.id).toBe(asked.body.id);
		const clear = await ask({ energy: { sky: { source: 'clear' } } });
		expect(clear.body.id).not.toBe(asked.body.id);
		const bare = await ask({});
		expect(bare.body.energy).toBeNull();
		expect([asked.body.inputHash, clear.body.inputHash]).not.toContain(bare.body.inputHash);
	});

	it('is refused with the field and the remedy when its settings cannot be computed', async () => {
		const errors = async (energy: unknown, more: Record<string, unknown> = {}) => {
			const refused = await ask({ energy, ...more });
			expect(refused.status).toBe(422);
			return refused.body.errors as { path: string; message: string }[];
		};
		const path = async (energy: unknown, more?: Record<string, unknown>) =>
			(await errors(energy, more))[0].path;
		expect(await path({ sky: { source: 'average', monthlyHorizontalKwhM2: sums.slice(1) } })).toBe(
			'energy.sky.monthlyHorizontalKwhM2'
		);
		const sky = (monthlyHorizontalKwhM2: unknown[]) => ({
			sky: { source: 'average', monthlyHorizontalKwhM2 }
		});
		const thirteen = await errors(sky([...sums, 40]));
		expect(thirteen.map((error) => error.path)).toEqual(['energy.sky.monthlyHorizontalKwhM2']);
		expect(thirteen[0].message).toMatch(/twelve/);
		expect(await path(sky(sums.map((sum, month) => (month === 4 ? null : sum))))).toBe(
			'energy.sky.monthlyHorizontalKwhM2.4'
		);
		const tooMuch = await errors({
			sky: { source: 'average', monthlyHorizontalKwhM2: sums.map((sum) => sum + 150) }
		});
		expect(tooMuch[0].path).toBe('energy.sky.monthlyHorizontalKwhM2.0');
		expect(tooMuch[0].message).toMatch(/MJ/);
		expect(await path({ sky: { source: 'moon' } })).toBe('energy.sky.source');
		expect(await path({ sky: { source: 'clear' }, albedo: 2 })).toBe('energy.albedo');
		expect(await path({ sky: { source: 'clear' } }, { kind: 'mounts' })).toBe('energy');
		// The invented file is made for another place and has some days only.
		const reading = readWeather(readFileSync(join(import.meta.dirname, '../fixtures/weather/invented.epw')));
		if (!reading.ok) throw new Error(reading.message);
		expect(await path({ sky: weatherSky(reading) })).toBe('energy.sky.spans');
	});
});
