import { RADIANS_PER_DEGREE } from '../conventions';
import type { BoundaryPart, PlanPoint, Plot, TrackerModel } from '../document';
import { reachRadiusM } from '../machine/reach';
import { obstacleShape } from '../shade/obstacle-outline';
import { boundaryEdges } from './polygon';

export interface FillInput {
	plot: Plot;
	model: TrackerModel;
	/** Along the rows (east-west before the turn), metres. */
	pitchEastWestM: number;
	/** Across the rows (north-south before the turn), metres. */
	pitchNorthSouthM: number;
	/** Shift of every second row, as a part of the pitch along the rows, 0..1. */
	stagger?: number;
	/** Clockwise turn of the grid about the middle of the plot, degrees. */
	turnDeg?: number;
	/** Overrides the plot's own set-back, metres. */
	setBackM?: number;
	/** Shift of the grid along and across its rows, metres; what is not given is chosen to hold the most trackers. */
	shiftEastM?: number;
	shiftNorthM?: number;
	/** Greatest number of points; the southernmost are left out. */
	limit?: number;
}

/** A stretch of a row, [from, to] along it. */
type Span = [number, number];
type Edge = [number, number, number, number];

const PHASES_ALONG = 24;
const PHASES_ACROSS = 16;
/** No fill gives more than this; a tiny pitch on a large plot must not fill the memory. */
const MOST_POINTS = 20000;

/** Where the level line at height y lies within `radius` of a segment: the segment's stadium is convex, so one span. */
function stadiumSpan([x0, y0, x1, y1]: Edge, radius: number, y: number): Span | null {
	let low = Infinity;
	let high = -Infinity;
	const disc = (cx: number, cy: number) => {
		const h2 = radius * radius - (y - cy) * (y - cy);
		if (h2 < 0) return;
		const h = Math.sqrt(h2);
		low = Math.min(low, cx - h);
		high = Math.max(high, cx + h);
	};
	disc(x0, y0);
	disc(x1, y1);
	const length = Math.hypot(x1 - x0, y1 - y0);
	if (length > 0) {
		// The straight sides of the stadium.
		const nx = (-(y1 - y0) / length) * radius;
		const ny = ((x1 - x0) / length) * radius;
		for (const side of [-1, 1]) {
			const ay = y0 + side * ny;
			const by = y1 + side * ny;
			if (ay === by || (y - ay) * (y - by) > 0) continue;
			const x = x0 + side * nx + ((x1 - x0) * (y - ay)) / (by - ay);
			low = Math.min(low, x);
			high = Math.max(high, x);
		}
	}
	return low < high ? [low, high] : null;
}

/** Spans of a level line inside a set of rings given by their edges (even-odd). */
function insideSpans(edges: readonly Edge[], y: number): Span[] {
	const crossings: number[] = [];
	for (const [x0, y0, x1, y1] of edges) {
		if (y0 > y !== y1 > y) crossings.push(x0 + ((x1 - x0) * (y - y0)) / (y1 - y0));
	}
	crossings.sort((a, b) => a - b);
	const spans: Span[] = [];
	for (let k = 0; k + 1 < crossings.length; k += 2) spans.push([crossings[k], crossings[k + 1]]);
	return spans;
}

function without(spans: readonly Span[], holes: Span[]): Span[] {
	holes.sort((a, b) => a[0] - b[0]);
	const kept: Span[] = [];
	for (const [from, to] of spans) {
		let at = from;
		for (const [low, high] of holes) {
			if (high <= at) continue;
			if (low >= to) break;
			if (low > at) kept.push([at, low]);
			at = Math.max(at, high);
		}
		if (at < to) kept.push([at, to]);
	}
	return kept;
}

/** The plot in the frame of the turned grid. */
class TurnedPlot {
	readonly edges: Edge[];
	readonly bounds: { west: number; east: number; south: number; north: number };
	private readonly barred: { edges: Edge[]; radius: number; solid: boolean }[] = [];
	private readonly sin: number;
	private readonly cos: number;
	private readonly middle: PlanPoint;

	constructor(
		plot: Plot,
		turnDeg: number,
		private readonly keepM: number,
		reachM: number
	) {
		this.sin = Math.sin(turnDeg * RADIANS_PER_DEGREE);
		this.cos = Math.cos(turnDeg * RADIANS_PER_DEGREE);
		this.middle = plotMiddle(plot.boundary);
		const turn = ([x0, y0, x1, y1]: Edge): Edge => [...this.toGrid([x0, y0]), ...this.toGrid([x1, y1])];
		this.edges = boundaryEdges(plot.boundary).map(turn);
		const xs = this.edges.map((e) => e[0]);
		const ys = this.edges.map((e) => e[1]);
		const least = (values: number[]) => values.reduce((a, b) => Math.min(a, b), Infinity);
		const most = (values: number[]) => values.reduce((a, b) => Math.max(a, b), -Infinity);
		this.bounds = { west: least(xs), east: most(xs), south: least(ys), north: most(ys) };
		for (const obstacle of plot.obstacles) {
			const shape = obstacleShape(obstacle);
			if (shape.kind === 'circle') {
				const [x, y] = shape.centre;
				const radius = reachM + shape.radiusM;
				this.barred.push({ edges: [turn([x, y, x, y])], radius, solid: false });
				continue;
			}
			for (const ring of shape.rings) {
				const edges = ring.map((c, k) => turn([...c, ...ring[(k + 1) % ring.length]]));
				this.barred.push({ edges, radius: reachM, solid: true });
			}
		}
	}

	toGrid([east, north]: PlanPoint): PlanPoint {
		const x = east - this.middle[0];
		const y = north - this.middle[1];
		// The grid turned clockwise: its own axes are (cos, -sin) and (sin, cos) on plan.
		return [x * this.cos - y * this.sin, x * this.sin + y * this.cos];
	}

	toPlan([x, y]: PlanPoint): PlanPoint {
		return [this.middle[0] + x * this.cos + y * this.sin, this.middle[1] - x * this.sin + y * this.cos];
	}

	/** Where a tracker may stand on the row at height y. */
	freeSpans(y: number): Span[] {
		const inside = insideSpans(this.edges, y);
		if (inside.length === 0) return inside;
		const holes: Span[] = [];
		const bar = (edge: Edge, radius: number) => {
			if (Math.min(edge[1], edge[3]) - radius > y || Math.max(edge[1], edge[3]) + radius < y) return;
			const span = stadiumSpan(edge, radius, y);
			if (span) holes.push(span);
		};
		for (const edge of this.edges) bar(edge, this.keepM);
		for (const { edges, radius, solid } of this.barred) {
			for (const edge of edges) bar(edge, radius);
			if (solid) holes.push(...insideSpans(edges, y));
		}
		return without(inside, holes);
	}
}

function plotMiddle(parts: readonly BoundaryPart[]): PlanPoint {
	let west = Infinity;
	let east = -Infinity;
	let south = Infinity;
	let north = -Infinity;
	for (const part of parts) {
		for (const [x, y] of part.outer) {
			west = Math.min(west, x);
			east = Math.max(east, x);
			south = Math.min(south, y);
			north = Math.max(north, y);
		}
	}
	return [(west + east) / 2, (south + north) / 2];
}

/** First and last index k with from <= phase + k pitch <= to; a hair of slack keeps exact fits. */
const firstIndex = (from: number, phase: number, pitch: number): number =>
	Math.ceil((from - phase) / pitch - 1e-9);
const lastIndex = (to: number, phase: number, pitch: number): number =>
	Math.floor((to - phase) / pitch + 1e-9);

/**
 * Places for trackers on a grid over the plot, so that every reach circle stays inside the boundary, off its holes
 * by the set-back, and clear of the obstacles. Rows come from north to south (before the turn), each from west to
 * east. The middle of the bounding box of the boundary is the point that the grid turns about. Without a given
 * shift the phase of the grid that holds the most is taken, the first of equals: same inputs, same points.
 * Empty when there is no boundary or a pitch is not above zero.
 */
export function fillPlot(input: FillInput): PlanPoint[] {
	const { plot, model } = input;
	const pitchX = input.pitchEastWestM;
	const pitchY = input.pitchNorthSouthM;
	if (plot.boundary.length === 0 || !(pitchX > 0) || !(pitchY > 0)) return [];
	const reach = reachRadiusM(model);
	const keep = reach + Math.max(0, input.setBackM ?? plot.setBackM);
	const turned = new TurnedPlot(plot, input.turnDeg ?? 0, keep, reach);
	const { south, north } = turned.bounds;
	if (((north - south) / pitchY) * ((turned.bounds.east - turned.bounds.west) / pitchX) > 4 * MOST_POINTS)
		return [];
	const staggerM = (input.stagger ?? 0) * pitchX;

	const across =
		input.shiftNorthM === undefined
			? Array.from({ length: PHASES_ACROSS }, (_, k) => (k * pitchY) / PHASES_ACROSS)
			: [input.shiftNorthM];
	const along =
		input.shiftEastM === undefined
			? Array.from({ length: PHASES_ALONG }, (_, k) => (k * pitchX) / PHASES_ALONG)
			: [input.shiftEastM];

	let best: { count: number; rows: { y: number; odd: boolean; spans: Span[] }[]; phase: number } | null =
		null;
	for (const phaseY of across) {
		const rows: { y: number; odd: boolean; spans: Span[] }[] = [];
		for (let k = lastIndex(north, phaseY, pitchY); k >= firstIndex(south, phaseY, pitchY); k--) {
			const y = phaseY + k * pitchY;
			const spans = turned.freeSpans(y);
			if (spans.length > 0) rows.push({ y, odd: k % 2 !== 0, spans });
		}
		for (const phase of along) {
			let count = 0;
			for (const row of rows) {
				const start = phase + (row.odd ? staggerM : 0);
				for (const [from, to] of row.spans) {
					count += Math.max(0, lastIndex(to, start, pitchX) - firstIndex(from, start, pitchX) + 1);
				}
			}
			if (best === null || count > best.count) best = { count, rows, phase };
		}
	}
	const points: PlanPoint[] = [];
	const most = Math.min(MOST_POINTS, input.limit ?? MOST_POINTS);
	for (const row of best?.rows ?? []) {
		const start = (best?.phase ?? 0) + (row.odd ? staggerM : 0);
		for (const [from, to] of row.spans) {
			for (let k = firstIndex(from, start, pitchX); k <= lastIndex(to, start, pitchX); k++) {
				if (points.length >= most) return points;
				points.push(turned.toPlan([start + k * pitchX, row.y]));
			}
		}
	}
	return points;
}
