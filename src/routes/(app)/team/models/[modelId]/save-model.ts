import { problemSchema, type NewTrackerModel } from '$lib/schema';

type Saved = { ok: true } | { ok: false; message: string; errors: Record<string, string> };

/** Saves a model over the API: a new one of a team, or one that stands. */
export async function saveModel(
	target: { teamId: string } | { modelId: string },
	model: NewTrackerModel
): Promise<Saved> {
	const isNew = 'teamId' in target;
	let response: Response;
	try {
		response = await fetch(
			isNew ? `/api/v1/teams/${target.teamId}/models` : `/api/v1/models/${target.modelId}`,
			{
				method: isNew ? 'POST' : 'PUT',
				headers: { 'content-type': 'application/json' },
				body: JSON.stringify(model)
			}
		);
	} catch {
		// fetch rejects only when no answer came at all.
		return {
			ok: false,
			message: 'The server can’t be reached. What you typed stands: try again when you are online.',
			errors: {}
		};
	}
	if (response.ok) return { ok: true };
	const problem = problemSchema.safeParse(await response.json());
	if (!problem.success)
		return { ok: false, message: `The server answered ${response.status}. Nothing was saved.`, errors: {} };
	return {
		ok: false,
		message: problem.data.detail,
		errors: Object.fromEntries((problem.data.errors ?? []).map(({ path, message }) => [path, message]))
	};
}
