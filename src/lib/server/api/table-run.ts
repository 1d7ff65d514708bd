import { z } from 'zod';
import { planRequestSchema, planSummarySchema } from '$lib/schema/plan';
import { pageQuerySchema, pageSchema } from '$lib/schema/page';
import { runEventSchema, runListQuerySchema, runRequestSchema, runSchema } from '$lib/schema/run';
import { call } from './spec';

const tag = 'runs';

export const runCalls = {
	listRuns: call({
		method: 'GET',
		path: '/api/v1/projects/{projectId}/runs',
		summary: 'Shade, mount and answers runs of a project, newest first',
		tag,
		query: runListQuerySchema,
		answer: { status: 200, description: 'A page of runs', schema: pageSchema(runSchema) }
	}),
	startRun: call({
		method: 'POST',
		path: '/api/v1/projects/{projectId}/runs',
		summary: 'Ask for a run of a layout as it stands; identical inputs answer the stored run',
		tag,
		cost: 5,
		// Energy by a weather file brings 26,280 values.
		maxBytes: 1024 * 1024,
		body: runRequestSchema,
		answer: { status: 202, description: 'The run, waiting, working or already done', schema: runSchema }
	}),
	getRun: call({
		method: 'GET',
		path: '/api/v1/runs/{runId}',
		summary: 'How a run stands',
		tag,
		answer: { status: 200, description: 'The run', schema: runSchema }
	}),
	getRunResult: call({
		method: 'GET',
		path: '/api/v1/runs/{runId}/result',
		summary: 'What a finished run found',
		tag,
		answer: {
			status: 200,
			description:
				'The result; its form goes with the kind of the run. It says which core made it and the hash of its input (results from before core 0.2.0 leave the hash out)',
			schema: z.looseObject({ coreVersion: z.string(), inputHash: z.string().optional() })
		}
	}),
	cancelRun: call({
		method: 'POST',
		path: '/api/v1/runs/{runId}/cancel',
		summary: 'Stop a run that waits or works',
		tag,
		answer: { status: 200, description: 'The run', schema: runSchema }
	}),
	followRun: call({
		method: 'GET',
		path: '/api/v1/runs/{runId}/events',
		summary: 'Progress as server-sent events until the run has ended',
		tag,
		answer: {
			status: 200,
			description: 'Events whose data is { status, progress, stage }',
			schema: runEventSchema,
			mediaType: 'text/event-stream'
		}
	}),
	listPlans: call({
		method: 'GET',
		path: '/api/v1/projects/{projectId}/plans',
		summary: 'Issued plans of a project, newest first',
		tag: 'plans',
		query: pageQuerySchema,
		answer: { status: 200, description: 'A page of plans', schema: pageSchema(planSummarySchema) }
	}),
	issuePlan: call({
		method: 'POST',
		path: '/api/v1/projects/{projectId}/plans',
		summary: 'Issue the next plan revision of a layout; it never changes afterwards',
		tag: 'plans',
		cost: 10,
		body: planRequestSchema,
		answer: { status: 201, description: 'The plan', schema: planSummarySchema }
	}),
	getPlan: call({
		method: 'GET',
		path: '/api/v1/plans/{planId}',
		summary: 'An issued plan and its files',
		tag: 'plans',
		answer: { status: 200, description: 'The plan', schema: planSummarySchema }
	}),
	getPlanFile: call({
		method: 'GET',
		path: '/api/v1/plans/{planId}/files/{name}',
		summary: 'One file of a plan, byte for byte as issued',
		tag: 'plans',
		answer: { status: 200, description: 'The file', mediaType: 'application/octet-stream' }
	})
};
