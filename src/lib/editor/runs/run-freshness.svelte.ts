import type { Run } from '$lib/schema';
import { httpRunApi, type RunApi } from './run-api';

/**
 * How stored runs stand now, for a page that was loaded before: a run ends, and an edit puts it out of date, without
 * the page being loaded again. Only the server can tell, since it compares the inputs.
 */
export class RunFreshness {
	#told = $state.raw<ReadonlyMap<string, Run>>(new Map());
	readonly #api: Pick<RunApi, 'read'>;

	constructor(api: Pick<RunApi, 'read'> = httpRunApi()) {
		this.#api = api;
	}

	/** The run as it was told last, else as it was loaded. */
	of(loaded: Run | null): Run | null {
		return loaded && (this.#told.get(loaded.id) ?? loaded);
	}

	/** Asks about some runs; what gets no answer stays as it was. */
	async look(runIds: readonly string[]): Promise<void> {
		const answers = await Promise.all(runIds.map((id) => this.#api.read(id)));
		const told = new Map(this.#told);
		for (const answer of answers) if (answer.ok) told.set(answer.value.id, answer.value);
		this.#told = told;
	}

	/** The page was loaded anew: what was told before is no newer. */
	forget(): void {
		this.#told = new Map();
	}
}
