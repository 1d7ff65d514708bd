import type { PaperPoint } from './drawing';

/** An upright rectangle on the paper, millimetres. */
export type Box = [minX: number, minY: number, maxX: number, maxY: number];
export type Segment = [PaperPoint, PaperPoint];

export function overlap(a: Box, b: Box): boolean {
	return a[0] < b[2] && b[0] < a[2] && a[1] < b[3] && b[1] < a[3];
}

/** Whether a circle's line runs through a box. */
export function cutsCircle(circle: { at: PaperPoint; radiusMm: number }, box: Box): boolean {
	const [x, y] = circle.at;
	const nearX = Math.max(box[0] - x, 0, x - box[2]);
	const nearY = Math.max(box[1] - y, 0, y - box[3]);
	const farX = Math.max(Math.abs(box[0] - x), Math.abs(box[2] - x));
	const farY = Math.max(Math.abs(box[1] - y), Math.abs(box[3] - y));
	return Math.hypot(nearX, nearY) < circle.radiusMm && Math.hypot(farX, farY) > circle.radiusMm;
}

/** Whether some of a line lies inside a box (Liang and Barsky 1984). */
export function cutsSegment([a, b]: Segment, box: Box): boolean {
	let [from, to] = [0, 1];
	for (const axis of [0, 1] as const) {
		const way = b[axis] - a[axis];
		const [low, high] = [box[axis] - a[axis], box[axis + 2] - a[axis]];
		if (way === 0) {
			if (low >= 0 || high <= 0) return false;
			continue;
		}
		from = Math.max(from, Math.min(low / way, high / way));
		to = Math.min(to, Math.max(low / way, high / way));
	}
	return from < to;
}

/** Whether a closed ring covers any of a box: its line runs through it or it lies around it. */
export function cutsRing(ring: PaperPoint[], box: Box): boolean {
	if (ring.some((at, i) => cutsSegment([at, ring[(i + 1) % ring.length]], box))) return true;
	const [x, y] = [(box[0] + box[2]) / 2, (box[1] + box[3]) / 2];
	let inside = false;
	ring.forEach(([x0, y0], i) => {
		const [x1, y1] = ring[(i + 1) % ring.length];
		if (y0 > y !== y1 > y && x < x0 + ((y - y0) / (y1 - y0)) * (x1 - x0)) inside = !inside;
	});
	return inside;
}

/** Boxes in a grid of 10 mm cells, so that a thousand tags do not compare with each other. */
export class BoxGrid {
	private readonly cells = new Map<string, { box: Box; id: number }[]>();

	add(box: Box, id = -1): void {
		for (const key of this.keys(box)) {
			const cell = this.cells.get(key);
			if (cell) cell.push({ box, id });
			else this.cells.set(key, [{ box, id }]);
		}
	}

	hits(box: Box): boolean {
		return this.keys(box).some((key) => this.cells.get(key)?.some((other) => overlap(box, other.box)));
	}

	/** Ids of the boxes that overlap one or touch it. */
	near(box: Box): number[] {
		return [
			...new Set(
				this.around(box)
					.filter((other) => touch(box, other.box))
					.map(({ id }) => id)
			)
		];
	}

	/** Boxes in the cells that one lies in. */
	around(box: Box): { box: Box; id: number }[] {
		return this.keys(box).flatMap((key) => this.cells.get(key) ?? []);
	}

	private keys(box: Box): string[] {
		const keys: string[] = [];
		for (let i = Math.floor(box[0] / 10); i <= Math.floor(box[2] / 10); i += 1) {
			for (let j = Math.floor(box[1] / 10); j <= Math.floor(box[3] / 10); j += 1) keys.push(`${i},${j}`);
		}
		return keys;
	}
}

function touch(a: Box, b: Box): boolean {
	return a[0] <= b[2] && b[0] <= a[2] && a[1] <= b[3] && b[1] <= a[3];
}
