import type { Mount, MountEdge, TrackerModel } from '$lib/core/document';
import type { MountPlaceResult } from '$lib/core/results';

/** Where a table is drawn, seen facing the glass: right of the picture is the right side, up is the top edge. */
export interface TableFrame {
	/** Picture of the glass, px. */
	x: number;
	y: number;
	width: number;
	height: number;
	pxPerM: number;
}

/** Fits the glass with a band for the edges around it into a width. */
export function fitTable(
	model: Pick<TrackerModel, 'widthM' | 'heightM'>,
	widthPx: number,
	bandPx: number
): TableFrame {
	const inner = Math.max(widthPx - 2 * bandPx, 40);
	const pxPerM = Math.min(inner / model.widthM, 340 / model.heightM);
	const width = model.widthM * pxPerM;
	return { x: (widthPx - width) / 2, y: bandPx, width, height: model.heightM * pxPerM, pxPerM };
}

/** The place of a mount along its edge in the picture, on the line of the glass edge. */
export function edgePoint(
	mount: Pick<Mount, 'edge' | 'alongM'>,
	frame: TableFrame
): { x: number; y: number } {
	const midX = frame.x + frame.width / 2;
	const midY = frame.y + frame.height / 2;
	switch (mount.edge) {
		case 'top':
			return { x: midX + mount.alongM * frame.pxPerM, y: frame.y };
		case 'bottom':
			return { x: midX + mount.alongM * frame.pxPerM, y: frame.y + frame.height };
		case 'left':
			return { x: frame.x, y: midY - mount.alongM * frame.pxPerM };
		case 'right':
			return { x: frame.x + frame.width, y: midY - mount.alongM * frame.pxPerM };
	}
}

/** Least distance between neighbouring places of an edge, m. */
export function spacingOf(places: readonly MountPlaceResult[]): number {
	let least = Infinity;
	for (let i = 1; i < places.length; i += 1) {
		least = Math.min(least, Math.abs(places[i].mount.alongM - places[i - 1].mount.alongM));
	}
	return Number.isFinite(least) ? least : 0.1;
}

/** A cell outside the glass edge: its depth grows with how bad the place is, so that it reads without colour too. */
export function edgeCell(
	mount: Pick<Mount, 'edge' | 'alongM'>,
	frame: TableFrame,
	spacingM: number,
	depthPx: number,
	gapPx = 4
): { x: number; y: number; width: number; height: number } {
	const at = edgePoint(mount, frame);
	const length = Math.max(spacingM * frame.pxPerM - 1, 1);
	switch (mount.edge) {
		case 'top':
			return { x: at.x - length / 2, y: at.y - gapPx - depthPx, width: length, height: depthPx };
		case 'bottom':
			return { x: at.x - length / 2, y: at.y + gapPx, width: length, height: depthPx };
		case 'left':
			return { x: at.x - gapPx - depthPx, y: at.y - length / 2, width: depthPx, height: length };
		case 'right':
			return { x: at.x + gapPx, y: at.y - length / 2, width: depthPx, height: length };
	}
}

/** The place of a tracker's results that is nearest to a mount on the same edge. */
export function nearestPlace(
	edges: Record<MountEdge, MountPlaceResult[]>,
	mount: Pick<Mount, 'edge' | 'alongM'>
): MountPlaceResult | null {
	let best: MountPlaceResult | null = null;
	for (const place of edges[mount.edge]) {
		const away = Math.abs(place.mount.alongM - mount.alongM);
		if (!best || away < Math.abs(best.mount.alongM - mount.alongM)) best = place;
	}
	return best;
}

/** Least and most of a measure along an edge; null for an edge with no places. */
export function rangeOf(
	places: readonly MountPlaceResult[],
	measure: (place: MountPlaceResult) => number
): { least: number; most: number } | null {
	if (!places.length) return null;
	const values = places.map(measure);
	return { least: Math.min(...values), most: Math.max(...values) };
}
