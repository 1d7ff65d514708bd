import type { PaperPoint, PaperRect } from './drawing';
import { lineWidthMm } from './font-book';
import { MIN_CAP_MM } from './text-fit';

export interface TagWish {
	text: string;
	at: PaperPoint;
	/** Reach circle on the paper; 0 for what has none. */
	radiusMm: number;
	/** Left out when it finds no place; goes after all others. */
	optional?: boolean;
}

export interface PlacedTag {
	text: string;
	capMm: number;
	/** Middle of the baseline. */
	at: PaperPoint;
	optional: boolean;
	/** End of a leader line at the cross, when the tag stands away from it. */
	leaderTo: PaperPoint | null;
}

type Box = [minX: number, minY: number, maxX: number, maxY: number];

/** Half the size of a centre cross with its clear space. */
const CROSS_MM = 1.5;
const CAPS_MM = [2.8, 2.5, 2.2, 2, MIN_CAP_MM];

/**
 * Places every tag by its cross so that no two tags touch, none covers a cross and none leaves the window; tags that
 * lie on the fewest circle lines are preferred.
 * @returns the tags, all of one size, or null when some tag finds no place even at the smallest size
 */
export function placeTags(wishes: TagWish[], window: PaperRect, useLeaders: boolean): PlacedTag[] | null {
	for (const capMm of CAPS_MM) {
		const placed = placeAt(wishes, window, capMm, useLeaders && capMm === MIN_CAP_MM);
		if (placed) return placed;
	}
	return null;
}

function placeAt(wishes: TagWish[], window: PaperRect, capMm: number, leaders: boolean): PlacedTag[] | null {
	const taken = new BoxGrid();
	const circles = new BoxGrid();
	wishes.forEach((wish, i) => {
		const [x, y] = wish.at;
		taken.add([x - CROSS_MM, y - CROSS_MM, x + CROSS_MM, y + CROSS_MM]);
		const r = wish.radiusMm;
		circles.add([x - r, y - r, x + r, y + r], i);
	});
	const edge: Box = [window.xMm, window.yMm, window.xMm + window.widthMm, window.yMm + window.heightMm];
	const placed: PlacedTag[] = [];
	for (const wish of [...wishes].sort((a, b) => Number(a.optional ?? false) - Number(b.optional ?? false))) {
		const w = lineWidthMm(wish.text, capMm, 800) + 0.6;
		const h = capMm + 0.8;
		let best: { box: Box; cost: number; leader: boolean } | null = null;
		const tryAll = (offsets: PaperPoint[], leader: boolean) => {
			offsets.forEach(([dx, dy], rank) => {
				const [cx, cy] = [wish.at[0] + dx, wish.at[1] + dy];
				const box: Box = [cx - w / 2, cy - h / 2, cx + w / 2, cy + h / 2];
				const inside = box[0] > edge[0] && box[1] > edge[1] && box[2] < edge[2] && box[3] < edge[3];
				if (!inside || taken.hits(box)) return;
				const cost = circles.near(box).filter((i) => circleCuts(wishes[i], box)).length * 12 + rank * 0.5;
				if (!best || cost < best.cost) best = { box, cost, leader };
			});
		};
		tryAll(besideOffsets(w, h, wish.radiusMm), false);
		if (!best && leaders) tryAll(leaderOffsets(w, h), true);
		const found = best as { box: Box; leader: boolean } | null;
		if (!found && wish.optional) continue;
		if (!found) return null;
		taken.add(found.box);
		placed.push({
			text: wish.text,
			capMm,
			optional: wish.optional === true,
			at: [(found.box[0] + found.box[2]) / 2, (found.box[1] + found.box[3] + capMm) / 2],
			leaderTo: found.leader ? wish.at : null
		});
	}
	return placed;
}

/** Middles of the label box about the cross: above, below, beside, then beyond the circle. */
function besideOffsets(w: number, h: number, radiusMm: number): PaperPoint[] {
	const dx = CROSS_MM + w / 2 + 0.1;
	const dy = CROSS_MM + h / 2 + 0.1;
	const out = radiusMm + h / 2 + 0.2;
	const outX = radiusMm + w / 2 + 0.2;
	return [
		[0, -dy],
		[0, dy],
		[dx, -dy],
		[-dx, -dy],
		[dx, dy],
		[-dx, dy],
		[dx, 0],
		[-dx, 0],
		[0, -out],
		[0, out],
		[outX, 0],
		[-outX, 0]
	];
}

function leaderOffsets(w: number, h: number): PaperPoint[] {
	const offsets: PaperPoint[] = [];
	for (let ring = 1; ring <= 40; ring += 1) {
		const reach = CROSS_MM + ring * h;
		for (let k = 0; k < 16; k += 1) {
			const a = (k * Math.PI) / 8;
			offsets.push([Math.sin(a) * (reach + w / 2), -Math.cos(a) * (reach + h / 2)]);
		}
	}
	return offsets;
}

/** Whether a circle's line runs through a box. */
function circleCuts(wish: TagWish, box: Box): boolean {
	const [x, y] = wish.at;
	const nearX = Math.max(box[0] - x, 0, x - box[2]);
	const nearY = Math.max(box[1] - y, 0, y - box[3]);
	const farX = Math.max(Math.abs(box[0] - x), Math.abs(box[2] - x));
	const farY = Math.max(Math.abs(box[1] - y), Math.abs(box[3] - y));
	return Math.hypot(nearX, nearY) < wish.radiusMm && Math.hypot(farX, farY) > wish.radiusMm;
}

/** Boxes in a grid of 10 mm cells, so that a thousand tags do not compare with each other. */
class BoxGrid {
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

	near(box: Box): number[] {
		const ids = new Set<number>();
		for (const key of this.keys(box)) {
			for (const other of this.cells.get(key) ?? []) if (overlap(box, other.box)) ids.add(other.id);
		}
		return [...ids];
	}

	private keys(box: Box): string[] {
		const keys: string[] = [];
		for (let i = Math.floor(box[0] / 10); i <= Math.floor(box[2] / 10); i += 1) {
			for (let j = Math.floor(box[1] / 10); j <= Math.floor(box[3] / 10); j += 1) keys.push(`${i},${j}`);
		}
		return keys;
	}
}

function overlap(a: Box, b: Box): boolean {
	return a[0] < b[2] && b[0] < a[2] && a[1] < b[3] && b[1] < a[3];
}
