import * as shapes from '$lib/schema/compute';
import { call, LARGE_BODY } from './spec';

const tag = 'compute';

/** Stateless calculations by the same core that serves the pages. Any signed-in person or token may ask. */
export const computeCalls = {
	computeSun: call({
		method: 'POST',
		path: '/api/v1/compute/sun',
		summary: 'Sun positions, airless and apparent',
		tag,
		scope: 'read',
		maxBytes: LARGE_BODY,
		cost: 1,
		body: shapes.sunRequestSchema,
		answer: {
			status: 200,
			description: 'One position for each time, in order',
			schema: shapes.sunAnswerSchema
		}
	}),
	computeShade: call({
		method: 'POST',
		path: '/api/v1/compute/shade',
		summary: 'Exact shaded share of every table of one scene',
		tag,
		scope: 'read',
		maxBytes: LARGE_BODY,
		cost: 1,
		body: shapes.shadeRequestSchema,
		answer: {
			status: 200,
			description: 'One line for each table, in order',
			schema: shapes.shadeAnswerSchema
		}
	}),
	computeMount: call({
		method: 'POST',
		path: '/api/v1/compute/mount',
		summary: 'Shade on points along the edges of one table, step by step',
		tag,
		scope: 'read',
		maxBytes: LARGE_BODY,
		cost: 2,
		body: shapes.mountRequestSchema,
		answer: {
			status: 200,
			description: 'For each step and edge asked for, one character a point: 1 shaded, 0 lit',
			schema: shapes.mountAnswerSchema
		}
	}),
	computeFieldLoss: call({
		method: 'POST',
		path: '/api/v1/compute/field-loss',
		summary: 'Beam lost to shade over a year, for every tracker of a field of equal machines',
		tag,
		scope: 'read',
		maxBytes: LARGE_BODY,
		cost: 5,
		body: shapes.fieldLossRequestSchema,
		answer: { status: 200, description: 'Losses by tracker, in order', schema: shapes.fieldLossAnswerSchema }
	}),
	computeIrradiance: call({
		method: 'POST',
		path: '/api/v1/compute/irradiance',
		summary: 'Sky diffuse irradiance on a tilted plane',
		tag,
		scope: 'read',
		cost: 1,
		body: shapes.irradianceRequestSchema,
		answer: { status: 200, description: 'W/m² on the plane', schema: shapes.irradianceAnswerSchema }
	})
};
