import { PendingCopyStore, type CopyStorage } from './pending-copy';
import { sameData } from './kernels/same';
import type { Stored, Transport } from './transport';

export type SaveState = 'saved' | 'saving' | 'unsaved' | 'offline' | 'stale';

/** Two versions of one document, neither of which may be lost without a choice. */
export interface Conflict<T> {
	mine: T;
	theirs: T;
	theirRevision: number;
	/** What both grew from; null when that is not known any more. */
	base: T | null;
}

interface SyncOptions<T> {
	transport: Transport<T>;
	/** Where unacknowledged work is kept; null keeps it in memory only. */
	storage: CopyStorage | null;
	storageKey: string;
	revision: number;
	/** What is stored at this revision. */
	document?: T;
	/** Quiet time after an edit before it is sent. */
	delayMs?: number;
}

const noRoom = 'This device has no room to keep a copy: keep this page open until it is saved.';
const firstRetryMs = 1000;
const longestRetryMs = 30_000;
/** States without an answer that are remembered; only one of them can have been stored. */
const mostUnanswered = 4;

/**
 * Keeps one document and its stored revision in step: sends the newest state a moment after the last edit, keeps a copy on
 * the device until the server has it, tries again when the connection is back, and stops to ask when somebody else was first.
 */
export class DocumentSync<T> {
	state = $state<SaveState>('saved');
	/** Why it is not saved, as a sentence; null when all is well. */
	message = $state<string | null>(null);
	conflict = $state.raw<Conflict<T> | null>(null);
	revision = $state(0);
	/** A newer revision that was saved elsewhere and is not shown here; null when none is known. */
	newer = $state<number | null>(null);
	/** False while this device has no room for a copy: closing the page would then lose what is not saved. */
	kept = $state(true);

	/** States that were sent on this revision without an answer: the server may hold one of them. */
	#unanswered: T[] = [];
	#pending: T | null = null;
	/** The document of `revision`. */
	#base: T | null;
	#busy = false;
	#timer: ReturnType<typeof setTimeout> | null = null;
	#retryMs = firstRetryMs;
	readonly #transport: Transport<T>;
	readonly #copies: PendingCopyStore<T>;
	readonly #delayMs: number;

	constructor(options: SyncOptions<T>) {
		this.#transport = options.transport;
		this.#copies = new PendingCopyStore(options.storage, options.storageKey);
		this.#delayMs = options.delayMs ?? 700;
		this.revision = options.revision;
		this.#base = options.document ?? null;
	}

	get hasPending(): boolean {
		return this.#pending !== null;
	}

	/** The document was edited. */
	changed(document: T): void {
		this.#pending = document;
		this.#keepCopy(document);
		this.message = this.kept ? null : noRoom;
		if (this.conflict) {
			this.conflict = { ...this.conflict, mine: document };
			return;
		}
		if (this.state !== 'offline') this.state = 'unsaved';
		this.#schedule(this.#delayMs);
	}

	/**
	 * Looks for work that an earlier visit could not save. `current` is what the server has now.
	 * Answers the document to show, or null when there is nothing to restore.
	 */
	restore(current: T): T | null {
		const copy = this.#copies.get();
		if (!copy) return null;
		if (sameData(copy.document, current)) {
			this.#copies.drop();
			return null;
		}
		this.#pending = copy.document;
		// The newer revision may be an earlier state of this very work, sent when the page was left.
		const ours = copy.unanswered?.some((sent) => sameData(sent, current)) ?? false;
		if (copy.baseRevision === this.revision || ours) {
			if (ours) this.#keepCopy(copy.document);
			else this.#unanswered = copy.unanswered ?? [];
			this.state = 'unsaved';
			this.#schedule(0);
		} else {
			this.#stop({ mine: copy.document, theirs: current, theirRevision: this.revision, base: null });
		}
		return copy.document;
	}

	/** Sends what is pending now. Safe to call at any time. */
	async flush(): Promise<void> {
		this.#cancelTimer();
		if (this.#busy || this.#pending === null || this.conflict) return;
		this.#busy = true;
		this.state = 'saving';
		try {
			await this.#send(this.#pending);
		} finally {
			this.#busy = false;
		}
		this.#sendRest();
	}

	/** Edits that came in while a save was under way; a refused document waits for the next edit instead. */
	#sendRest(): void {
		const waits = this.#pending !== null && this.#timer === null;
		if (waits && this.state === 'unsaved' && this.message === null) this.#schedule(this.#delayMs);
	}

	/** The connection is back: no need to wait for the next try. */
	online(): void {
		this.#retryMs = firstRetryMs;
		if (this.state === 'offline') void this.flush();
	}

	/** Overwrites the other version with mine. */
	async keepMine(): Promise<void> {
		if (this.conflict) await this.settleWith(this.conflict.mine);
	}

	/** Saves a document over the other version: mine, or both in one. */
	async settleWith(document: T): Promise<void> {
		if (!this.conflict) return;
		this.revision = this.conflict.theirRevision;
		this.#base = this.conflict.theirs;
		this.#pending = document;
		this.conflict = null;
		this.newer = null;
		this.#keepCopy(this.#pending);
		this.state = 'unsaved';
		await this.flush();
	}

	/** Gives up mine; answers the version to show. */
	takeTheirs(): Stored<T> | null {
		if (!this.conflict) return null;
		const { theirs, theirRevision } = this.conflict;
		this.adopt(theirRevision, theirs);
		return { document: theirs, revision: theirRevision };
	}

	/** The page has the document of this revision now, with nothing pending. */
	adopt(revision: number, document: T): void {
		this.#base = document;
		this.#settle(revision);
		this.#copies.drop();
	}

	/**
	 * Asks whether a newer revision was saved elsewhere. Answers true when there is one and nothing of ours waits to be saved; else
	 * what waits is sent, which ends in the choice between the two.
	 */
	async look(): Promise<boolean> {
		if (this.#busy || this.conflict) return false;
		const stored = await this.#transport.revision();
		if (stored === null || stored <= this.revision || this.#busy || this.conflict) return false;
		this.newer = stored;
		if (this.#pending === null) return true;
		await this.flush();
		return false;
	}

	/** Stops the clockwork; the copy on the device stays. */
	close(): void {
		this.#cancelTimer();
	}

	async #send(sending: T): Promise<void> {
		if (!this.#unanswered.includes(sending)) {
			this.#unanswered = [...this.#unanswered, sending].slice(-mostUnanswered);
		}
		const outcome = await this.#transport.save(sending, this.revision);
		if (outcome.kind === 'refused') this.#unanswered = this.#unanswered.filter((sent) => sent !== sending);
		if (outcome.kind === 'saved') this.#acknowledge(sending, outcome.revision);
		else if (outcome.kind === 'stale') await this.#compare(sending);
		else if (outcome.kind === 'unreachable') this.#retryLater(outcome.message);
		else {
			this.state = 'unsaved';
			this.message = outcome.message;
		}
	}

	#acknowledge(sent: T, revision: number): void {
		this.#retryMs = firstRetryMs;
		this.#unanswered = [];
		if (this.#pending === sent) {
			this.adopt(revision, sent);
			return;
		}
		this.revision = revision;
		this.#base = sent;
		this.message = null;
		if (this.#pending !== null) this.#keepCopy(this.#pending);
		this.state = 'unsaved';
	}

	/** A refused revision may be our own earlier save whose answer was lost: then the contents agree. */
	async #compare(sent: T): Promise<void> {
		const stored = await this.#transport.load();
		if (!stored) this.#retryLater('No connection.');
		else if (sameData(stored.document, sent)) this.#acknowledge(sent, stored.revision);
		else if (this.#unanswered.some((earlier) => sameData(stored.document, earlier))) {
			this.#unanswered = [];
			this.revision = stored.revision;
			this.#base = stored.document;
			this.#retryMs = firstRetryMs;
			this.#keepCopy(this.#pending ?? sent);
			this.message = null;
			this.state = 'unsaved';
		} else
			this.#stop({
				mine: this.#pending ?? sent,
				theirs: stored.document,
				theirRevision: stored.revision,
				base: this.#base
			});
	}

	#stop(conflict: Conflict<T>): void {
		this.#cancelTimer();
		this.conflict = conflict;
		this.state = 'stale';
		this.message = 'A newer version was saved elsewhere. Choose what goes on.';
	}

	#retryLater(message: string): void {
		this.state = 'offline';
		this.message = `${message} ${this.kept ? 'Your work is kept on this device and sent later.' : noRoom}`;
		this.#schedule(this.#retryMs);
		this.#retryMs = Math.min(this.#retryMs * 2, longestRetryMs);
	}

	#settle(revision: number): void {
		this.#cancelTimer();
		this.#pending = null;
		this.#unanswered = [];
		this.kept = true;
		this.conflict = null;
		this.message = null;
		this.revision = revision;
		if (this.newer !== null && this.newer <= revision) this.newer = null;
		this.state = 'saved';
	}

	#keepCopy(document: T): void {
		const earlier = this.#unanswered.filter((sent) => sent !== document);
		this.kept = this.#copies.put({
			document,
			baseRevision: this.revision,
			savedAtMs: Date.now(),
			...(earlier.length > 0 && { unanswered: earlier })
		});
	}

	#schedule(delayMs: number): void {
		this.#cancelTimer();
		this.#timer = setTimeout(() => {
			this.#timer = null;
			void this.flush();
		}, delayMs);
	}

	#cancelTimer(): void {
		if (this.#timer !== null) clearTimeout(this.#timer);
		this.#timer = null;
	}
}
