import type { Layout, Plot } from '../document';
import { boundaryAreaM2 } from './polygon';

/** Glass of one model, m²: the centre slot is not glass. */
export function tableAreaM2(model: { widthM: number; heightM: number; centreGapM: number }): number {
	return (model.widthM - model.centreGapM) * model.heightM;
}

/** Table area over the land inside the boundary, 0..; null while there is no boundary. */
export function groundCover(plot: Plot, layout: Layout): number | null {
	const land = boundaryAreaM2(plot.boundary);
	if (!(land > 0)) return null;
	const areas = new Map(layout.models.map((model) => [model.id, tableAreaM2(model)]));
	let glass = 0;
	for (const tracker of layout.trackers) glass += areas.get(tracker.modelId) ?? 0;
	return glass / land;
}
