/** Who saved the stored revision of a layout, and when. */
export interface LastSaved {
	by: string | null;
	byYou: boolean;
	atMs: number;
}

/** Asks for the newest saved revision of a layout; null when no answer came or none is kept. */
export async function lastSaved(layoutId: string, fetcher: typeof fetch = fetch): Promise<LastSaved | null> {
	try {
		const response = await fetcher(`/api/v1/layouts/${layoutId}/revisions?limit=1`);
		if (!response.ok) return null;
		const { items } = (await response.json()) as {
			items: { savedBy: string | null; savedByYou: boolean; savedAt: string }[];
		};
		const [newest] = items;
		return newest ? { by: newest.savedBy, byYou: newest.savedByYou, atMs: Date.parse(newest.savedAt) } : null;
	} catch {
		// No answer: the words then leave out who it was.
		return null;
	}
}

/** "by you in another window at 14:02", "by Rosa Quint at 14:02"; `clock` writes a time of day. */
export function savedWords(saved: LastSaved, clock: (ms: number) => string): string {
	const who = saved.byYou ? 'by you in another window' : saved.by === null ? '' : `by ${saved.by}`;
	return [who, `at ${clock(saved.atMs)}`].filter(Boolean).join(' ');
}
