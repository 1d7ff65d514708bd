import { problemSchema } from '$lib/schema';

type Made = { ok: true; id: string } | { ok: false; message: string };

/** Adds a layout to a project over the API: empty, or a copy. */
export async function addLayout(projectId: string, wish: { name: string; copyOf?: string }): Promise<Made> {
	let response: Response;
	try {
		response = await fetch(`/api/v1/projects/${projectId}/layouts`, {
			method: 'POST',
			headers: { 'content-type': 'application/json' },
			body: JSON.stringify(wish)
		});
	} catch {
		// fetch rejects only when no answer came at all.
		return {
			ok: false,
			message: 'The server can’t be reached. Nothing was added: try again when you are online.'
		};
	}
	const body: unknown = await response.json();
	if (response.ok && typeof body === 'object' && body && 'id' in body)
		return { ok: true, id: String(body.id) };
	const problem = problemSchema.safeParse(body);
	if (!problem.success)
		return { ok: false, message: `The server answered ${response.status}. Nothing was added.` };
	const fields = problem.data.errors?.map((each) => each.message).join(' ');
	return { ok: false, message: fields || problem.data.detail };
}
