import type { PaperPoint, PaperRect } from './drawing';
import { lineWidthMm } from './font-book';
import { BoxGrid, cutsCircle, cutsRing, cutsSegment, type Box, type Segment } from './paper-boxes';
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
	/** Line from the tag to its cross, when the tag is not where tags are looked for: over or in its own circle. */
	leader: [from: PaperPoint, to: PaperPoint] | null;
}

/** What else lies on the map: lines that tags rather keep off, and blocks that they keep off while they can. */
export interface TagHindrances {
	lines: Segment[];
	/** Closed rings. */
	blocks: PaperPoint[][];
}

interface Place {
	box: Box;
	leader: PlacedTag['leader'];
}

/** Half the size of a centre cross with its clear space. */
const CROSS_MM = 1.5;
const CAPS_MM = [2.8, 2.5, 2.2, 2, MIN_CAP_MM];
/** Share of the tags that must find room over or in their own circle for a size to be the sheet's size. */
const AT_HOME = 0.85;

/**
 * Places every tag so that no two touch, none covers a cross and none leaves the window. A tag stands over its own
 * circle or inside it; where a neighbour is in the way it gets smaller, and only then stands elsewhere, tied to its
 * cross by a leader line.
 * @param far lets leaders reach further than the next free spot about the circle
 * @returns the tags, or null when some tag finds no place
 */
export function placeTags(
	wishes: TagWish[],
	window: PaperRect,
	far: boolean,
	hindrances: TagHindrances = { lines: [], blocks: [] }
): PlacedTag[] | null {
	for (const capMm of CAPS_MM) {
		const smallest = capMm === MIN_CAP_MM;
		const placer = new Placer(wishes, window, hindrances);
		const wanted = wishes.filter((wish) => !wish.optional);
		const left = wanted.filter((wish) => !placer.put(wish, capMm, 'home'));
		if (!smallest && left.length > wanted.length * (1 - AT_HOME)) continue;
		const smaller = CAPS_MM.filter((each) => each <= capMm);
		const homeless = left.filter((wish) => !smaller.some((size) => placer.put(wish, size, 'home')));
		const lost = homeless.filter(
			(wish) =>
				!smaller.some((size) => placer.put(wish, size, 'beside')) &&
				!(smallest && far && placer.put(wish, capMm, 'far'))
		);
		if (lost.length > 0) continue;
		for (const wish of wishes) if (wish.optional) placer.put(wish, Math.min(capMm, 2.2), 'code');
		return placer.placed;
	}
	return null;
}

class Placer {
	readonly placed: PlacedTag[] = [];
	private readonly taken = new BoxGrid();
	private readonly circles = new BoxGrid();
	private readonly lines = new BoxGrid();
	private readonly edge: Box;

	constructor(
		private readonly wishes: TagWish[],
		window: PaperRect,
		private readonly hindrances: TagHindrances
	) {
		wishes.forEach(({ at: [x, y], radiusMm: r, optional }, i) => {
			if (!optional) this.taken.add([x - CROSS_MM, y - CROSS_MM, x + CROSS_MM, y + CROSS_MM], i);
			this.circles.add([x - r, y - r, x + r, y + r], i);
		});
		hindrances.lines.forEach(([[x0, y0], [x1, y1]], i) =>
			this.lines.add([Math.min(x0, x1), Math.min(y0, y1), Math.max(x0, x1), Math.max(y0, y1)], i)
		);
		this.edge = [window.xMm, window.yMm, window.xMm + window.widthMm, window.yMm + window.heightMm];
	}

	/** Places a tag in the best free spot of a kind; false when there is none. */
	put(wish: TagWish, capMm: number, kind: 'home' | 'beside' | 'far' | 'code'): boolean {
		const w = lineWidthMm(wish.text, capMm, 800) + 0.6;
		const h = capMm + 0.8;
		const offsets = { home: homeOffsets, beside: besideOffsets, far: farOffsets, code: codeOffsets }[kind];
		let best: (Place & { cost: number }) | null = null;
		for (const [rank, [dx, dy]] of offsets(w, h, wish.radiusMm).entries()) {
			const [cx, cy] = [wish.at[0] + dx, wish.at[1] + dy];
			const box: Box = [cx - w / 2, cy - h / 2, cx + w / 2, cy + h / 2];
			const place = this.judge(wish, box, kind);
			if (place && (!best || place.cost + rank * 0.5 < best.cost))
				best = { ...place, cost: place.cost + rank * 0.5 };
		}
		if (!best) return false;
		const { box, leader } = best;
		this.taken.add(box);
		this.placed.push({
			text: wish.text,
			capMm,
			optional: wish.optional === true,
			at: [(box[0] + box[2]) / 2, (box[1] + box[3] + capMm) / 2],
			leader
		});
		return true;
	}

	/** What a spot costs; null where a tag cannot stand. */
	private judge(wish: TagWish, box: Box, kind: string): (Place & { cost: number }) | null {
		const { edge } = this;
		const inside = box[0] > edge[0] && box[1] > edge[1] && box[2] < edge[2] && box[3] < edge[3];
		if (!inside || this.taken.hits(box)) return null;
		if (this.placed.some(({ leader }) => leader && cutsSegment(leader, box))) return null;
		const cut = this.circles.near(box).filter((i) => cutsCircle(this.wishes[i], box)).length;
		const blocked = this.hindrances.blocks.filter((block) => cutsRing(block, box)).length;
		const struck = this.lines.near(box).filter((i) => cutsSegment(this.hindrances.lines[i], box)).length;
		if (kind === 'home' && (cut > 0 || blocked > 0)) return null;
		const cost = cut * 12 + blocked * (kind === 'code' ? 0 : 16) + Math.min(struck, 2) * 3;
		if (kind === 'home' || kind === 'code') return { box, leader: null, cost };
		const leader = this.leaderFrom(wish, box);
		return leader ? { box, leader, cost } : null;
	}

	/** The straight line from a tag's edge to the arm of its cross; null when it would run through another tag or cross. */
	private leaderFrom(wish: TagWish, box: Box): PlacedTag['leader'] {
		const [x, y] = wish.at;
		const from: PaperPoint = [Math.min(Math.max(x, box[0]), box[2]), Math.min(Math.max(y, box[1]), box[3])];
		const length = Math.hypot(from[0] - x, from[1] - y);
		const short = Math.min(0.4, length / 2) / length;
		const to: PaperPoint = [x + (from[0] - x) * short, y + (from[1] - y) * short];
		const own = this.wishes.indexOf(wish);
		const line: Segment = [from, to];
		const round: Box = [
			Math.min(from[0], to[0]),
			Math.min(from[1], to[1]),
			Math.max(from[0], to[0]),
			Math.max(from[1], to[1])
		];
		const struck = this.taken.around(round).some((other) => other.id !== own && cutsSegment(line, other.box));
		return struck ? null : line;
	}
}

/** Middles of the label box over the circle, then inside it over and under the cross where it fits. */
function homeOffsets(w: number, h: number, radiusMm: number): PaperPoint[] {
	const over: PaperPoint = [0, -(radiusMm + h / 2 + 0.2)];
	const dy = CROSS_MM + h / 2 + 0.1;
	const fits = Math.hypot(w / 2, dy + h / 2) < radiusMm;
	return fits ? [[0, -dy], [0, dy], over] : [over];
}

/** About the circle, touching it: under, at the sides, at the corners. */
function besideOffsets(w: number, h: number, radiusMm: number): PaperPoint[] {
	const out = Math.max(radiusMm, CROSS_MM) + 0.2;
	const slant = out * Math.SQRT1_2;
	return [
		[0, out + h / 2],
		[out + w / 2, 0],
		[-out - w / 2, 0],
		[slant + w / 2, -slant - h / 2],
		[-slant - w / 2, -slant - h / 2],
		[slant + w / 2, slant + h / 2],
		[-slant - w / 2, slant + h / 2],
		[0, -out - h * 1.6],
		[out + w / 2, -out - h],
		[-out - w / 2, -out - h]
	];
}

function farOffsets(w: number, h: number): PaperPoint[] {
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

/** The code of an obstacle: on it, clear of the trunk's dot, or next to it. */
function codeOffsets(w: number, h: number): PaperPoint[] {
	return [
		[0, -(h / 2 + 0.6)],
		[0, h / 2 + 0.6],
		[w / 2 + 1, 0],
		[-w / 2 - 1, 0]
	];
}
