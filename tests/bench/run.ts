import { Bench, type BenchOptions, type Figures } from './bench';
import { shareFigures, sunFigures } from './shares';

/** Runs everything that is asked for. */
export async function measure(options: BenchOptions): Promise<Figures> {
	const bench = new Bench(options);
	sunFigures(bench);
	shareFigures(bench);
	return bench.figures;
}
