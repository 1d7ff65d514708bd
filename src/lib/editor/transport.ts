/** What came of one attempt to save a document. */
export type SaveOutcome =
	| { kind: 'saved'; revision: number }
	/** Somebody else saved first: the revision that was edited is not the current one. */
	| { kind: 'stale' }
	/** The server could not be reached, or could not answer properly; trying again later is right. The message says why. */
	| { kind: 'unreachable'; message: string }
	/** The server will not take this document as it is; trying again unchanged is useless. */
	| { kind: 'refused'; message: string };

export interface Stored<T> {
	document: T;
	revision: number;
}

export interface Transport<T> {
	save(document: T, revision: number): Promise<SaveOutcome>;
	load(): Promise<Stored<T> | null>;
	/** The revision that is stored now; null when no answer came. */
	revision(): Promise<number | null>;
}

interface Problem {
	title?: string;
	detail?: string;
	errors?: { path: string; message: string }[];
}

async function readProblem(response: Response): Promise<string> {
	const fallback = `The server answered ${response.status}.`;
	if (!(response.headers.get('content-type') ?? '').includes('json')) return fallback;
	const problem = (await response.json().catch(() => null)) as Problem | null;
	if (!problem) return fallback;
	const first = problem.errors?.[0];
	const sentence = problem.detail ?? problem.title ?? fallback;
	return first ? `${sentence} ${first.path}: ${first.message}` : sentence;
}

/** Saves by PUT with `If-Match` and loads by GET at one address of the HTTP interface. */
export function httpTransport<T>(url: string, fetcher: typeof fetch = fetch): Transport<T> {
	return {
		async save(document, revision) {
			let response: Response;
			try {
				response = await fetcher(url, {
					method: 'PUT',
					headers: { 'content-type': 'application/json', 'if-match': `"${revision}"` },
					body: JSON.stringify({ document })
				});
			} catch {
				// fetch rejects only when no answer came at all: no network, or the server is down.
				return {
					kind: 'unreachable',
					message: 'No connection.'
				};
			}
			if (response.ok) {
				// Something between here and the server may answer in its place, with a page of its own.
				const answer = (await response.json().catch(() => null)) as { revision?: unknown } | null;
				if (typeof answer?.revision === 'number') return { kind: 'saved', revision: answer.revision };
				return {
					kind: 'unreachable',
					message: 'No proper answer came.'
				};
			}
			if (response.status === 412) return { kind: 'stale' };
			if (response.status === 401) {
				return {
					kind: 'unreachable',
					message: 'You are signed out: sign in again, in another tab, to save.'
				};
			}
			const message = await readProblem(response);
			if (response.status >= 500 || response.status === 429) {
				return {
					kind: 'unreachable',
					message
				};
			}
			return { kind: 'refused', message };
		},
		async load() {
			try {
				const response = await fetcher(url, { headers: { accept: 'application/json' } });
				if (!response.ok) return null;
				const answer = (await response.json()) as Stored<T>;
				return { document: answer.document, revision: answer.revision };
			} catch {
				// No answer: the caller stays as it is and asks again.
				return null;
			}
		},
		async revision() {
			try {
				const response = await fetcher(url, { method: 'HEAD', cache: 'no-store' });
				const tag = /^(?:W\/)?"(\d+)"$/.exec(response.headers.get('etag') ?? '');
				return response.ok && tag ? Number(tag[1]) : null;
			} catch {
				// No answer: whether there is something newer is asked again at the next look.
				return null;
			}
		}
	};
}
