import { Bench, type BenchOptions, type Figures } from './bench';
import { memoryFigures } from './memory';
import { otherFigures } from './others';
import { layoutFigures, mountFigures, previewFigures, yearFigures } from './runs';
import { shareFigures, sunFigures } from './shares';

/** Runs everything that is asked for. */
export async function measure(options: BenchOptions): Promise<Figures> {
	const bench = new Bench(options);
	sunFigures(bench);
	shareFigures(bench);
	yearFigures(bench);
	previewFigures(bench);
	mountFigures(bench);
	layoutFigures(bench);
	await memoryFigures(bench);
	await otherFigures(bench);
	return bench.figures;
}
