import type { PlanPoint } from '../core';
import type { PaperPoint, PaperRect } from './drawing';

/**
 * Reductions of ISO 5455:1979, read as 1 to this, from the largest scale down; the standard lets the series go on by
 * whole powers of ten. 1:250 and 1:25 are not among them.
 */
export const isoReductions = [
	1, 2, 5, 10, 20, 50, 100, 200, 500, 1000, 2000, 5000, 10_000, 20_000, 50_000, 100_000, 200_000, 500_000
] as const;

/** The largest scale at which a size fits a window, not larger than a limit. Metres and millimetres. */
export function chooseReduction(
	sizeM: [number, number],
	windowMm: [number, number],
	largest: number
): number {
	const fits = (reduction: number) =>
		(sizeM[0] * 1000) / reduction <= windowMm[0] && (sizeM[1] * 1000) / reduction <= windowMm[1];
	const found = isoReductions.find((reduction) => reduction >= largest && fits(reduction));
	if (found === undefined) throw new RangeError(`No scale of the series shows ${sizeM.join(' x ')} m.`);
	return found;
}

export interface Extent {
	minEastM: number;
	minNorthM: number;
	maxEastM: number;
	maxNorthM: number;
}

/** Smallest extent of points, each with a margin; null for no points. */
export function extentOf(points: { at: PlanPoint; marginM: number }[]): Extent | null {
	if (points.length === 0) return null;
	const extent = { minEastM: Infinity, minNorthM: Infinity, maxEastM: -Infinity, maxNorthM: -Infinity };
	for (const { at, marginM } of points) {
		extent.minEastM = Math.min(extent.minEastM, at[0] - marginM);
		extent.minNorthM = Math.min(extent.minNorthM, at[1] - marginM);
		extent.maxEastM = Math.max(extent.maxEastM, at[0] + marginM);
		extent.maxNorthM = Math.max(extent.maxNorthM, at[1] + marginM);
	}
	return extent;
}

/** Where the local grid lies on the paper: true north up, exact scale, extent in the middle of the window. */
export class MapFrame {
	readonly mmPerM: number;
	private readonly centre: PlanPoint;

	constructor(
		readonly window: PaperRect,
		extent: Extent,
		readonly reduction: number
	) {
		this.mmPerM = 1000 / reduction;
		this.centre = [(extent.minEastM + extent.maxEastM) / 2, (extent.minNorthM + extent.maxNorthM) / 2];
	}

	toPaper(point: PlanPoint): PaperPoint {
		const { xMm, yMm, widthMm, heightMm } = this.window;
		return [
			xMm + widthMm / 2 + (point[0] - this.centre[0]) * this.mmPerM,
			yMm + heightMm / 2 - (point[1] - this.centre[1]) * this.mmPerM
		];
	}

	/** The ground that the window shows. */
	get shown(): Extent {
		const halfEast = this.window.widthMm / 2 / this.mmPerM;
		const halfNorth = this.window.heightMm / 2 / this.mmPerM;
		return {
			minEastM: this.centre[0] - halfEast,
			maxEastM: this.centre[0] + halfEast,
			minNorthM: this.centre[1] - halfNorth,
			maxNorthM: this.centre[1] + halfNorth
		};
	}
}
