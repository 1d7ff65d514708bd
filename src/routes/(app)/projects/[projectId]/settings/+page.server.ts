import { redirect } from '@sveltejs/kit';
import { layoutNameSchema, projectChangeSchema } from '$lib/schema';
import { AppError, orPageError } from '$lib/server/errors';
import { requireUser } from '$lib/server/guard';
import { answerForm } from '$lib/server/http/read-form';
import { deleteLayout } from '$lib/server/layouts/delete-layout';
import { renameLayout } from '$lib/server/layouts/rename-layout';
import { changeProject } from '$lib/server/projects/change-project';
import { deleteProject } from '$lib/server/projects/delete-project';
import { findTimeZone } from '$lib/server/projects/find-time-zone';
import { getProject } from '$lib/server/projects/get-project';
import { projectFormSchema } from '../../project-form';
import { deleteFormSchema, layoutFormSchema } from './settings-forms';
import type { Actions } from './$types';

export const actions: Actions = {
	facts: (event) =>
		answerForm(event, projectFormSchema, async ({ name, place, winterRule }) => {
			const timeZone = place.timeZone ?? findTimeZone(place.latitudeDeg, place.longitudeDeg);
			const change = projectChangeSchema.parse({ name, place: { ...place, timeZone }, winterRule });
			await changeProject(requireUser(event), event.params.projectId, change);
		}),
	rename: (event) =>
		answerForm(event, layoutFormSchema, async ({ layoutId, layoutName }) => {
			const { name } = layoutNameSchema.parse({ name: layoutName });
			await renameLayout(requireUser(event), layoutId, name);
		}),
	deleteLayout: (event) =>
		answerForm(event, layoutFormSchema.pick({ layoutId: true }), async ({ layoutId }) => {
			await deleteLayout(requireUser(event), layoutId);
			redirect(303, `/projects/${event.params.projectId}/settings`);
		}),
	deleteProject: async (event) => {
		const actor = requireUser(event);
		const project = await orPageError(getProject(actor, event.params.projectId));
		return answerForm(event, deleteFormSchema, async ({ typedName }) => {
			if (typedName.trim() !== project.name)
				throw new AppError('invalid', 'Nothing was deleted.', {
					errors: [{ path: 'typedName', message: `Write the name exactly: ${project.name}` }]
				});
			await deleteProject(actor, project.id);
			redirect(303, '/projects');
		});
	}
};
