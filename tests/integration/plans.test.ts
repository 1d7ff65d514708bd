import { execFileSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import type { Actor } from '$lib/server/auth/actor';
import { db } from '$lib/server/db';
import { plans } from '$lib/server/db/schema';
import { createLayout } from '$lib/server/layouts/create-layout';
import { getLayout } from '$lib/server/layouts/get-layout';
import { saveLayout } from '$lib/server/layouts/save-layout';
import { draftPlan, draftSheetSvg } from '$lib/server/plans/draft-plan';
import { getPlan } from '$lib/server/plans/get-plan';
import { getPlanFile } from '$lib/server/plans/get-plan-file';
import { issuePlan } from '$lib/server/plans/issue-plan';
import { listPlans } from '$lib/server/plans/list-plans';
import { validPlan } from '$lib/server/plans/valid-plan';
import { createProject } from '$lib/server/projects/create-project';
import { openProject } from '$lib/server/projects/open-project';
import { savePlot } from '$lib/server/projects/save-plot';
import { inventedPlan } from '../fixtures/invented-field';
import { isMountRunOf } from '$lib/server/runs/is-mount-run-of';
import { startRun } from '$lib/server/runs/start-run';
import { expectRefused, joinProject, makePerson } from './helpers/people';
import { useTemporaryDatabase } from './helpers/temporary-database';

useTemporaryDatabase();
vi.setConfig({ testTimeout: 120_000, hookTimeout: 180_000 });

const folder = mkdtempSync(join(tmpdir(), 'tiltyard-plans-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

const field = inventedPlan(6, 3);
let owner: Actor & { teamId: string };
let crew: Actor;
let client: Actor;
let stranger: Actor;
let projectId: string;
let layoutId: string;

async function draw(document = field.layout): Promise<void> {
	const { revision } = await getLayout(owner, layoutId);
	await saveLayout(owner, layoutId, document, revision);
}

beforeAll(async () => {
	owner = await makePerson('Plan owner');
	crew = await makePerson('Plan crew');
	client = await makePerson('Plan client');
	stranger = await makePerson('Plan stranger');
	const project = await createProject(owner, { name: 'Ünïque farm “A”', place: field.place });
	projectId = project.id;
	await joinProject(projectId, crew, 'crew');
	await joinProject(projectId, client, 'client');
	layoutId = (await openProject(owner, projectId)).layout.id;
});

describe('a plan', () => {
	it('is refused for a layout with no tracker, with the remedy', async () => {
		const refusal = await expectRefused(issuePlan(owner, projectId, { layoutId, reason: 'x' }), 'invalid');
		expect(refusal.message).toMatch(/no tracker.*Place trackers/);
		expect((await draftPlan(owner, projectId, layoutId)).refusal).toMatch(/no tracker/);
		expect((await listPlans(owner, projectId, { limit: 10 })).items).toEqual([]);
	});

	it('is issued by owner and designer only; strangers do not learn that there is a project', async () => {
		await savePlot(owner, projectId, field.plot, 1);
		await draw();
		await expectRefused(issuePlan(stranger, projectId, { layoutId, reason: 'x' }), 'not_found');
		await expectRefused(issuePlan(crew, projectId, { layoutId, reason: 'x' }), 'not_allowed');
		await expectRefused(draftPlan(crew, projectId, layoutId), 'not_allowed');
		await expectRefused(draftSheetSvg(stranger, projectId, layoutId, 1), 'not_found');
		await expectRefused(draftSheetSvg(owner, projectId, layoutId, 99), 'not_found');
		const elsewhere = await createProject(owner, { name: 'Other', place: field.place });
		await expectRefused(issuePlan(owner, elsewhere.id, { layoutId, reason: 'x' }), 'not_found');
	});

	it('shows open points and a draft that says so before it is issued', async () => {
		const draft = await draftPlan(owner, projectId, layoutId);
		expect(draft).toMatchObject({ nextRevision: 'A', refusal: null });
		expect(draft.openPoints).toContain('No shade run was made for this layout.');
		expect(await draftSheetSvg(owner, projectId, layoutId, 1)).toContain('DRAFT — not for construction');
	});

	it('knows a mount choice whose run the layout has left behind, and one that a copy shares', async () => {
		const { id } = await startRun(owner, projectId, {
			kind: 'mounts',
			layoutId,
			year: 2026,
			stepMinutes: 20,
			treeYears: 0
		});
		expect(await isMountRunOf(projectId, layoutId, id)).toBe(true);
		const copy = await createLayout(owner, projectId, { name: 'Copy', document: field.layout });
		expect(await isMountRunOf(projectId, copy.id, id)).toBe(true);
		const moved = structuredClone(field.layout);
		moved.trackers[0].northM += 1;
		await draw(moved);
		expect(await isMountRunOf(projectId, layoutId, id)).toBe(false);
		await draw();
		expect(await isMountRunOf(projectId, layoutId, id)).toBe(true);
		expect(await isMountRunOf(projectId, layoutId, 'none')).toBe(false);
		expect(await isMountRunOf(projectId, layoutId, null)).toBe(true);
	});

	it('draws trackers at the axis height that the layout sets, not at the model’s own', async () => {
		const raised = structuredClone(field.layout);
		const heightM = raised.models[0].axisHeightM + 0.2;
		for (const tracker of raised.trackers) tracker.axisHeightM = heightM;
		await draw(raised);
		const { sheets } = await draftPlan(owner, projectId, layoutId);
		const number = sheets.findIndex((sheet) => sheet.name === 'Sensor mount') + 1;
		const svg = await draftSheetSvg(owner, projectId, layoutId, number);
		expect(svg).toContain(`${heightM.toFixed(2)} m above ground`);
		await draw();
	});

	it('gets letters in order, holds its files with their hashes, and the crew reads them', async () => {
		const first = await issuePlan(owner, projectId, { layoutId, reason: 'Pegging starts' });
		const second = await issuePlan(owner, projectId, { layoutId, reason: 'Again' });
		expect([first.revision, second.revision]).toEqual(['A', 'B']);
		const plan = await getPlan(crew, first.id);
		expect(plan.files.map((file) => file.name).sort()).toEqual([
			'unique-farm-a-A-field.geojson',
			'unique-farm-a-A-pegs.csv',
			'unique-farm-a-A-plan.pdf'
		]);
		for (const told of plan.files) {
			const file = await getPlanFile(crew, first.id, told.name);
			expect(createHash('sha256').update(file.bytes).digest('hex')).toBe(told.sha256);
			expect(file.bytes.byteLength).toBe(told.bytes);
			await expectRefused(getPlanFile(stranger, first.id, told.name), 'not_found');
			await expectRefused(getPlanFile(client, first.id, told.name), 'not_allowed');
		}
	});

	it('can be read by tools that are not ours', async () => {
		const plan = (await listPlans(crew, projectId, { limit: 1 })).items[0];
		const named = (ending: string) => plan.files.find((file) => file.name.endsWith(ending))?.name ?? '';
		const pdf = join(folder, 'plan.pdf');
		writeFileSync(pdf, (await getPlanFile(crew, plan.id, named('.pdf'))).bytes);
		const text = execFileSync('pdftotext', ['-layout', pdf, '-'], { encoding: 'utf8' });
		for (const word of [
			'Ünïque farm “A”',
			'Plan owner',
			'B03',
			'Supersedes',
			'Open points',
			'Again',
			'Issued'
		]) {
			expect(text).toContain(word);
		}
		expect(text).not.toContain('not for construction');
		const csv = (await getPlanFile(crew, plan.id, named('.csv'))).bytes.toString('utf8');
		expect(csv.trimEnd().split('\r\n')).toHaveLength(1 + field.rows.length);
		const json = JSON.parse((await getPlanFile(crew, plan.id, named('.geojson'))).bytes.toString('utf8'));
		expect(json.features).toHaveLength(1 + field.rows.length);
		expect(json.revision).toBe('B');
	});

	it('never changes when plot and layout do', async () => {
		const before = (await listPlans(owner, projectId, { limit: 1 })).items[0];
		expect(before.plotRevision).toBe(2);
		const moved = structuredClone(field.layout);
		moved.trackers[0].eastM += 1;
		await draw(moved);
		await savePlot(owner, projectId, { ...field.plot, setBackM: field.plot.setBackM + 1 }, 2);
		expect((await listPlans(owner, projectId, { limit: 1 })).items[0]).toEqual(before);
		for (const told of before.files) {
			const { bytes } = await getPlanFile(owner, before.id, told.name);
			expect(createHash('sha256').update(bytes).digest('hex')).toBe(told.sha256);
		}
		const valid = await validPlan(crew, projectId);
		expect(valid?.rows[0].eastM).toBe(field.layout.trackers[0].eastM);
		const [row] = await db.select().from(plans).where(eq(plans.id, before.id));
		expect(createHash('sha256').update(JSON.stringify(row.snapshot)).digest('hex')).toBe(row.snapshotSha256);
	});

	it('has no line of code that would change it', () => {
		const sources = readdirSync('src/lib/server', { recursive: true, encoding: 'utf8' })
			.filter((name) => name.endsWith('.ts') && !name.endsWith('.test.ts'))
			.map((name) => readFileSync(join('src/lib/server', name), 'utf8'));
		expect(sources.length).toBeGreaterThan(50);
		for (const source of sources) {
			expect(source).not.toMatch(/\.(update|delete)\(\s*(plans|planFiles)\s*\)/);
		}
	});

	it('gets different letters when two people issue at once', async () => {
		const both = await Promise.all([
			issuePlan(owner, projectId, { layoutId, reason: 'Left hand' }),
			issuePlan(owner, projectId, { layoutId, reason: 'Right hand' })
		]);
		expect(both.map((plan) => plan.revision).sort()).toEqual(['C', 'D']);
	});
});
