import { beforeAll, describe, expect, it } from 'vitest';
import { emptyLayout, emptyPlot, modelLibrary } from '$lib/schema';
import { callApi, tokenOf } from './helpers/api';
import { gridLayout, place, squarePlot } from './helpers/field';
import { joinProject, makePerson } from './helpers/people';
import { useTemporaryDatabase } from './helpers/temporary-database';

useTemporaryDatabase();

let token = '';
let crewToken = '';
let crew: Awaited<ReturnType<typeof makePerson>>;

beforeAll(async () => {
	const owner = await makePerson('Owner');
	token = await tokenOf(owner);
	crew = await makePerson('Crew');
	crewToken = await tokenOf(crew);
});

async function makeProject(name = 'Test field') {
	const made = await callApi('POST', '/api/v1/projects', { token, body: { name, place } });
	expect(made.status).toBe(201);
	const layouts = await callApi('GET', `/api/v1/projects/${made.body.id}/layouts`, { token });
	return { id: made.body.id as string, layoutId: layouts.body.items[0].id as string };
}

describe('projects', () => {
	it('open with an empty plot, a first layout, and the time zone found from the place', async () => {
		const { timeZone: _found, ...bare } = place;
		const made = await callApi('POST', '/api/v1/projects', { token, body: { name: 'Found', place: bare } });
		expect(made.body.place.timeZone).toBe('Europe/Rome');
		expect(made.body.role).toBe('owner');
		const plot = await callApi('GET', `/api/v1/projects/${made.body.id}/plot`, { token });
		expect(plot.body.document).toEqual(emptyPlot());
		expect(plot.headers.get('etag')).toBe('"1"');
		const layouts = await callApi('GET', `/api/v1/projects/${made.body.id}/layouts`, { token });
		expect(layouts.body.items).toHaveLength(1);
	});

	it('change by what was given only, and keep what was there when the change is refused', async () => {
		const { id } = await makeProject('Before');
		const refused = await callApi('PATCH', `/api/v1/projects/${id}`, {
			token,
			body: { name: 'After', place: { ...place, latitudeDeg: 91 } }
		});
		expect(refused.status).toBe(422);
		expect(refused.body.errors[0].path).toBe('place.latitudeDeg');
		expect((await callApi('GET', `/api/v1/projects/${id}`, { token })).body.name).toBe('Before');
		const changed = await callApi('PATCH', `/api/v1/projects/${id}`, { token, body: { name: 'After' } });
		expect(changed.body.name).toBe('After');
		expect(changed.body.place).toEqual(place);
	});

	it('are listed page by page, each once, the last changed first', async () => {
		for (let n = 0; n < 5; n += 1) await makeProject(`Page ${n}`);
		const seen: string[] = [];
		let cursor: string | null = '';
		while (cursor !== null) {
			const page = await callApi('GET', `/api/v1/projects?limit=2${cursor ? `&cursor=${cursor}` : ''}`, {
				token
			});
			expect(page.body.items.length).toBeLessThanOrEqual(2);
			seen.push(...page.body.items.map((one: { id: string }) => one.id));
			cursor = page.body.nextCursor;
		}
		expect(new Set(seen).size).toBe(seen.length);
		const all = await callApi('GET', '/api/v1/projects?limit=200', { token });
		expect(seen).toEqual(all.body.items.map((one: { id: string }) => one.id));
	});

	it.each(['limit=0', 'limit=x', 'limit=1e9', 'cursor=nonsense'])('refuse the query %s', async (query) => {
		expect((await callApi('GET', `/api/v1/projects?${query}`, { token })).status).toBe(422);
	});

	it('can be deleted, and are then not found', async () => {
		const { id, layoutId } = await makeProject();
		expect((await callApi('DELETE', `/api/v1/projects/${id}`, { token })).status).toBe(204);
		expect((await callApi('GET', `/api/v1/projects/${id}`, { token })).status).toBe(404);
		expect((await callApi('GET', `/api/v1/layouts/${layoutId}`, { token })).status).toBe(404);
	});

	it('are seen by crew that were put on them, who may read and not write', async () => {
		const { id, layoutId } = await makeProject();
		await joinProject(id, crew, 'crew');
		const seen = await callApi('GET', `/api/v1/projects/${id}`, { token: crewToken });
		expect(seen.body.role).toBe('crew');
		expect((await callApi('GET', '/api/v1/projects', { token: crewToken })).body.items).toHaveLength(1);
		const refused = await callApi('PUT', `/api/v1/layouts/${layoutId}`, {
			token: crewToken,
			headers: { 'if-match': '"1"' },
			body: { document: emptyLayout() }
		});
		expect(refused.status).toBe(403);
	});
});

describe('the plot', () => {
	it('is saved over its revision and refused over an older one, which changes nothing', async () => {
		const { id } = await makeProject();
		const path = `/api/v1/projects/${id}/plot`;
		const body = { document: squarePlot() };
		const saved = await callApi('PUT', path, { token, headers: { 'if-match': '"1"' }, body });
		expect(saved.status).toBe(200);
		expect(saved.body.revision).toBe(2);
		expect(saved.headers.get('etag')).toBe('"2"');
		const stale = await callApi('PUT', path, {
			token,
			headers: { 'if-match': '"1"' },
			body: { document: emptyPlot() }
		});
		expect(stale.status).toBe(412);
		expect(stale.body.currentRevision).toBe(2);
		expect((await callApi('GET', path, { token })).body.document).toEqual(squarePlot());
	});

	it('needs If-Match', async () => {
		const { id } = await makeProject();
		const path = `/api/v1/projects/${id}/plot`;
		const body = { document: squarePlot() };
		expect((await callApi('PUT', path, { token, body })).status).toBe(428);
		expect((await callApi('PUT', path, { token, headers: { 'if-match': '*' }, body })).status).toBe(400);
	});

	it('turns rings the way documents keep them', async () => {
		const { id } = await makeProject();
		const plot = squarePlot();
		plot.boundary[0].outer.reverse();
		const path = `/api/v1/projects/${id}/plot`;
		await callApi('PUT', path, { token, headers: { 'if-match': '"1"' }, body: { document: plot } });
		const kept = (await callApi('GET', path, { token })).body.document.boundary[0].outer;
		expect(kept).toEqual([...plot.boundary[0].outer].reverse());
	});

	it('refuses a boundary that crosses itself and a skyline out of order, and names them', async () => {
		const { id } = await makeProject();
		const bad = squarePlot();
		[bad.boundary[0].outer[1], bad.boundary[0].outer[2]] = [
			bad.boundary[0].outer[2],
			bad.boundary[0].outer[1]
		];
		bad.skyline = [
			{ azimuthDeg: 90, elevationDeg: 5 },
			{ azimuthDeg: 80, elevationDeg: 5 }
		];
		const refused = await callApi('PUT', `/api/v1/projects/${id}/plot`, {
			token,
			headers: { 'if-match': '"1"' },
			body: { document: bad }
		});
		expect(refused.status).toBe(422);
		expect(refused.body.errors.map((one: { path: string }) => one.path)).toEqual(
			expect.arrayContaining(['document.boundary.0.outer', 'document.skyline.1.azimuthDeg'])
		);
	});
});

describe('layouts', () => {
	it('are saved, listed with their count, and keep every revision', async () => {
		const { id, layoutId } = await makeProject();
		const document = gridLayout(3, 2);
		const saved = await callApi('PUT', `/api/v1/layouts/${layoutId}`, {
			token,
			headers: { 'if-match': '"1"' },
			body: { document }
		});
		expect(saved.body).toMatchObject({ revision: 2, trackerCount: 6 });
		expect((await callApi('GET', `/api/v1/layouts/${layoutId}`, { token })).body.document).toEqual(document);
		const revisions = await callApi('GET', `/api/v1/layouts/${layoutId}/revisions`, { token });
		expect(revisions.body.items).toMatchObject([
			{ revision: 2, trackerCount: 6, savedBy: 'Owner', savedByYou: true },
			{ revision: 1, trackerCount: 0, savedBy: 'Owner', savedByYou: true }
		]);
		const projects = await callApi('GET', '/api/v1/projects', { token });
		expect(projects.body.items.find((one: { id: string }) => one.id === id).trackerCount).toBe(6);
	});

	it('let one of two writers through who both saw the same revision', async () => {
		const { layoutId } = await makeProject();
		const write = (columns: number) =>
			callApi('PUT', `/api/v1/layouts/${layoutId}`, {
				token,
				headers: { 'if-match': '"1"' },
				body: { document: gridLayout(columns, 1) }
			});
		const answers = await Promise.all([write(1), write(2), write(3), write(4)]);
		expect(answers.map((one) => one.status).sort()).toEqual([200, 412, 412, 412]);
	});

	it('are copied, renamed without a new revision, and deleted down to the last', async () => {
		const { id, layoutId } = await makeProject();
		await callApi('PUT', `/api/v1/layouts/${layoutId}`, {
			token,
			headers: { 'if-match': '"1"' },
			body: { document: gridLayout(2, 2) }
		});
		const copy = await callApi('POST', `/api/v1/projects/${id}/layouts`, {
			token,
			body: { name: 'Copy', copyOf: layoutId }
		});
		expect(copy.status).toBe(201);
		expect(copy.body.document.trackers).toHaveLength(4);
		const renamed = await callApi('PATCH', `/api/v1/layouts/${copy.body.id}`, { token, body: { name: 'B' } });
		expect(renamed.body).toMatchObject({ name: 'B', revision: 1 });
		expect((await callApi('DELETE', `/api/v1/layouts/${layoutId}`, { token })).status).toBe(204);
		expect((await callApi('DELETE', `/api/v1/layouts/${copy.body.id}`, { token })).status).toBe(409);
	});

	it('are not copied out of another project', async () => {
		const one = await makeProject();
		const other = await makeProject();
		const refused = await callApi('POST', `/api/v1/projects/${one.id}/layouts`, {
			token,
			body: { name: 'Copy', copyOf: other.layoutId }
		});
		expect(refused.status).toBe(422);
	});
});

describe('tracker models', () => {
	it('are the library and the team’s own, which can be changed and taken out', async () => {
		const me = await callApi('GET', '/api/v1/me', { token });
		const teamId = me.body.teams[0].id;
		const { id: _libraryId, ...mechanics } = modelLibrary[0];
		const made = await callApi('POST', `/api/v1/teams/${teamId}/models`, {
			token,
			body: { ...mechanics, name: 'Own one' }
		});
		expect(made.status).toBe(201);
		const list = await callApi('GET', `/api/v1/teams/${teamId}/models`, { token });
		expect(list.body.items).toHaveLength(modelLibrary.length + 1);
		const path = `/api/v1/models/${made.body.id}`;
		const wrong = await callApi('PUT', path, { token, body: { ...mechanics, maxTiltDeg: 0 } });
		expect(wrong.status).toBe(422);
		expect(wrong.body.errors[0].path).toBe('maxTiltDeg');
		const changed = await callApi('PUT', path, { token, body: { ...mechanics, name: 'Changed' } });
		expect(changed.body.name).toBe('Changed');
		expect((await callApi('DELETE', path, { token })).status).toBe(204);
		expect((await callApi('DELETE', `/api/v1/models/${modelLibrary[0].id}`, { token })).status).toBe(404);
	});
});
