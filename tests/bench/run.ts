import { Bench, type BenchOptions, type Figures } from './bench';
import { energyFigures } from './energy';
import { memoryFigures } from './memory';
import { nativeFigures } from './native-twin';
import { otherFigures } from './others';
import { layoutFigures, mountFigures, previewFigures, yearFigures } from './runs';
import { listFigures, shareFigures, sunFigures } from './shares';

/** Beginnings of the names that each part gives, so that nothing is prepared that nobody asked for. */
const PARTS: [effects: string[], part: (bench: Bench) => void | Promise<void>][] = [
	[['sun.'], sunFigures],
	[['lists.', 'listsUnlike.'], listFigures],
	[['alike.', 'unlike.', 'sunBySun'], shareFigures],
	[['native.', 'alike.regular.1000.ofNative'], nativeFigures],
	[['year.', 'yearUnlike.'], yearFigures],
	[['moved.', 'day.', 'dayUnlike.'], previewFigures],
	[['mounts.', 'mountsUnlike.'], mountFigures],
	[['sky.', 'skyUnlike.', 'energy.'], energyFigures],
	[['fill.', 'checks.'], layoutFigures],
	[['memory.', 'year.regular.'], memoryFigures],
	[['raysMesh', 'raysEmbree', 'unionPolygons.'], otherFigures]
];

/** Runs everything that is asked for. */
export async function measure(options: BenchOptions): Promise<Figures> {
	const bench = new Bench(options);
	for (const [effects, part] of PARTS) {
		if (effects.some((effect) => bench.wants(effect))) await part(bench);
	}
	return bench.figures;
}
