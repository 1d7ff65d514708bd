import type { Run, RunEvent, RunRequest } from '$lib/schema';

/** What a run watch needs of the world; tests bring their own. */
export interface RunApi {
	start(projectId: string, request: RunRequest): Promise<RunAnswer<Run>>;
	read(runId: string): Promise<RunAnswer<Run>>;
	cancel(runId: string): Promise<RunAnswer<Run>>;
	result(runId: string): Promise<RunAnswer<unknown>>;
	/** Follows the events of a run; answers the way to stop following. `onLost` is told once when the line breaks. */
	follow(runId: string, onEvent: (event: RunEvent) => void, onLost: () => void): () => void;
}

/** An answer of the server or the sentence that says why there is none. */
export type RunAnswer<T> = { ok: true; value: T } | { ok: false; message: string; fields: FieldMessage[] };

/** One refused input: the path in the request and what to do about it. */
export interface FieldMessage {
	path: string;
	message: string;
}

const unreachable =
	'The server cannot be reached. What is stored stays safe: try again when the connection is back.';

/** The run calls of the HTTP interface. */
export function httpRunApi(fetcher: typeof fetch = fetch): RunApi {
	async function call<T>(path: string, init?: RequestInit): Promise<RunAnswer<T>> {
		let response: Response;
		try {
			response = await fetcher(path, init);
		} catch {
			// fetch rejects only when no answer came at all.
			return { ok: false, message: unreachable, fields: [] };
		}
		const body: unknown = await response.json().catch(() => null);
		if (response.ok && body !== null) return { ok: true, value: body as T };
		return refusal(response.status, body);
	}

	const post = (body: unknown): RequestInit => ({
		method: 'POST',
		headers: { 'content-type': 'application/json' },
		body: JSON.stringify(body)
	});
	const runPath = (runId: string) => `/api/v1/runs/${encodeURIComponent(runId)}`;

	return {
		start: (projectId, request) =>
			call<Run>(`/api/v1/projects/${encodeURIComponent(projectId)}/runs`, post(request)),
		read: (runId) => call<Run>(runPath(runId)),
		cancel: (runId) => call<Run>(`${runPath(runId)}/cancel`, post({})),
		result: (runId) => call<unknown>(`${runPath(runId)}/result`),
		follow(runId, onEvent, onLost) {
			const source = new EventSource(`${runPath(runId)}/events`);
			const read = (message: MessageEvent<string>) => {
				const event = readEvent(message.data);
				if (event) onEvent(event);
			};
			source.onmessage = read;
			source.onerror = () => {
				source.close();
				onLost();
			};
			return () => source.close();
		}
	};
}

/** The sentence and the fields of a problem answer (RFC 9457). */
function refusal(status: number, body: unknown): { ok: false; message: string; fields: FieldMessage[] } {
	const problem = (typeof body === 'object' && body !== null ? body : {}) as Record<string, unknown>;
	const text = [problem.detail, problem.title].find((part) => typeof part === 'string' && part !== '');
	const fields = Array.isArray(problem.errors)
		? problem.errors.flatMap((entry: unknown) => {
				const { path, message } = (entry ?? {}) as Record<string, unknown>;
				return typeof message === 'string' ? [{ path: String(path ?? ''), message }] : [];
			})
		: [];
	return {
		ok: false,
		message:
			typeof text === 'string' ? text : `The server answered ${status}. Nothing was changed: try again.`,
		fields
	};
}

/** A run event of one message, or null when it is not one. */
export function readEvent(text: string): RunEvent | null {
	let data: unknown;
	try {
		data = JSON.parse(text);
	} catch {
		// A comment or a cut line is no event; the next one follows.
		return null;
	}
	const event = data as Partial<RunEvent> | null;
	if (!event || typeof event.status !== 'string' || typeof event.progress !== 'number') return null;
	return { status: event.status, progress: event.progress, stage: event.stage ?? '' };
}
