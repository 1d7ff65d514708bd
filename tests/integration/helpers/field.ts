/** Plots and layouts for tests; places and sizes are invented. */
import type { Layout, Plot, TrackerModel } from '$lib/core/document';
import { emptyLayout, emptyPlot, modelLibrary } from '$lib/schema';

export const place = {
	latitudeDeg: 41.2,
	longitudeDeg: 14.8,
	altitudeM: 420,
	timeZone: 'Europe/Rome',
	magneticDeclinationDeg: 3.6
};

export function model(id = 'library-ormeva-24'): TrackerModel {
	return structuredClone(modelLibrary.find((one) => one.id === id)!);
}

/** A square of land around the origin. */
export function squarePlot(sideM = 200): Plot {
	const half = sideM / 2;
	return {
		...emptyPlot(),
		boundary: [
			{
				outer: [
					[-half, -half],
					[half, -half],
					[half, half],
					[-half, half]
				],
				holes: []
			}
		]
	};
}

/** `columns` x `rows` trackers at 13 x 10.5 m. */
export function gridLayout(columns: number, rows: number): Layout {
	const used = model();
	const trackers = Array.from({ length: columns * rows }, (_, index) => ({
		id: `t${index}`,
		tag: `${String.fromCharCode(65 + Math.floor(index / columns))}${String((index % columns) + 1).padStart(2, '0')}`,
		modelId: used.id,
		eastM: (index % columns) * 13,
		northM: 100 - Math.floor(index / columns) * 10.5,
		axisHeightM: null,
		posture: { kind: 'following' as const }
	}));
	return { ...emptyLayout(), models: [used], trackers };
}
