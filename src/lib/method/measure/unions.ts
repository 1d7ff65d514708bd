/** Lit pieces and unions of the core against a general polygon library, on random sets of convex shadows. */
import { difference } from 'polyclip-ts';
import { CornerUnion } from '../../core/shade/corner-union';
import { LitPieces } from '../../core/shade/pieces';
import { ShadowUnion } from '../../core/shade/shadow-union';
import { distances, type Check, type Extent, type Row } from '../check';
import { randomSource } from './random';

type Polygon = [number, number][];
const SEED = 1604;

/** A table, half width and half height, and the convex shadows that fall on it, counter-clockwise; metres. */
interface ShadowSet {
	kind: string;
	w: number;
	h: number;
	shadows: Polygon[];
}

const box = (x0: number, x1: number, y0: number, y1: number): Polygon => [
	[x0, y0],
	[x1, y0],
	[x1, y1],
	[x0, y1]
];

function turnedBox(
	random: () => number,
	cx: number,
	cy: number,
	a: number,
	b: number,
	turn: number
): Polygon {
	const skew = 0.4 * (random() - 0.5);
	return box(-a, a, -b, b).map(([x, y]) => [
		cx + (x + skew * y) * Math.cos(turn) - y * Math.sin(turn),
		cy + (x + skew * y) * Math.sin(turn) + y * Math.cos(turn)
	]);
}

/** Corners on an ellipse, in the order of their angles. */
function roundish(random: () => number, w: number, h: number): Polygon {
	const corners = 3 + Math.floor(5 * random());
	const [cx, cy] = [2.4 * w * (random() - 0.5), 2.4 * h * (random() - 0.5)];
	const [a, b] = [w * (0.1 + random()), h * (0.1 + random())];
	const angles = Array.from({ length: corners }, () => 2 * Math.PI * random()).sort((p, q) => p - q);
	return angles.map((t) => [cx + a * Math.cos(t), cy + b * Math.sin(t)]);
}

const scaled = (polygon: Polygon, by: number): Polygon => {
	const cx = polygon.reduce((sum, [x]) => sum + x, 0) / polygon.length;
	const cy = polygon.reduce((sum, [, y]) => sum + y, 0) / polygon.length;
	return polygon.map(([x, y]) => [cx + (x - cx) * by, cy + (y - cy) * by]);
};

const KINDS = ['unlike', 'coincident edges', 'nested', 'slivers', 'touching', 'grid', 'all at once'] as const;

function shadowsOf(kind: string, random: () => number, w: number, h: number): Polygon[] {
	const any = () =>
		random() < 0.5
			? roundish(random, w, h)
			: turnedBox(
					random,
					2 * w * (random() - 0.5),
					2 * h * (random() - 0.5),
					w * (0.2 + random()),
					h * (0.2 + random()),
					Math.PI * (random() - 0.5)
				);
	const first = any();
	/** Lines that many rectangles share, the table's own sides among them. */
	const line = (half: number) => half * (-1 + 0.5 * Math.floor(5 * random()));
	const onGrid = (): Polygon => {
		const [x0, y0] = [line(w), line(h)];
		return box(x0, x0 + w * (0.5 + Math.floor(2 * random())), y0, y0 + h * (0.5 + Math.floor(2 * random())));
	};
	switch (kind) {
		case 'coincident edges': {
			// Shares one side with the first, then the same one twice over.
			const [[ax, ay], [bx, by]] = first;
			const push = 0.3 + random();
			const [nx, ny] = [(by - ay) * push, (ax - bx) * push];
			return [
				first,
				[
					[bx, by],
					[ax, ay],
					[ax + nx, ay + ny],
					[bx + nx, by + ny]
				],
				first
			];
		}
		case 'nested':
			return [scaled(first, 0.5), first, scaled(first, 0.25), scaled(first, 1 - 1e-9)];
		case 'slivers': {
			const thin = 10 ** (-2 - 8 * random());
			return [
				first,
				turnedBox(random, 0, 0, 1.5 * w, thin, Math.PI * random()),
				box(-w, w, -h, -h + thin),
				first.map(([x, y]) => [x + thin, y])
			];
		}
		case 'touching': {
			const x = line(w) + 0.1;
			return [box(x, x + 0.7, -h, h / 3), box(x + 0.7, x + 1.1, -h / 2, h), box(x, x + 0.7, h / 3, 2 * h)];
		}
		case 'grid':
			return [onGrid(), onGrid(), onGrid(), onGrid()];
		case 'all at once':
			return [any(), onGrid(), scaled(first, 0.7), first, any()];
		default:
			return [first, any(), any()];
	}
}

function* shadowSets(count: number): Generator<ShadowSet> {
	const random = randomSource(SEED);
	for (let k = 0; k < count; k++) {
		const kind = KINDS[k % KINDS.length];
		const w = 1 + 4 * random();
		const h = 1 + 3 * random();
		yield { kind, w, h, shadows: shadowsOf(kind, random, w, h) };
	}
}

function ringArea(ring: Polygon): number {
	let twice = 0;
	const [x0, y0] = ring[0];
	for (let k = 1; k + 1 < ring.length; k++) {
		twice += (ring[k][0] - x0) * (ring[k + 1][1] - y0) - (ring[k + 1][0] - x0) * (ring[k][1] - y0);
	}
	return Math.abs(twice / 2);
}

function libraryArea({ w, h, shadows }: ShadowSet): number {
	const left = difference([box(-w, w, -h, h)], ...shadows.map((ring): Polygon[] => [ring]));
	let area = 0;
	for (const [outer, ...holes] of left as Polygon[][]) {
		area += ringArea(outer) - holes.reduce((sum, hole) => sum + ringArea(hole), 0);
	}
	return area;
}

const pieces = new LitPieces();
function coreArea({ w, h, shadows }: ShadowSet): number {
	pieces.clear();
	pieces.addRect(-w, w, -h, h);
	for (const shadow of shadows) {
		pieces.subtract(Float64Array.from(shadow.flat()), shadow.length, 0);
	}
	return pieces.litArea();
}

const union = new ShadowUnion();
/** Left, right, bottom, top of a polygon whose sides lie along the glass; null of any other. */
function sidesOf(ring: Polygon): [number, number, number, number] | null {
	if (ring.length !== 4) return null;
	const along = ring.every(([x, y], k) => x === ring[(k + 1) % 4][0] || y === ring[(k + 1) % 4][1]);
	if (!along) return null;
	const [xs, ys] = [ring.map(([x]) => x), ring.map(([, y]) => y)];
	return [Math.min(...xs), Math.max(...xs), Math.min(...ys), Math.max(...ys)];
}

/** What the union of the shadows leaves; rectangles along the glass go in as such in every second set. */
function unionArea({ w, h, shadows }: ShadowSet, k: number): number {
	union.begin(w, h);
	const others: Polygon[] = [];
	for (const ring of shadows) {
		const sides = k % 2 === 0 ? sidesOf(ring) : null;
		if (!sides) {
			others.push(ring);
			continue;
		}
		union.next.set(sides);
		union.addRect();
	}
	union.endRects();
	for (const ring of others) {
		union.next.set(ring.flat());
		union.add(ring.length);
	}
	return 4 * w * h - union.area();
}

const setsOf = (extent: Extent) => (extent === 'whole' ? 10_000 : 210);
/** The library takes nearly all of the time: each set is asked once for both checks. */
const known = new Map<Extent, Float64Array>();
function libraryAreas(extent: Extent): Float64Array {
	const before = known.get(extent);
	if (before) return before;
	const areas = new Float64Array(setsOf(extent));
	let k = 0;
	for (const set of shadowSets(areas.length)) areas[k++] = libraryArea(set);
	known.set(extent, areas);
	return areas;
}

function* areaRows(extent: Extent, areaOf: (set: ShadowSet, k: number) => number): Generator<Row> {
	const areas = libraryAreas(extent);
	let k = 0;
	for (const set of shadowSets(areas.length)) {
		yield [`set ${k}, ${set.kind}`, areaOf(set, k), areas[k]];
		k++;
	}
}

const corners = new CornerUnion();
/** Shadows that are no smaller than the glass, with sides along it: some on common lines, some twice. */
function* cornerRows(extent: Extent): Generator<Row> {
	const random = randomSource(SEED + 1);
	for (let k = 0; k < (extent === 'whole' ? 2000 : 100); k++) {
		const [w, h] = [1 + 4 * random(), 1 + 3 * random()];
		const grown = k % 2 === 0 ? 0 : 0.3 * random();
		const [sw, sh] = [w + grown, h + grown];
		const away = (half: number) =>
			random() < 0.3 ? half * (-0.9 + 0.45 * Math.floor(5 * random())) : 2 * half * (random() - 0.5);
		const count = 1 + Math.floor(6 * random());
		const middles = Array.from({ length: count }, (): [number, number] => [away(w + sw), away(h + sh)]);
		if (random() < 0.2) middles[count - 1] = middles[0];
		corners.setSizes(w, h, sw, sh);
		middles.forEach(([x, y], at) => {
			corners.x[at] = x;
			corners.y[at] = y;
		});
		corners.measure(count);
		const shadows = middles.map(([x, y]) => box(x - sw, x + sw, y - sh, y + sh));
		yield [
			`set ${k}, ${count} alike`,
			4 * w * h - corners.found[0],
			libraryArea({ kind: 'alike', w, h, shadows })
		];
	}
}

const LIBRARY = {
	effect: 'shade',
	source: 'polyclip-ts 0.16.8',
	provenance: 'library',
	unit: 'm²',
	tolerance: { worst: 1e-9, mean: 1e-11 }
} as const;

export const unionChecks: Check[] = [
	{
		...LIBRARY,
		id: 'shade-unions',
		title:
			'Lit area left by random sets of convex shadows, cut away: coincident edges, slivers, nested, touching',
		against: `a general polygon library in many-digit arithmetic (seed ${SEED})`,
		measure: (extent) => distances(areaRows(extent, coreArea))
	},
	{
		...LIBRARY,
		id: 'shade-unions-summed',
		title: 'The same sets by what each shadow adds to the larger ones, as years and fields are summed',
		against: `the same library on the same sets (seed ${SEED})`,
		measure: (extent) => distances(areaRows(extent, unionArea))
	},
	{
		...LIBRARY,
		id: 'shade-unions-alike',
		title: 'Lit area left by shadows of alike tables, by staircases from the corners',
		against: `the same library on random sets of equal rectangles (seed ${SEED + 1})`,
		measure: (extent) => distances(cornerRows(extent))
	}
];
