import { z } from 'zod';
import { newTrackerModelSchema, trackerModelSchema } from '$lib/schema/tracker-model';
import { pageQuerySchema, pageSchema } from '$lib/schema/page';
import * as shapes from '$lib/schema/project';
import { call, LARGE_BODY } from './spec';

const savedSchema = z.strictObject({
	revision: z.number().int(),
	updatedAt: z.iso.datetime({ offset: true })
});

export const projectCalls = {
	listProjects: call({
		method: 'GET',
		path: '/api/v1/projects',
		summary: 'Projects that the caller may see, last changed first',
		tag: 'projects',
		query: pageQuerySchema,
		answer: {
			status: 200,
			description: 'A page of projects',
			schema: pageSchema(shapes.projectSummarySchema)
		}
	}),
	createProject: call({
		method: 'POST',
		path: '/api/v1/projects',
		summary: 'Open a project at a place, with an empty plot and a first layout',
		tag: 'projects',
		body: shapes.newProjectSchema,
		answer: { status: 201, description: 'The project', schema: shapes.projectSchema }
	}),
	getProject: call({
		method: 'GET',
		path: '/api/v1/projects/{projectId}',
		summary: 'One project',
		tag: 'projects',
		answer: { status: 200, description: 'The project', schema: shapes.projectSchema }
	}),
	changeProject: call({
		method: 'PATCH',
		path: '/api/v1/projects/{projectId}',
		summary: 'Change name, place, winter rule or notes',
		tag: 'projects',
		body: shapes.projectChangeSchema,
		answer: { status: 200, description: 'The project', schema: shapes.projectSchema }
	}),
	deleteProject: call({
		method: 'DELETE',
		path: '/api/v1/projects/{projectId}',
		summary: 'Delete a project and all that belongs to it',
		tag: 'projects',
		answer: { status: 204, description: 'Gone' }
	}),
	getPlot: call({
		method: 'GET',
		path: '/api/v1/projects/{projectId}/plot',
		summary: 'Boundary, ground, skyline and obstacles',
		tag: 'plot',
		answer: { status: 200, description: 'The plot', schema: shapes.plotAnswerSchema, etag: true }
	}),
	savePlot: call({
		method: 'PUT',
		path: '/api/v1/projects/{projectId}/plot',
		summary: 'Save the plot over the revision that it was made on',
		tag: 'plot',
		body: shapes.plotSaveSchema,
		maxBytes: LARGE_BODY,
		ifMatch: true,
		answer: { status: 200, description: 'The new revision', schema: savedSchema, etag: true }
	}),
	listLayouts: call({
		method: 'GET',
		path: '/api/v1/projects/{projectId}/layouts',
		summary: 'Layouts of a project, oldest first',
		tag: 'layouts',
		query: pageQuerySchema,
		answer: { status: 200, description: 'A page of layouts', schema: pageSchema(shapes.layoutSummarySchema) }
	}),
	createLayout: call({
		method: 'POST',
		path: '/api/v1/projects/{projectId}/layouts',
		summary: 'Add a layout: empty, given, or a copy of another',
		tag: 'layouts',
		body: shapes.newLayoutSchema,
		maxBytes: LARGE_BODY,
		answer: { status: 201, description: 'The layout', schema: shapes.layoutAnswerSchema, etag: true }
	}),
	getLayout: call({
		method: 'GET',
		path: '/api/v1/layouts/{layoutId}',
		summary: 'One layout',
		tag: 'layouts',
		answer: { status: 200, description: 'The layout', schema: shapes.layoutAnswerSchema, etag: true }
	}),
	saveLayout: call({
		method: 'PUT',
		path: '/api/v1/layouts/{layoutId}',
		summary: 'Save a layout over the revision that it was made on',
		tag: 'layouts',
		body: shapes.layoutSaveSchema,
		maxBytes: LARGE_BODY,
		ifMatch: true,
		answer: { status: 200, description: 'The new revision', schema: shapes.layoutSummarySchema, etag: true }
	}),
	renameLayout: call({
		method: 'PATCH',
		path: '/api/v1/layouts/{layoutId}',
		summary: 'Rename a layout; its revision stays',
		tag: 'layouts',
		body: shapes.layoutNameSchema,
		answer: { status: 200, description: 'The layout', schema: shapes.layoutSummarySchema, etag: true }
	}),
	deleteLayout: call({
		method: 'DELETE',
		path: '/api/v1/layouts/{layoutId}',
		summary: 'Delete a layout that is not the last one and that no plan was issued from',
		tag: 'layouts',
		answer: { status: 204, description: 'Gone' }
	}),
	listLayoutRevisions: call({
		method: 'GET',
		path: '/api/v1/layouts/{layoutId}/revisions',
		summary: 'Saved revisions of a layout, newest first',
		tag: 'layouts',
		query: pageQuerySchema,
		answer: {
			status: 200,
			description: 'A page of revisions',
			schema: pageSchema(shapes.layoutRevisionSchema)
		}
	}),
	listModels: call({
		method: 'GET',
		path: '/api/v1/teams/{teamId}/models',
		summary: 'Tracker models: the library and the team’s own',
		tag: 'models',
		query: pageQuerySchema,
		answer: { status: 200, description: 'A page of models', schema: pageSchema(trackerModelSchema) }
	}),
	createModel: call({
		method: 'POST',
		path: '/api/v1/teams/{teamId}/models',
		summary: 'Describe a tracker model of the team',
		tag: 'models',
		body: newTrackerModelSchema,
		answer: { status: 201, description: 'The model', schema: trackerModelSchema }
	}),
	changeModel: call({
		method: 'PUT',
		path: '/api/v1/models/{modelId}',
		summary: 'Describe a model anew; layouts keep the model as they were saved with',
		tag: 'models',
		body: newTrackerModelSchema,
		answer: { status: 200, description: 'The model', schema: trackerModelSchema }
	}),
	deleteModel: call({
		method: 'DELETE',
		path: '/api/v1/models/{modelId}',
		summary: 'Take a model out of the team’s list; layouts keep theirs',
		tag: 'models',
		answer: { status: 204, description: 'Gone' }
	})
};
