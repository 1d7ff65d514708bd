import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { emptyLayout, emptyPlot, modelLibrary, runKindSchema } from '$lib/schema';
import { allCalls, type OperationId } from '$lib/server/api/table';
import { stopPool } from '$lib/server/compute/pool';
import { startJobs, stopJobs } from '$lib/server/jobs';
import { startMail } from '$lib/server/mail';
import { callApi, methodsOf, routes, tokenOf } from './helpers/api';
import { gridLayout, place, squarePlot } from './helpers/field';
import { joinProject, joinTeam, makePerson } from './helpers/people';
import { useTemporaryDatabase } from './helpers/temporary-database';

useTemporaryDatabase();
vi.setConfig({ testTimeout: 60_000, hookTimeout: 180_000 });

/** Ids of what the owner has, by the name in the path. */
const ids: Record<string, string> = {};
const tokens = { owner: '', stranger: '', client: '' };

const { id: _libraryId, ...mechanics } = modelLibrary[0];
const scene = {
	sun: { azimuthDeg: 180, elevationDeg: 20 },
	tables: [{ id: 'a', eastM: 0, northM: 0, upM: 3, widthM: 6, heightM: 4, azimuthDeg: 180, tiltDeg: 70 }]
};

interface Line {
	/** A body that would be accepted from somebody who may. */
	body?: () => unknown;
	/** What a person of no team of ours gets. `own` calls are about the caller alone and answer everybody. */
	stranger: 404 | 'own';
	/** What a member with the smallest role gets; `may` reads are open to every member. */
	client: 403 | 'may' | 'own';
}

const reads: Line = { stranger: 404, client: 'may' };
const refused = (body?: () => unknown): Line => ({ body, stranger: 404, client: 403 });
const own = (body?: () => unknown): Line => ({ body, stranger: 'own', client: 'own' });

/** Every call of the API. A call that is not here fails the first test. */
const table: Record<OperationId, Line> = {
	openapi: own(),
	me: own(),
	listTokens: own(),
	createToken: own(() => ({ name: 'x' })),
	deleteToken: { stranger: 404, client: 'own' },
	listMembers: refused(),
	removeMember: refused(),
	listInvitations: refused(),
	invite: refused(() => ({ email: 'somebody@tiltyard.test', role: 'designer' })),
	withdrawInvitation: refused(),
	listProjects: own(),
	createProject: refused(() => ({ name: 'x', place, teamId: ids.teamId })),
	getProject: reads,
	changeProject: refused(() => ({ name: 'Taken over' })),
	deleteProject: refused(),
	getPlot: reads,
	savePlot: refused(() => ({ document: emptyPlot() })),
	listLayouts: reads,
	createLayout: refused(() => ({ name: 'x' })),
	getLayout: reads,
	saveLayout: refused(() => ({ document: emptyLayout() })),
	renameLayout: refused(() => ({ name: 'Taken over' })),
	deleteLayout: refused(),
	listLayoutRevisions: reads,
	listModels: reads,
	createModel: refused(() => mechanics),
	changeModel: refused(() => mechanics),
	deleteModel: refused(),
	listRuns: reads,
	startRun: refused(() => ({ kind: 'shade', layoutId: ids.layoutId })),
	getRun: reads,
	getRunResult: reads,
	cancelRun: refused(),
	followRun: reads,
	listPlans: refused(),
	issuePlan: refused(() => ({ layoutId: ids.layoutId, reason: 'x' })),
	getPlan: refused(),
	getPlanFile: refused(),
	computeSun: own(() => ({ latitudeDeg: 0, longitudeDeg: 0, times: ['2026-06-21T12:00:00Z'] })),
	computeShade: own(() => scene),
	computeMount: own(() => ({
		tables: scene.tables,
		target: 'a',
		points: { count: 2, insetM: 0, forwardM: 0.05, edges: ['top'] },
		steps: [{ sun: scene.sun, poses: [{ azimuthDeg: 180, tiltDeg: 70 }] }]
	})),
	computeFieldLoss: own(() => ({
		latitudeDeg: 40,
		longitudeDeg: 0,
		year: 2025,
		stepMinutes: 20,
		model: { widthM: 6, heightM: 4 },
		trackers: [{ id: 'a', eastM: 0, northM: 0 }]
	})),
	computeIrradiance: own(() => ({
		tiltDeg: 30,
		zenithDeg: 60,
		angleOfIncidenceDeg: 30,
		directNormal: 500,
		diffuseHorizontal: 100,
		extraterrestrialNormal: 1361,
		model: 'perez'
	}))
};

const calls = allCalls();

async function ask(id: OperationId, token?: string) {
	const [, spec] = calls.find(([each]) => each === id)!;
	const path = spec.path.replace(/\{(\w+)\}/g, (_all, name: string) => encodeURIComponent(ids[name]));
	return callApi(spec.method, path, { token, body: table[id].body?.(), headers: { 'if-match': '"2"' } });
}

beforeAll(async () => {
	startJobs();
	await startMail();
	const owner = await makePerson('Owner');
	const client = await makePerson('Client');
	const colleague = await makePerson('Colleague');
	tokens.owner = await tokenOf(owner);
	tokens.stranger = await tokenOf(await makePerson('Stranger'));
	tokens.client = await tokenOf(client);
	const { owner: token } = tokens;
	ids.teamId = owner.teamId;
	ids.userId = colleague.userId;
	await joinTeam(owner.teamId, colleague, 'designer');
	await joinTeam(owner.teamId, client, 'client');

	const project = await callApi('POST', '/api/v1/projects', { token, body: { name: 'Field', place } });
	ids.projectId = project.body.id;
	await joinProject(ids.projectId, client, 'client');
	const put = (path: string, document: unknown) =>
		callApi('PUT', path, { token, headers: { 'if-match': '"1"' }, body: { document } });
	await put(`/api/v1/projects/${ids.projectId}/plot`, squarePlot());
	const layouts = await callApi('GET', `/api/v1/projects/${ids.projectId}/layouts`, { token });
	ids.layoutId = layouts.body.items[0].id;
	await put(`/api/v1/layouts/${ids.layoutId}`, gridLayout(2, 2));

	const model = await callApi('POST', `/api/v1/teams/${ids.teamId}/models`, { token, body: mechanics });
	ids.modelId = model.body.id;
	const made = await callApi('POST', '/api/v1/tokens', { token, body: { name: 'Own' } });
	ids.tokenId = made.body.id;
	const invitation = await callApi('POST', `/api/v1/teams/${ids.teamId}/invitations`, {
		token,
		body: { email: 'new@tiltyard.test', role: 'designer' }
	});
	ids.invitationId = invitation.body.id;
	const run = await callApi('POST', `/api/v1/projects/${ids.projectId}/runs`, {
		token,
		body: { kind: 'shade', layoutId: ids.layoutId }
	});
	ids.runId = run.body.id;
	const plan = await callApi('POST', `/api/v1/projects/${ids.projectId}/plans`, {
		token,
		body: { layoutId: ids.layoutId, reason: 'Test' }
	});
	expect(plan.status).toBe(201);
	ids.planId = plan.body.id;
	ids.name = plan.body.files[0].name;
	for (const [name, value] of Object.entries(ids)) expect(value, name).toBeTypeOf('string');
});

afterAll(async () => {
	await stopJobs();
	await stopPool();
});

describe('who may call', () => {
	it('is said here for every method of every route file', async () => {
		const stands: string[] = [];
		for (const route of routes)
			for (const method of await methodsOf(route)) stands.push(`${method} ${route.path}`);
		const tested = (Object.keys(table) as OperationId[]).map((id) => {
			const [, spec] = calls.find(([each]) => each === id)!;
			return `${spec.method} ${spec.path}`;
		});
		expect(tested.sort()).toEqual(stands.sort());
	});

	it.each(calls.filter(([, spec]) => spec.scope !== null).map(([id]) => id))(
		'%s asks people to sign in',
		async (id) => {
			for (const token of [undefined, 'tyd_nobody']) {
				const got = await ask(id, token);
				expect(got.status).toBe(401);
				expect(got.headers.get('content-type')).toBe('application/problem+json');
				expect(got.headers.get('www-authenticate')).toBe('Bearer');
			}
		}
	);

	it.each((Object.keys(table) as OperationId[]).filter((id) => table[id].stranger === 404))(
		'%s finds nothing for a stranger, in the words for what is not there',
		async (id) => {
			const got = await ask(id, tokens.stranger);
			expect(got.status).toBe(404);
			expect(got.body.detail).toBe('There is nothing at this address, or it is not yours to see.');
		}
	);

	it.each((Object.keys(table) as OperationId[]).filter((id) => table[id].client === 403))(
		'%s tells a client of the project that the role does not reach so far',
		async (id) => {
			const got = await ask(id, tokens.client);
			expect(got.status).toBe(403);
			expect(got.body.type).toBe('urn:tiltyard:problem:not-allowed');
		}
	);

	it.each(runKindSchema.options)('a run of the kind %s is refused alike', async (kind) => {
		const path = `/api/v1/projects/${ids.projectId}/runs`;
		const body = { kind, layoutId: ids.layoutId };
		const asked = async (token?: string) => (await callApi('POST', path, { token, body })).status;
		expect(await asked()).toBe(401);
		expect(await asked(tokens.stranger)).toBe(404);
		expect(await asked(tokens.client)).toBe(403);
	});

	it.each([
		['answers', { kind: 'answers' }],
		['energy of a clear sky', { kind: 'shade', energy: { sky: { source: 'clear' } } }],
		[
			'energy of monthly sums',
			{ kind: 'shade', energy: { sky: { source: 'average', monthlyHorizontalKwhM2: Array(12).fill(100) } } }
		]
	])('a run of %s finds nothing for a stranger and is refused to a client', async (_name, request) => {
		const path = `/api/v1/projects/${ids.projectId}/runs`;
		const body = { layoutId: ids.layoutId, ...request };
		expect((await callApi('POST', path, { body })).status).toBe(401);
		const stranger = await callApi('POST', path, { token: tokens.stranger, body });
		expect(stranger.status).toBe(404);
		expect(stranger.body.detail).toBe('There is nothing at this address, or it is not yours to see.');
		expect((await callApi('POST', path, { token: tokens.client, body })).status).toBe(403);
	});

	it.each((Object.keys(table) as OperationId[]).filter((id) => table[id].client === 'may'))(
		'%s answers a client of the project',
		async (id) => {
			await vi.waitFor(async () => expect((await ask(id, tokens.client)).status).toBe(200), {
				timeout: 30_000
			});
		}
	);

	it('has changed nothing by all these refusals', async () => {
		const { owner: token } = tokens;
		const project = await callApi('GET', `/api/v1/projects/${ids.projectId}`, { token });
		expect(project.body.name).toBe('Field');
		const plot = await callApi('GET', `/api/v1/projects/${ids.projectId}/plot`, { token });
		expect(plot.body).toMatchObject({ revision: 2, document: squarePlot() });
		const layout = await callApi('GET', `/api/v1/layouts/${ids.layoutId}`, { token });
		expect(layout.body.revision).toBe(2);
		const runs = await callApi('GET', `/api/v1/projects/${ids.projectId}/runs`, { token });
		expect(runs.body.items).toHaveLength(1);
		const plans = await callApi('GET', `/api/v1/projects/${ids.projectId}/plans`, { token });
		expect(plans.body.items).toHaveLength(1);
		const members = await callApi('GET', `/api/v1/teams/${ids.teamId}/members`, { token });
		expect(members.body.items.map((one: { userId: string }) => one.userId)).toContain(ids.userId);
		const invitations = await callApi('GET', `/api/v1/teams/${ids.teamId}/invitations`, { token });
		expect(invitations.body.items).toHaveLength(1);
	});
});
