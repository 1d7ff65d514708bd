import type { Run, RunEvent, RunRequest } from '$lib/schema';
import { httpRunApi, type FieldMessage, type RunApi } from './run-api';

const pollEveryMs = 1000;

/**
 * Starts one kind of run, follows it and holds its result. It begins with the latest stored run of the page's data, so a reload in the middle of a run takes up following where it was.
 * Progress comes by server-sent events; when that line breaks it asks once a second instead.
 */
export class RunWatch<R> {
	run = $state.raw<Run | null>(null);
	result = $state.raw<R | null>(null);
	/** A request to start, cancel or fetch is on its way. */
	asking = $state(false);
	/** The result is being fetched. */
	fetching = $state(false);
	/** Why the last request was refused, as a sentence. */
	message = $state<string | null>(null);
	fields = $state.raw<FieldMessage[]>([]);

	readonly working = $derived(this.run !== null && isUnderway(this.run));

	readonly #projectId: string;
	readonly #kind: RunRequest['kind'];
	readonly #api: RunApi;
	#stopFollowing: (() => void) | null = null;
	#pollTimer: ReturnType<typeof setTimeout> | null = null;
	#closed = false;

	constructor(projectId: string, kind: RunRequest['kind'], api: RunApi = httpRunApi()) {
		this.#projectId = projectId;
		this.#kind = kind;
		this.#api = api;
	}

	/** Takes up the latest stored run: follows it while it is underway, fetches its result when it is done. */
	async resume(run: Run | null): Promise<void> {
		if (!run) {
			this.#letGo();
			this.run = null;
			this.result = null;
			return;
		}
		if (run.id === this.run?.id && (this.working || this.fetching)) return;
		if (run.id === this.run?.id && this.result !== null) {
			this.run = run;
			return;
		}
		await this.#adopt(run);
	}

	async start(options: Omit<RunRequest, 'kind'>): Promise<void> {
		if (this.asking || this.working) return;
		this.asking = true;
		this.#clearMessage();
		const answer = await this.#api.start(this.#projectId, { kind: this.#kind, ...options });
		this.asking = false;
		if (!answer.ok) {
			this.message = answer.message;
			this.fields = answer.fields;
			return;
		}
		await this.#adopt(answer.value);
	}

	/** Asks again whether the stored run still stands for what is drawn now. */
	async refresh(): Promise<void> {
		const id = this.run?.id;
		if (id === undefined || this.working) return;
		const answer = await this.#api.read(id);
		if (answer.ok && this.run?.id === id && !this.working && !this.#closed) this.run = answer.value;
	}

	async cancel(): Promise<void> {
		const run = this.run;
		if (!run || !this.working || this.asking) return;
		this.asking = true;
		const answer = await this.#api.cancel(run.id);
		this.asking = false;
		if (!answer.ok) this.message = answer.message;
		await this.#readAgain(run.id);
	}

	/** Stops following; the run itself goes on. */
	close(): void {
		this.#closed = true;
		this.#letGo();
	}

	async #adopt(run: Run): Promise<void> {
		this.#letGo();
		if (run.id !== this.run?.id) this.result = null;
		this.fetching = false;
		this.run = run;
		if (isUnderway(run)) this.#follow(run.id);
		else if (run.status === 'done') await this.#fetchResult(run.id);
	}

	#follow(runId: string): void {
		if (this.#closed) return;
		this.#stopFollowing = this.#api.follow(
			runId,
			(event) => this.#heard(runId, event),
			() => {
				this.#stopFollowing = null;
				if (this.working) this.#pollLater(runId);
			}
		);
	}

	#heard(runId: string, event: RunEvent): void {
		if (this.run?.id !== runId) return;
		if (event.status === 'queued' || event.status === 'working') {
			this.run = { ...this.run, ...event };
			return;
		}
		this.#letGo();
		void this.#readAgain(runId);
	}

	#pollLater(runId: string): void {
		if (this.#closed) return;
		this.#pollTimer = setTimeout(() => {
			this.#pollTimer = null;
			void this.#readAgain(runId);
		}, pollEveryMs);
	}

	async #readAgain(runId: string): Promise<void> {
		const answer = await this.#api.read(runId);
		if (this.#closed || this.run?.id !== runId) return;
		if (!answer.ok) {
			this.message = answer.message;
			if (this.#stopFollowing === null) this.#pollLater(runId);
			return;
		}
		this.#clearMessage();
		this.run = answer.value;
		if (isUnderway(answer.value)) {
			if (this.#stopFollowing === null) this.#pollLater(runId);
			return;
		}
		this.#letGo();
		if (answer.value.status === 'done') await this.#fetchResult(runId);
	}

	async #fetchResult(runId: string): Promise<void> {
		this.fetching = true;
		const answer = await this.#api.result(runId);
		if (this.run?.id !== runId) return;
		this.fetching = false;
		if (answer.ok) this.result = answer.value as R;
		else this.message = answer.message;
	}

	#letGo(): void {
		this.#stopFollowing?.();
		this.#stopFollowing = null;
		if (this.#pollTimer !== null) clearTimeout(this.#pollTimer);
		this.#pollTimer = null;
	}

	#clearMessage(): void {
		this.message = null;
		this.fields = [];
	}
}

function isUnderway(run: Run): boolean {
	return run.status === 'queued' || run.status === 'working';
}
