import { eq } from 'drizzle-orm';
import type { PlanRequest } from '$lib/schema/plan';
import type { PlanContent } from '$lib/sheets';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { isDuplicate } from '../db/duplicate';
import { newId } from '../db/ids';
import { planFiles, plans, users } from '../db/schema';
import { AppError, notFound } from '../errors';
import { makePlanFiles, sha256, type MadeFile } from './plan-files';
import { planContent, planSources } from './plan-sources';
import { whyNoPlan } from './refuse-empty';

/** Tries before two people who issue at the same moment are told so. */
const TRIES = 3;

/**
 * Issues the next plan revision of a layout as it stands: sheets, peg list and GeoJSON, stored with what they were made
 * from and never changed afterwards. Open points are printed on it with the reason.
 * @returns the plan's id and its revision letter
 */
export async function issuePlan(
	actor: Actor,
	projectId: string,
	request: PlanRequest
): Promise<{ id: string; revision: string }> {
	for (let attempt = 1; ; attempt += 1) {
		const sources = await planSources(actor, projectId, request.layoutId);
		const refusal = whyNoPlan(sources.layout);
		if (refusal) throw new AppError('invalid', refusal, { errors: [{ path: 'layoutId', message: refusal }] });
		const issuedAt = new Date();
		const issued = { timeMs: issuedAt.getTime(), by: await nameOf(actor) };
		const content = planContent(sources, {
			title: request.title ?? null,
			reason: request.reason,
			issued
		});
		const files = await makePlanFiles(content);
		try {
			const id = await store(actor, projectId, request, content, files, issuedAt, sources.runs);
			return { id, revision: content.heading.revision };
		} catch (error) {
			// Somebody took the letter meanwhile: make the sheets anew with the next one.
			if (!isDuplicate(error)) throw error;
			if (attempt >= TRIES) {
				throw new AppError(
					'conflict',
					'Other plans are being issued right now. Look at them, then try again.'
				);
			}
		}
	}
}

async function nameOf(actor: Actor): Promise<string> {
	const [user] = await db.select({ name: users.name }).from(users).where(eq(users.id, actor.userId));
	if (!user) throw notFound();
	return user.name;
}

async function store(
	actor: Actor,
	projectId: string,
	request: PlanRequest,
	content: PlanContent,
	files: MadeFile[],
	issuedAt: Date,
	runs: { shade: { id: string; inputHash: string } | null; mounts: { id: string; inputHash: string } | null }
): Promise<string> {
	const id = newId(issuedAt.getTime());
	const behind = (run: { id: string; inputHash: string } | null) =>
		run && { id: run.id, inputHash: run.inputHash };
	const snapshot = {
		version: 1,
		content,
		runs: { shade: behind(runs.shade), mounts: behind(runs.mounts) },
		files: files.map(({ name, sha256: hash }) => ({ name, sha256: hash }))
	};
	await db.transaction(async (tx) => {
		await tx.insert(plans).values({
			id,
			projectId,
			layoutId: request.layoutId,
			layoutRevision: content.heading.layoutRevision,
			revisionLetter: content.heading.revision,
			title: content.heading.project,
			reason: request.reason,
			issuedBy: actor.userId,
			issuedAt,
			snapshot,
			snapshotSha256: sha256(JSON.stringify(snapshot))
		});
		for (const file of files) {
			await tx.insert(planFiles).values({
				planId: id,
				name: file.name,
				mediaType: file.mediaType,
				byteSize: file.bytes.byteLength,
				sha256: file.sha256,
				bytes: file.bytes
			});
		}
	});
	return id;
}
