import { sunVector, tableAxes, type Vec3 } from '../conventions';
import type { Field } from '../field';
import type { AnswerSun } from './answer-suns';
import { ALL, ShadowSet } from './shadow-set';

/** Ground rising near a tracker, among those who take light. */
export const BY_GROUND = -(2 ** 30);
/** Months, each with its mornings and afternoons. */
export const WHENS = 24;
const HOURS = 24;
/** Sums of shares that agree to this are of shadows that do not overlap. */
const APART = 1e-12;

/** Moves to be tried of each tracker: metres east, north and up, [tracker][move][axis]. */
export interface Moves {
	perTracker: number;
	vectors: Float64Array;
	/** 1 for the trackers that move; all when left out. */
	active?: Uint8Array;
}

/**
 * Who took how much light from trackers `from` to `to` (not itself), kWh/m² over the suns looked at. Pairs of one
 * tracker lie behind one another, by thrower: a table (0..), an obstacle (-1 - its place in the plot) or `BY_GROUND`.
 */
export interface LightLedger {
	from: number;
	to: number;
	/** Beam without shade, and lost to shade, by tracker. */
	without: Float64Array;
	lost: Float64Array;
	/** Lost, [tracker][month, morning or afternoon] and [tracker][hour]. */
	lostWhen: Float64Array;
	lostHour: Float64Array;
	/** Change of its own loss by each of its moves, [tracker][move]. */
	ownMove: Float64Array;
	/** First pair of each tracker, and one more. */
	pairStart: Int32Array;
	pairBy: Int32Array;
	/** Loss that the thrower alone would cause. */
	pairAlone: Float64Array;
	/** Row of what follows, or -1 for a pair in which another always hides the thrower: it takes nothing. */
	pairDetail: Int32Array;
	/** Loss with all minus the loss without; the same by `WHENS`; change of the loss by the thrower's moves. */
	detailRemoval: Float64Array;
	detailWhen: Float64Array;
	detailMove: Float64Array;
}

/** Numbers by row, growing by rows. */
class Rows {
	values: Float64Array;
	constructor(readonly width: number) {
		this.values = new Float64Array(64 * width);
	}
	hold(rows: number): void {
		if (rows * this.width <= this.values.length) return;
		const larger = new Float64Array(2 * this.values.length);
		larger.set(this.values);
		this.values = larger;
	}
}

const dot = (a: readonly number[], b: readonly number[]): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];

/**
 * Walks suns and books whose light is taken by whom, and how the losses change when each tracker makes each of its
 * moves while all others stay. `targets`, if given, are the only trackers of the range that are asked (the others keep
 * zeros). Null when `onProgress` (0..1) answered false.
 *
 * Exact areas; neglected for moves alone: a moved tracker keeps its near-ground horizon, and a thrower that crosses the
 * table's own plane is not clipped anew. Its clip edge stands off the glass, and slides onto it only where the sun
 * grazes the table (slide over clearance, tables standing still or held by their stops): at most 8e-7 of the field's
 * light for a step of 0.1 m in 400 random fields. Machines that collide are not treated.
 */
export function lightLedger(
	field: Field,
	suns: readonly AnswerSun[],
	range: { from: number; to: number },
	moves: Moves,
	targets?: readonly number[],
	onProgress?: (done01: number) => boolean
): LightLedger | null {
	const { engine } = field;
	const { from, to } = range;
	const n = to - from;
	const M = moves.perTracker;
	const asked = targets ?? Array.from({ length: n }, (_, k) => from + k);
	const without = new Float64Array(n);
	const lost = new Float64Array(n);
	const lostWhen = new Float64Array(n * WHENS);
	const lostHour = new Float64Array(n * HOURS);
	const ownMove = new Float64Array(n * M);
	const pairs = Array.from({ length: n }, () => new Map<number, number>());
	const removal = new Rows(1);
	const alone = new Rows(1);
	const when = new Rows(WHENS);
	const move = new Rows(M);
	let detail = new Int32Array(64);
	let rows = 0;
	let details = 0;
	const rowOf = (target: number, by: number): number => {
		const known = pairs[target].get(by);
		if (known !== undefined) return known;
		pairs[target].set(by, rows);
		alone.hold(rows + 1);
		if (rows === detail.length) {
			const larger = new Int32Array(2 * rows);
			larger.set(detail);
			detail = larger;
		}
		detail[rows] = -1;
		return rows++;
	};
	const detailOf = (row: number): number => {
		if (detail[row] >= 0) return detail[row];
		for (const kept of [removal, when, move]) kept.hold(details + 1);
		return (detail[row] = details++);
	};

	let reach = 0;
	for (let k = 0; k < moves.vectors.length; k += 3) {
		reach = Math.max(reach, Math.hypot(moves.vectors[k], moves.vectors[k + 1], moves.vectors[k + 2]));
	}
	const moved = (k: number): boolean => M > 0 && (moves.active === undefined || moves.active[k] === 1);
	const set = new ShadowSet();
	const axes = engine.poses.map((): { U: Vec3; V: Vec3; slide: number } => ({
		U: [0, 0, 0],
		V: [0, 0, 0],
		slide: 0
	}));
	let alones = new Float64Array(16);
	const every = Math.max(1, Math.floor(suns.length / 100));

	for (let t = 0; t < suns.length; t++) {
		if (onProgress && t % every === 0 && !onProgress(t / suns.length)) return null;
		const sun = suns[t];
		engine.setDay(sun.dayOfYear);
		engine.setSun(sun.azimuthDeg, sun.elevationDeg);
		const s = sunVector(sun.azimuthDeg, sun.elevationDeg);
		engine.poses.forEach((pose, g) => {
			const { u, v, n: normal } = tableAxes(pose.azimuthDeg, pose.tiltDeg);
			const cosine = dot(normal, s);
			// U = u - (u.s)/(n.s) n, V = v - (v.s)/(n.s) n: where on the plane a point lands along the sun.
			const us = dot(u, s) / cosine;
			const vs = dot(v, s) / cosine;
			const held = axes[g];
			for (let c = 0; c < 3; c++) {
				held.U[c] = u[c] - us * normal[c];
				held.V[c] = v[c] - vs * normal[c];
			}
			held.slide = reach * Math.max(Math.hypot(...held.U), Math.hypot(...held.V));
		});
		const whenAt = 2 * sun.month + (sun.morning ? 0 : 1);
		for (const i of asked) {
			const cosine = engine.cosine(i);
			if (cosine <= 0) continue;
			const at = i - from;
			const kwh = sun.kwh * cosine;
			without[at] += kwh;
			if (engine.horizons?.hides(i, sun.azimuthDeg, sun.elevationDeg)) {
				const row = rowOf(at, BY_GROUND);
				const place = detailOf(row);
				alone.values[row] += kwh;
				removal.values[place] += kwh;
				when.values[place * WHENS + whenAt] += kwh;
				lost[at] += kwh;
				lostWhen[at * WHENS + whenAt] += kwh;
				lostHour[at * HOURS + sun.hour] += kwh;
				continue;
			}
			if (engine.collect(i, reach) === 0) continue;
			const { U, V, slide } = axes[engine.groupOf[i]];
			set.take(engine, i, slide);
			const throwers = set.by.length;
			if (throwers === 0) continue;
			const share = set.share();
			if (share > 0) {
				lost[at] += kwh * share;
				lostWhen[at * WHENS + whenAt] += kwh * share;
				lostHour[at * HOURS + sun.hour] += kwh * share;
				if (alones.length < throwers) alones = new Float64Array(2 * throwers);
				let sum = 0;
				for (let g = 0; g < throwers; g++) {
					alones[g] = throwers === 1 ? share : set.staysOff(g, 0) ? 0 : set.shareAlone(g);
					sum += alones[g];
				}
				const apart = sum - share <= APART;
				for (let g = 0; g < throwers; g++) {
					if (!(alones[g] > 0)) continue;
					const row = rowOf(at, set.by[g]);
					alone.values[row] += kwh * alones[g];
					if (set.isDeep(g)) continue;
					const taken = apart ? alones[g] : Math.min(alones[g], Math.max(0, share - set.shareWithout(g)));
					if (taken === 0) continue;
					const place = detailOf(row);
					removal.values[place] += kwh * taken;
					when.values[place * WHENS + whenAt] += kwh * taken;
				}
			}
			if (moved(i)) {
				for (let m = 0; m < M; m++) {
					const o = 3 * (i * M + m);
					const d = moves.vectors.subarray(o, o + 3);
					// Seen from the table that moves, all others move the other way.
					const change = set.shareMoved(ALL, -dot3(U, d), -dot3(V, d)) - share;
					ownMove[at * M + m] += kwh * change;
				}
			}
			for (let g = 0; g < throwers; g++) {
				const k = set.by[g];
				if (k < 0 || !moved(k) || set.isDeep(g) || set.staysOff(g, slide)) continue;
				for (let m = 0; m < M; m++) {
					const o = 3 * (k * M + m);
					const d = moves.vectors.subarray(o, o + 3);
					const change = set.shareMoved(g, dot3(U, d), dot3(V, d)) - share;
					if (change === 0) continue;
					// The row first: making one may put the values elsewhere.
					const place = detailOf(rowOf(at, k));
					move.values[place * M + m] += kwh * change;
				}
			}
		}
	}
	return { from, to, without, lost, lostWhen, lostHour, ownMove, ...packed() };

	function packed() {
		const pairStart = new Int32Array(n + 1);
		const pairBy = new Int32Array(rows);
		const pairAlone = new Float64Array(rows);
		const pairDetail = new Int32Array(rows);
		const detailRemoval = new Float64Array(details);
		const detailWhen = new Float64Array(details * WHENS);
		const detailMove = new Float64Array(details * M);
		let p = 0;
		let q = 0;
		pairs.forEach((found, target) => {
			for (const [by, row] of [...found].sort((a, b) => a[0] - b[0])) {
				const known = detail[row];
				pairBy[p] = by;
				pairAlone[p] = alone.values[row];
				pairDetail[p] = known < 0 ? -1 : q;
				p++;
				if (known < 0) continue;
				detailRemoval[q] = removal.values[known];
				detailWhen.set(when.values.subarray(known * WHENS, (known + 1) * WHENS), q * WHENS);
				detailMove.set(move.values.subarray(known * M, (known + 1) * M), q * M);
				q++;
			}
			pairStart[target + 1] = p;
		});
		return { pairStart, pairBy, pairAlone, pairDetail, detailRemoval, detailWhen, detailMove };
	}
}

function dot3(a: readonly number[], d: Float64Array): number {
	return a[0] * d[0] + a[1] * d[1] + a[2] * d[2];
}

/** Loss with all minus the loss without, of a pair; kWh/m². */
export function removalOf(ledger: LightLedger, pair: number): number {
	const detail = ledger.pairDetail[pair];
	return detail < 0 ? 0 : ledger.detailRemoval[detail];
}

type Sums = 'without' | 'lost' | 'lostWhen' | 'lostHour' | 'ownMove' | 'pairAlone';
type Details = 'detailRemoval' | 'detailWhen' | 'detailMove';

/** Joins ledgers of neighbouring ranges, in their order. */
export function joinLedgers(parts: readonly LightLedger[]): LightLedger {
	if (parts.length === 1) return parts[0];
	const join = (key: Sums | Details): Float64Array => {
		const all = new Float64Array(parts.reduce((sum, part) => sum + part[key].length, 0));
		let at = 0;
		for (const part of parts) {
			all.set(part[key], at);
			at += part[key].length;
		}
		return all;
	};
	const count = parts.reduce((sum, part) => sum + part.pairBy.length, 0);
	const pairBy = new Int32Array(count);
	const pairDetail = new Int32Array(count);
	const pairStart = new Int32Array(parts.reduce((sum, part) => sum + part.without.length, 0) + 1);
	let target = 0;
	let pair = 0;
	let detail = 0;
	for (const part of parts) {
		for (let k = 1; k < part.pairStart.length; k++) pairStart[++target] = pair + part.pairStart[k];
		pairBy.set(part.pairBy, pair);
		for (let p = 0; p < part.pairDetail.length; p++) {
			const own = part.pairDetail[p];
			pairDetail[pair + p] = own < 0 ? -1 : detail + own;
		}
		pair += part.pairBy.length;
		detail += part.detailRemoval.length;
	}
	return {
		from: parts[0].from,
		to: parts[parts.length - 1].to,
		without: join('without'),
		lost: join('lost'),
		lostWhen: join('lostWhen'),
		lostHour: join('lostHour'),
		ownMove: join('ownMove'),
		pairStart,
		pairBy,
		pairAlone: join('pairAlone'),
		pairDetail,
		detailRemoval: join('detailRemoval'),
		detailWhen: join('detailWhen'),
		detailMove: join('detailMove')
	};
}
