/** Lit pieces of the core against a general polygon library, on random sets of convex shadows. */
import { difference } from 'polyclip-ts';
import { LitPieces } from '../../core/shade/pieces';
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

function* areaRows(extent: Extent): Generator<Row> {
	let k = 0;
	for (const set of shadowSets(extent === 'whole' ? 10_000 : 210)) {
		yield [`set ${k++}, ${set.kind}`, coreArea(set), libraryArea(set)];
	}
}

export const unionChecks: Check[] = [
	{
		id: 'shade-unions',
		effect: 'shade',
		title: 'Lit area left by random sets of convex shadows: coincident edges, slivers, nested, touching',
		against: `a general polygon library in many-digit arithmetic (seed ${SEED})`,
		source: 'polyclip-ts 0.16.8',
		provenance: 'library',
		unit: 'm²',
		tolerance: { worst: 1e-9, mean: 1e-11 },
		measure: (extent) => distances(areaRows(extent))
	}
];
