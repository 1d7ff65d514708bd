/** Name of a figure (effect.field.N.unit) to its value. */
export type Figures = Record<string, number>;

export interface BenchOptions {
	/** Leaves the long figures out and takes fewer suns and repeats for the rates; what a name means stays the same. */
	quick: boolean;
	/** Only figures whose name begins with this. */
	only: string;
	/** Where scratch files and the bundled workers stand. */
	folder: string;
	/** tests/bench itself, for the C++ sources. */
	sources: string;
	/** Hears each figure as it comes, and lines that say what was left out. */
	say: (line: string) => void;
	figure: (name: string, value: number, note: string) => void;
}

export interface Timing {
	/** Processor milliseconds of one repeat, median. */
	processorMs: number;
	/** The same by the clock. */
	clockMs: number;
	repeats: number;
}

export interface Patience {
	/** Work is repeated so long before it is measured, milliseconds: the compiler's own time is no figure of ours. */
	warmMs?: number;
	/** At most so many repeats, and none is begun after this time. */
	repeats?: number;
	budgetMs?: number;
}

/** A sample shorter than this is several calls: the processor's clock is coarse. */
const SHORTEST_SAMPLE_MS = 20;

export const median = (values: readonly number[]): number => {
	const sorted = [...values].sort((a, b) => a - b);
	const half = sorted.length >> 1;
	return sorted.length % 2 === 1 ? sorted[half] : (sorted[half - 1] + sorted[half]) / 2;
};

const processorMs = (): number => {
	const { user, system } = process.cpuUsage();
	return (user + system) / 1000;
};

export class Bench {
	readonly figures: Figures = {};

	constructor(readonly options: BenchOptions) {}

	/** Whether figures under this beginning of a name are asked for. */
	wants(prefix: string): boolean {
		const { only } = this.options;
		return prefix.startsWith(only) || only.startsWith(prefix);
	}

	note(name: string, value: number, note = ''): void {
		if (!name.startsWith(this.options.only)) return;
		this.figures[name] = Number(value.toPrecision(4));
		this.options.figure(name, this.figures[name], note);
	}

	/** Medians of some repeats after a warm-up. Processor time is the figure: others may work on the same machine. */
	time(work: () => void, patience: Patience = {}): Timing {
		const { quick } = this.options;
		const { warmMs = quick ? 150 : 400, repeats = quick ? 3 : 7, budgetMs = quick ? 1000 : 2000 } = patience;
		const began = performance.now();
		let warmed = 0;
		let once = { usedMs: 0, tookMs: 0 };
		const run = (calls: number): typeof once => {
			const usedBefore = processorMs();
			const clockBefore = performance.now();
			for (let k = 0; k < calls; k++) work();
			return {
				usedMs: (processorMs() - usedBefore) / calls,
				tookMs: (performance.now() - clockBefore) / calls
			};
		};
		while (performance.now() - began < warmMs) {
			once = run(1);
			warmed++;
		}
		// Work that takes longer than all the time there is warms itself, and is its own sample.
		if (once.tookMs > budgetMs) return { processorMs: once.usedMs, clockMs: once.tookMs, repeats: 1 };
		const calls = warmed === 0 ? 1 : Math.max(1, Math.ceil(SHORTEST_SAMPLE_MS / Math.max(once.tookMs, 1e-3)));
		const used: number[] = [];
		const clock: number[] = [];
		const start = performance.now();
		do {
			const { usedMs, tookMs } = run(calls);
			used.push(usedMs);
			clock.push(tookMs);
		} while (used.length < repeats && performance.now() - start < budgetMs);
		return { processorMs: median(used), clockMs: median(clock), repeats: used.length };
	}

	/** Times work and notes its processor milliseconds. */
	milliseconds(name: string, work: () => void, patience?: Patience): void {
		if (!this.wants(name)) return;
		const timing = this.time(work, patience);
		this.note(name, timing.processorMs, byTheClock(timing));
	}

	/** Times work on a number of table-suns and notes how many a second of processor time does. */
	tableSuns(name: string, tableSuns: number, work: () => void, remark = '', patience?: Patience): void {
		if (!this.wants(name)) return;
		const timing = this.time(work, patience);
		this.note(name, (1000 * tableSuns) / timing.processorMs, [remark, byTheClock(timing)].join(' ').trim());
	}
}

const byTheClock = ({ clockMs, repeats }: Timing): string =>
	`[${Number(clockMs.toPrecision(3))} ms by the clock, ${repeats} repeats]`;
