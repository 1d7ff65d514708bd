import { and, count, desc, eq, inArray } from 'drizzle-orm';
import type { z } from 'zod';
import { checkEnergy, CORE_VERSION, type EnergySettings, type Place } from '$lib/core';
import type { Run, runRequestSchema } from '$lib/schema/run';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { newId } from '../db/ids';
import { runs } from '../db/schema';
import { AppError } from '../errors';
import { requireProject } from '../guard';
import { wakeJobs } from '../jobs';
import { currentSources } from './current-input';
import { runInput, runInputHash, toldEnergy } from './run-input';
import { runColumns, runView } from './run-view';

/** Runs of one project that may wait or work at a time. */
const MAX_OPEN_RUNS = 20;

/**
 * Asks for a run of a layout as it stands. The answer is the stored run when one with the same inputs is there or on its
 * way, else a new one that waits.
 */
export async function startRun(
	actor: Actor,
	projectId: string,
	request: z.output<typeof runRequestSchema>
): Promise<Run> {
	await requireProject(actor, projectId, 'run.start');
	const { kind, layoutId, stepMinutes, treeYears } = request;
	const current = await sourcesOf(projectId, layoutId);
	const year = request.year ?? new Date().getUTCFullYear();
	if (request.energy) refuseEnergy(current.sources.place, request.energy, stepMinutes);
	const input = runInput(current.sources, { year, stepMinutes, treeYears }, request.energy);
	const inputHash = runInputHash(kind, input);
	const [same] = await db
		.select(runColumns)
		.from(runs)
		.where(
			and(
				eq(runs.inputHash, inputHash),
				eq(runs.kind, kind),
				eq(runs.layoutId, layoutId),
				inArray(runs.status, ['queued', 'working', 'done'])
			)
		)
		.orderBy(desc(runs.id))
		.limit(1);
	if (same) return runView(same);
	await refuseTooMany(projectId);
	const row = {
		id: newId(),
		projectId,
		layoutId,
		kind,
		layoutRevision: current.layoutRevision,
		plotRevision: current.plotRevision,
		year,
		stepMinutes,
		treeYears,
		energy: request.energy ? toldEnergy(request.energy) : null,
		status: 'queued' as const,
		progress: 0,
		stage: 'waiting',
		inputHash,
		coreVersion: CORE_VERSION,
		input,
		requestedBy: actor.userId,
		createdAt: new Date()
	};
	await db.insert(runs).values(row);
	wakeJobs();
	const { input: _input, requestedBy: _requestedBy, ...told } = row;
	return runView({ ...told, startedAt: null, finishedAt: null, computeMs: null, error: null });
}

async function sourcesOf(projectId: string, layoutId: string) {
	const current = await currentSources(layoutId).catch((error: unknown) => {
		if (error instanceof AppError && error.code === 'not_found') return null;
		throw error;
	});
	if (!current || current.projectId !== projectId) {
		throw new AppError('invalid', 'The layout is not of this project.', {
			errors: [{ path: 'layoutId', message: 'Give the id of a layout of this project.' }]
		});
	}
	if (current.sources.layout.trackers.length === 0) {
		throw new AppError('invalid', 'The layout has no tracker yet.', {
			errors: [{ path: 'layoutId', message: 'Place at least one tracker in this layout first.' }]
		});
	}
	return current;
}

function refuseEnergy(place: Place, energy: EnergySettings, stepMinutes: number): void {
	const refusal = checkEnergy(place, energy, stepMinutes);
	if (!refusal) return;
	throw new AppError('invalid', 'The energy of the year can’t be computed from this; nothing was started.', {
		errors: [{ path: `energy.${refusal.path}`, message: refusal.message }]
	});
}

async function refuseTooMany(projectId: string): Promise<void> {
	const [{ open }] = await db
		.select({ open: count() })
		.from(runs)
		.where(and(eq(runs.projectId, projectId), inArray(runs.status, ['queued', 'working'])));
	if (open >= MAX_OPEN_RUNS) {
		throw new AppError(
			'too_many',
			`${open} runs of this project wait already: cancel some or let them end.`,
			{
				retryAfterSeconds: 10
			}
		);
	}
}
