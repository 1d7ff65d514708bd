import type { ShadeEngine } from '../shade/engine';
import { LitPieces } from '../shade/pieces';
import { RectUnion } from '../shade/rect-union';

/** Corners whose sides lean less than this are rectangles, metres. */
const STRAIGHT_M = 1e-9;
/** Everything moves, for `shareMoved`. */
export const ALL = -1;
/** No thrower. */
const NONE = -2;

type Box = [west: number, east: number, low: number, high: number];

const cutOff = (value: number, half: number): number => Math.max(-half, Math.min(half, value));

/**
 * The shadows on one table under one sun, kept by who throws them, so that one of them can be left out, taken alone or
 * moved. When its thrower moves, a shadow slides over the table's plane along the sun and keeps its form, so nothing
 * else need be computed again: exact as long as no clip edge of a thrower that crosses the table's plane slides onto the
 * glass. Lengths in metres, shares 0..1.
 */
export class ShadowSet {
	/** Throwers: a table (0..), or an obstacle (-1 - source). */
	readonly by: number[] = [];
	private coords = new Float64Array(256);
	/** Where each shadow's corners begin, and one more. */
	private starts: number[] = [0];
	private passes: number[] = [];
	/** First shadow of each thrower, and one more. */
	private first: number[] = [0];
	/** West, east, low, high of each shadow. */
	private boxes = new Float64Array(64);
	private count = 0;
	/** 1 for throwers hidden behind two others. */
	private deep = new Uint8Array(16);
	private straight = true;
	private moved = new Float64Array(64);
	private readonly rects = new RectUnion();
	private readonly pieces = new LitPieces();
	private halfWidth = 0;
	private halfHeight = 0;
	private halfGap = 0;
	private area = 0;

	/** Takes what the engine's last `collect` found for table i; shadows farther than `reachM` from the glass are left. */
	take(engine: ShadeEngine, i: number, reachM: number): void {
		const group = engine.groups[engine.groupOf[i]];
		this.halfWidth = group.halfWidth;
		this.halfHeight = group.halfHeight;
		this.halfGap = group.halfGap;
		this.area = 4 * (group.halfWidth - group.halfGap) * group.halfHeight;
		this.by.length = 0;
		this.first.length = 0;
		this.starts.length = 1;
		this.passes.length = 0;
		this.count = 0;
		this.straight = true;
		const later: { shadow: Float64Array; corners: number; passes: number; by: number; box: Box }[] = [];
		const west = -group.halfWidth - reachM;
		const low = -group.halfHeight - reachM;
		engine.shadowsAhead(i, 0, (shadow, corners, passes, by) => {
			let x0 = Infinity;
			let x1 = -Infinity;
			let y0 = Infinity;
			let y1 = -Infinity;
			for (let k = 0; k < corners; k++) {
				x0 = Math.min(x0, shadow[2 * k]);
				x1 = Math.max(x1, shadow[2 * k]);
				y0 = Math.min(y0, shadow[2 * k + 1]);
				y1 = Math.max(y1, shadow[2 * k + 1]);
			}
			if (x0 >= -west || x1 <= west || y0 >= -low || y1 <= low) return;
			const box: Box = [x0, x1, y0, y1];
			if (by >= 0) this.add(shadow, corners, passes, by, box);
			else later.push({ shadow: shadow.slice(0, 2 * corners), corners, passes, by, box });
		});
		// The engine sorts bodies by the light they let through, which tears the parts of one obstacle asunder.
		later.sort((a, b) => b.by - a.by);
		for (const { shadow, corners, passes, by, box } of later) this.add(shadow, corners, passes, by, box);
		this.first.push(this.count);
		if (this.deep.length < this.by.length) this.deep = new Uint8Array(2 * this.by.length);
		this.findDeep(reachM);
	}

	private add(shadow: Float64Array, corners: number, passes: number, by: number, box: Box): void {
		if (this.by.length === 0 || this.by[this.by.length - 1] !== by) {
			this.by.push(by);
			this.first.push(this.count);
		}
		const at = this.starts[this.count];
		if (at + 2 * corners > this.coords.length) {
			const larger = new Float64Array(2 * this.coords.length + 2 * corners);
			larger.set(this.coords);
			this.coords = larger;
		}
		for (let k = 0; k < 2 * corners; k++) this.coords[at + k] = shadow[k];
		if (4 * this.count + 4 > this.boxes.length) {
			const larger = new Float64Array(2 * this.boxes.length);
			larger.set(this.boxes);
			this.boxes = larger;
		}
		this.boxes.set(box, 4 * this.count);
		this.starts.push(at + 2 * corners);
		this.passes.push(passes);
		this.count++;
		if (!this.straight) return;
		if (passes > 0 || corners !== 4) {
			this.straight = false;
			return;
		}
		for (let k = 0; k < 4; k++) {
			const o = 2 * k;
			const q = k === 3 ? 0 : o + 2;
			const leans = Math.min(Math.abs(shadow[q] - shadow[o]), Math.abs(shadow[q + 1] - shadow[o + 1]));
			if (leans > STRAIGHT_M) this.straight = false;
		}
	}

	/** Shaded share with everything as it stands. */
	share(): number {
		return this.covered(NONE, NONE, 0, 0);
	}

	/** Shaded share that thrower g alone would cause. */
	shareAlone(g: number): number {
		return this.covered(NONE, NONE, 0, 0, g);
	}

	/** Shaded share without thrower g. */
	shareWithout(g: number): number {
		return this.covered(g, NONE, 0, 0);
	}

	/** Shaded share with the shadows of thrower g, or of `ALL`, slid by (x, y) over the table's plane. */
	shareMoved(g: number, x: number, y: number): number {
		return this.covered(NONE, g, x, y);
	}

	/**
	 * Finds the throwers that change nothing by going or by sliding at most `reachM`, because the shadows of two others
	 * cover all that theirs could. They are left out of every union but their own.
	 */
	private findDeep(reachM: number): void {
		const { by, deep } = this;
		for (let g = 0; g < by.length; g++) deep[g] = 0;
		if (!this.straight || this.halfGap > 0 || by.length < 3) return;
		for (let g = by.length - 1; g >= 0; g--) deep[g] = this.coverers(g, reachM) >= 2 ? 1 : 0;
	}

	private coverers(g: number, reachM: number): number {
		const { boxes, first, deep, halfWidth: w, halfHeight: h } = this;
		if (first[g + 1] - first[g] !== 1) return 0;
		const o = 4 * first[g];
		const x0 = cutOff(boxes[o] - reachM, w);
		const x1 = cutOff(boxes[o + 1] + reachM, w);
		const y0 = cutOff(boxes[o + 2] - reachM, h);
		const y1 = cutOff(boxes[o + 3] + reachM, h);
		let found = 0;
		for (let k = 0; k < this.by.length && found < 2; k++) {
			if (k === g || deep[k] === 1 || first[k + 1] - first[k] !== 1) continue;
			const q = 4 * first[k];
			if (boxes[q] <= x0 && boxes[q + 1] >= x1 && boxes[q + 2] <= y0 && boxes[q + 3] >= y1) found++;
		}
		return found;
	}

	/** Whether two others cover all that g's shadow covers or could cover: without it, nothing changes. */
	isDeep(g: number): boolean {
		return this.deep[g] === 1;
	}

	/** Whether g's shadow stays off the glass when it slides by at most `reachM`. */
	staysOff(g: number, reachM: number): boolean {
		const { boxes, halfWidth: w, halfHeight: h } = this;
		for (let p = this.first[g]; p < this.first[g + 1]; p++) {
			const o = 4 * p;
			if (
				boxes[o] - reachM < w &&
				boxes[o + 1] + reachM > -w &&
				boxes[o + 2] - reachM < h &&
				boxes[o + 3] + reachM > -h
			)
				return false;
		}
		return true;
	}

	private covered(omit: number, moved: number, x: number, y: number, only = NONE): number {
		if (!(this.area > 0)) return 0;
		const { halfWidth: w, halfGap: gap } = this;
		const left = gap > 0 ? -gap : w;
		let area = this.straight
			? this.coveredRects(-w, left, omit, moved, x, y, only)
			: this.coveredPieces(omit, moved, x, y, only);
		if (this.straight && gap > 0) area += this.coveredRects(gap, w, omit, moved, x, y, only);
		return Math.min(1, Math.max(0, area / this.area));
	}

	private coveredRects(
		x0: number,
		x1: number,
		omit: number,
		moved: number,
		x: number,
		y: number,
		only: number
	): number {
		const { rects, boxes, first, deep, halfHeight: h } = this;
		rects.clear();
		const begin = only === NONE ? 0 : only;
		const end = only === NONE ? this.by.length : only + 1;
		for (let g = begin; g < end; g++) {
			if (g === omit || (only === NONE && deep[g] === 1)) continue;
			const dx = moved === ALL || moved === g ? x : 0;
			const dy = moved === ALL || moved === g ? y : 0;
			for (let p = first[g]; p < first[g + 1]; p++) {
				const o = 4 * p;
				rects.add(
					Math.max(x0, boxes[o] + dx),
					Math.min(x1, boxes[o + 1] + dx),
					Math.max(-h, boxes[o + 2] + dy),
					Math.min(h, boxes[o + 3] + dy)
				);
			}
		}
		return rects.area();
	}

	private coveredPieces(omit: number, moved: number, x: number, y: number, only: number): number {
		const { pieces, coords, starts, first, halfWidth: w, halfHeight: h, halfGap: gap } = this;
		pieces.clear();
		if (gap > 0) {
			pieces.addRect(-w, -gap, -h, h);
			pieces.addRect(gap, w, -h, h);
		} else pieces.addRect(-w, w, -h, h);
		for (let g = 0; g < this.by.length && pieces.count > 0; g++) {
			if (g === omit || (only !== NONE && g !== only)) continue;
			const slides = moved === ALL || moved === g;
			for (let p = first[g]; p < first[g + 1]; p++) {
				const from = starts[p];
				const corners = (starts[p + 1] - from) / 2;
				if (this.moved.length < 2 * corners) this.moved = new Float64Array(4 * corners);
				for (let k = 0; k < corners; k++) {
					this.moved[2 * k] = coords[from + 2 * k] + (slides ? x : 0);
					this.moved[2 * k + 1] = coords[from + 2 * k + 1] + (slides ? y : 0);
				}
				pieces.subtract(this.moved, corners, this.passes[p]);
			}
		}
		return this.area - pieces.litArea();
	}
}
