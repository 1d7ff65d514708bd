import type { PreviewAnswer, PreviewRequest } from './preview-message';

/**
 * Talks to the preview worker: one question at a time, and of the questions that come in meanwhile only the latest is asked.
 */
export class PreviewClient {
	#worker: Worker | null = null;
	#asked: number | null = null;
	#next: PreviewRequest | null = null;
	#count = 0;

	constructor(
		private readonly onAnswer: (answer: PreviewAnswer) => void,
		private readonly onFailure: (message: string) => void
	) {}

	ask(request: Omit<PreviewRequest, 'id'>): void {
		this.#count += 1;
		this.#next = { ...request, id: this.#count };
		if (this.#asked === null) this.#send();
	}

	close(): void {
		this.#worker?.terminate();
		this.#worker = null;
		this.#asked = null;
		this.#next = null;
	}

	#send(): void {
		if (!this.#next) return;
		this.#worker ??= this.#start();
		this.#asked = this.#next.id;
		this.#worker.postMessage(this.#next);
		this.#next = null;
	}

	#start(): Worker {
		const worker = new Worker(new URL('./preview.worker.ts', import.meta.url), { type: 'module' });
		worker.onmessage = (event: MessageEvent<PreviewAnswer>) => {
			this.#asked = null;
			// An answer to an older state would flicker: when a newer question waits, only its answer counts.
			if (!this.#next) this.onAnswer(event.data);
			this.#send();
		};
		worker.onerror = (event) => {
			this.close();
			this.onFailure(event.message || 'The preview of the day could not be computed.');
		};
		return worker;
	}
}
