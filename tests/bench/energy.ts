import { prepareField, skyDirections, skyView, type RunInput } from '../../src/lib/core';
import type { Bench } from './bench';
import { alikeField, unlikeField } from './fields';
import { threadFigures } from './threads';

const withEnergy = (input: RunInput): RunInput => ({
	...input,
	energy: { sky: { source: 'clear' }, skyModel: 'hay-davies', albedo: 0.2 }
});

/** What every table sees of the sky while all stand as for one sun. */
function skyFigure(bench: Bench, name: string, input: RunInput): void {
	if (!bench.wants(name)) return;
	const { engine, skyline } = prepareField(input);
	const directions = skyDirections();
	const shares = new Float64Array(engine.count);
	const sun = { azimuthDeg: 130, elevationDeg: 35 };
	bench.milliseconds(name, () => void skyView(engine, skyline, directions, sun, 0, engine.count, shares), {
		budgetMs: 1500
	});
}

export async function energyFigures(bench: Bench): Promise<void> {
	skyFigure(bench, 'sky.regular.1000.ms', alikeField('regular', 1000));
	skyFigure(bench, 'skyUnlike.sloped.1000.ms', unlikeField('sloped', 1000));
	if (bench.options.quick) return;
	await threadFigures(bench, 'energy', 'energy.regular.100', withEnergy(alikeField('regular', 100)));
	await threadFigures(bench, 'energy', 'energy.regular.1000', withEnergy(alikeField('regular', 1000)));
}
