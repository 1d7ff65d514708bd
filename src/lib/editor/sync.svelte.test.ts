import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type { CopyStorage } from './pending-copy';
import { DocumentSync } from './sync.svelte';
import { httpTransport, type SaveOutcome, type Stored, type Transport } from './transport';

interface Doc {
	text: string;
}

function memoryStorage(): CopyStorage & { entries: Map<string, string> } {
	const entries = new Map<string, string>();
	return {
		entries,
		getItem: (key) => entries.get(key) ?? null,
		setItem: (key, value) => void entries.set(key, value),
		removeItem: (key) => void entries.delete(key)
	};
}

/** A server with one document and honest revisions, which can be cut off. */
class FakeServer implements Transport<Doc> {
	stored: Stored<Doc> = { document: { text: 'first' }, revision: 1 };
	saves = 0;
	reachable = true;
	loseAnswer = false;
	refuse: string | null = null;

	async save(document: Doc, revision: number): Promise<SaveOutcome> {
		this.saves += 1;
		if (!this.reachable) return { kind: 'unreachable', message: 'No connection.' };
		if (this.refuse) return { kind: 'refused', message: this.refuse };
		if (revision !== this.stored.revision) return { kind: 'stale' };
		this.stored = { document, revision: revision + 1 };
		if (this.loseAnswer) {
			this.loseAnswer = false;
			return { kind: 'unreachable', message: 'No connection.' };
		}
		return { kind: 'saved', revision: this.stored.revision };
	}

	async revision(): Promise<number | null> {
		return this.reachable ? this.stored.revision : null;
	}

	async load(): Promise<Stored<Doc> | null> {
		return this.reachable ? this.stored : null;
	}
}

function sync(server: FakeServer, storage: CopyStorage, revision = server.stored.revision) {
	const { document } = server.stored;
	return new DocumentSync<Doc>({ transport: server, storage, storageKey: 'copy', revision, document });
}

describe('DocumentSync', () => {
	beforeEach(() => void vi.useFakeTimers());
	afterEach(() => void vi.useRealTimers());

	it('sends the newest state once, a moment after the last edit', async () => {
		const server = new FakeServer();
		const storage = memoryStorage();
		const it = sync(server, storage);
		it.changed({ text: 'a' });
		await vi.advanceTimersByTimeAsync(600);
		it.changed({ text: 'ab' });
		expect(it.state).toBe('unsaved');
		expect(storage.entries.size).toBe(1);
		await vi.advanceTimersByTimeAsync(699);
		expect(server.saves).toBe(0);
		await vi.advanceTimersByTimeAsync(1);
		expect(server.saves).toBe(1);
		expect(server.stored.document.text).toBe('ab');
		expect(it.state).toBe('saved');
		expect(it.revision).toBe(2);
		expect(storage.entries.size).toBe(0);
	});

	it('sends again what was edited while a save was under way', async () => {
		const server = new FakeServer();
		const it = sync(server, memoryStorage());
		let release = (): void => undefined;
		const gate = new Promise<void>((resolve) => (release = resolve));
		const honest = server.save.bind(server);
		vi.spyOn(server, 'save').mockImplementationOnce(async (document, revision) => {
			await gate;
			return honest(document, revision);
		});
		it.changed({ text: 'a' });
		await vi.advanceTimersByTimeAsync(700);
		expect(it.state).toBe('saving');
		it.changed({ text: 'b' });
		release();
		await vi.advanceTimersByTimeAsync(0);
		expect(it.hasPending).toBe(true);
		await vi.advanceTimersByTimeAsync(1500);
		expect(server.stored).toEqual({ document: { text: 'b' }, revision: 3 });
		expect(it.state).toBe('saved');
	});

	it('keeps work through a lost connection and sends it when the connection is back', async () => {
		const server = new FakeServer();
		const storage = memoryStorage();
		server.reachable = false;
		const it = sync(server, storage);
		it.changed({ text: 'a' });
		await vi.advanceTimersByTimeAsync(700);
		expect(it.state).toBe('offline');
		expect(storage.entries.size).toBe(1);
		server.reachable = true;
		it.online();
		await vi.advanceTimersByTimeAsync(0);
		expect(it.state).toBe('saved');
		expect(server.stored.document.text).toBe('a');
	});

	it('tries again by itself, ever more slowly', async () => {
		const server = new FakeServer();
		server.reachable = false;
		const it = sync(server, memoryStorage());
		it.changed({ text: 'a' });
		await vi.advanceTimersByTimeAsync(700 + 1000 + 2000 + 4000);
		expect(server.saves).toBe(4);
		await vi.advanceTimersByTimeAsync(7999);
		expect(server.saves).toBe(4);
		server.reachable = true;
		await vi.advanceTimersByTimeAsync(1);
		expect(it.state).toBe('saved');
	});

	it('restores after a reload what was never acknowledged, and saves it', async () => {
		const server = new FakeServer();
		const storage = memoryStorage();
		server.reachable = false;
		sync(server, storage).changed({ text: 'kept' });
		vi.clearAllTimers();
		server.reachable = true;
		const reloaded = sync(server, storage);
		expect(reloaded.restore(server.stored.document)).toEqual({ text: 'kept' });
		await vi.advanceTimersByTimeAsync(0);
		expect(reloaded.state).toBe('saved');
		expect(server.stored.document.text).toBe('kept');
	});

	it('drops a copy that the server turns out to have', () => {
		const server = new FakeServer();
		const storage = memoryStorage();
		storage.setItem('copy', JSON.stringify({ document: { text: 'first' }, baseRevision: 0, savedAtMs: 1 }));
		expect(sync(server, storage).restore(server.stored.document)).toBeNull();
		expect(storage.entries.size).toBe(0);
	});

	it('drops a damaged copy instead of failing on it', () => {
		const server = new FakeServer();
		const storage = memoryStorage();
		storage.setItem('copy', '{"docu');
		expect(sync(server, storage).restore(server.stored.document)).toBeNull();
		expect(storage.entries.size).toBe(0);
	});

	it('takes its own save whose answer was lost for saved', async () => {
		const server = new FakeServer();
		server.loseAnswer = true;
		const it = sync(server, memoryStorage());
		it.changed({ text: 'a' });
		await vi.advanceTimersByTimeAsync(700);
		expect(it.state).toBe('offline');
		await vi.advanceTimersByTimeAsync(1000);
		expect(it.state).toBe('saved');
		expect(it.revision).toBe(2);
	});

	it('knows a newer revision when it looks, and takes it over as asked', async () => {
		const server = new FakeServer();
		const it = sync(server, memoryStorage());
		expect(await it.look()).toBe(false);
		server.stored = { document: { text: 'theirs' }, revision: 2 };
		expect(await it.look()).toBe(true);
		expect(it.newer).toBe(2);
		it.adopt(2, server.stored.document);
		expect(it.newer).toBeNull();
		expect(it.state).toBe('saved');
		server.reachable = false;
		expect(await it.look()).toBe(false);
	});

	it('asks which version goes on when it looks while work waits, and saves both in one', async () => {
		const server = new FakeServer();
		const it = sync(server, memoryStorage());
		server.stored = { document: { text: 'theirs' }, revision: 2 };
		it.changed({ text: 'mine' });
		expect(await it.look()).toBe(false);
		expect(it.conflict?.base).toEqual({ text: 'first' });
		await it.settleWith({ text: 'theirs and mine' });
		expect(server.stored).toEqual({ document: { text: 'theirs and mine' }, revision: 3 });
		expect(it.newer).toBeNull();
		expect(it.state).toBe('saved');
	});

	it('stops and asks when somebody else was first; keeping mine overwrites theirs', async () => {
		const server = new FakeServer();
		const it = sync(server, memoryStorage());
		server.stored = { document: { text: 'theirs' }, revision: 2 };
		it.changed({ text: 'mine' });
		await vi.advanceTimersByTimeAsync(700);
		expect(it.state).toBe('stale');
		expect(it.conflict).toEqual({
			mine: { text: 'mine' },
			theirs: { text: 'theirs' },
			theirRevision: 2,
			base: { text: 'first' }
		});
		it.changed({ text: 'mine too' });
		await vi.advanceTimersByTimeAsync(5000);
		expect(server.stored.document.text).toBe('theirs');
		await it.keepMine();
		expect(server.stored).toEqual({ document: { text: 'mine too' }, revision: 3 });
		expect(it.state).toBe('saved');
	});

	it('gives theirs when theirs is chosen, and forgets mine', async () => {
		const server = new FakeServer();
		const storage = memoryStorage();
		const it = sync(server, storage);
		server.stored = { document: { text: 'theirs' }, revision: 7 };
		it.changed({ text: 'mine' });
		await vi.advanceTimersByTimeAsync(700);
		expect(it.takeTheirs()).toEqual({ document: { text: 'theirs' }, revision: 7 });
		expect(it.revision).toBe(7);
		expect(it.state).toBe('saved');
		expect(storage.entries.size).toBe(0);
	});

	it('asks as well when a restored copy was made from an older revision', () => {
		const server = new FakeServer();
		const storage = memoryStorage();
		storage.setItem('copy', JSON.stringify({ document: { text: 'mine' }, baseRevision: 1, savedAtMs: 1 }));
		server.stored = { document: { text: 'theirs' }, revision: 4 };
		const it = sync(server, storage);
		expect(it.restore(server.stored.document)).toEqual({ text: 'mine' });
		expect(it.state).toBe('stale');
		expect(it.conflict?.theirRevision).toBe(4);
	});

	it('says why a document is refused and does not hammer the server with it', async () => {
		const server = new FakeServer();
		const storage = memoryStorage();
		server.refuse = 'trackers[0].tag: a tag is missing';
		const it = sync(server, storage);
		it.changed({ text: 'bad' });
		await vi.advanceTimersByTimeAsync(60_000);
		expect(server.saves).toBe(1);
		expect(it.state).toBe('unsaved');
		expect(it.message).toBe('trackers[0].tag: a tag is missing');
		expect(storage.entries.size).toBe(1);
	});

	it('takes a lost answer for its own save even when the work went on meanwhile', async () => {
		const server = new FakeServer();
		server.loseAnswer = true;
		const it = sync(server, memoryStorage());
		it.changed({ text: 'a' });
		await vi.advanceTimersByTimeAsync(700);
		expect(server.stored.revision).toBe(2);
		it.changed({ text: 'ab' });
		await vi.advanceTimersByTimeAsync(2000);
		expect(it.conflict).toBeNull();
		expect(it.state).toBe('saved');
		expect(server.stored).toEqual({ document: { text: 'ab' }, revision: 3 });
	});

	it('knows its own save again when the page is left between sending and answer', async () => {
		const server = new FakeServer();
		const storage = memoryStorage();
		const before = sync(server, storage);
		const honest = server.save.bind(server);
		vi.spyOn(server, 'save').mockImplementationOnce(async (document, revision) => {
			await honest(document, revision);
			return new Promise<SaveOutcome>(() => undefined);
		});
		before.changed({ text: 'a' });
		await vi.advanceTimersByTimeAsync(700);
		before.changed({ text: 'ab' });
		before.close();
		const reloaded = sync(server, storage);
		expect(reloaded.restore(server.stored.document)).toEqual({ text: 'ab' });
		await vi.advanceTimersByTimeAsync(0);
		expect(reloaded.conflict).toBeNull();
		expect(server.stored).toEqual({ document: { text: 'ab' }, revision: 3 });
		expect(storage.entries.size).toBe(0);
	});

	it('never claims to keep what the device has no room for', async () => {
		const server = new FakeServer();
		server.reachable = false;
		const full: CopyStorage = {
			...memoryStorage(),
			setItem: () => {
				throw new Error('QuotaExceededError');
			}
		};
		const it = sync(server, full);
		it.changed({ text: 'a' });
		await vi.advanceTimersByTimeAsync(700);
		expect(it.kept).toBe(false);
		expect(it.message).toBe(
			'No connection. This device has no room to keep a copy: keep this page open until it is saved.'
		);
		server.reachable = true;
		it.online();
		await vi.advanceTimersByTimeAsync(0);
		expect(it.kept).toBe(true);
		expect(it.message).toBeNull();
	});
});

describe('saving over HTTP', () => {
	const answering = (status: number, text: string, type: string) =>
		httpTransport<Doc>(
			'/documents/1',
			async () => new Response(text, { status, headers: { 'content-type': type } })
		);

	it('takes an answer that is not the server\u2019s own for none, and tries again', async () => {
		const portal = answering(200, '<html>Sign in to the network</html>', 'text/html');
		expect((await portal.save({ text: 'a' }, 1)).kind).toBe('unreachable');
		const broken = answering(502, '{"title":', 'application/json');
		expect((await broken.save({ text: 'a' }, 1)).kind).toBe('unreachable');
		const honest = answering(200, '{"revision":2}', 'application/json');
		expect(await honest.save({ text: 'a' }, 1)).toEqual({ kind: 'saved', revision: 2 });
	});
});
