import { RADIANS_PER_DEGREE } from '../conventions';
import type { ShadeEngine } from './engine';
import { OVER, SLACK } from './sector-lists';

/**
 * Up to which light obstacles can reach each table while the light stands in a sector of azimuth: by the balls that
 * hold each solid and each table, as for tables among themselves.
 */
export class SolidBounds {
	/** Sine from which on no obstacle reaches any table. */
	highest = 0;
	private readonly balls: Float64Array;
	private readonly tableRadius: Float64Array;
	private sines = new Float64Array(0);

	constructor(private readonly engine: ShadeEngine) {
		this.balls = new Float64Array(4 * engine.solids.length);
		engine.solids.forEach(({ vertices }, k) => {
			const low = [Infinity, Infinity, Infinity];
			const high = [-Infinity, -Infinity, -Infinity];
			for (let o = 0; o < vertices.length; o++) {
				low[o % 3] = Math.min(low[o % 3], vertices[o]);
				high[o % 3] = Math.max(high[o % 3], vertices[o]);
			}
			let radius = 0;
			for (let c = 0; c < 3; c++) this.balls[4 * k + c] = (low[c] + high[c]) / 2;
			for (let o = 0; o < vertices.length; o += 3) {
				radius = Math.max(
					radius,
					Math.hypot(
						vertices[o] - this.balls[4 * k],
						vertices[o + 1] - this.balls[4 * k + 1],
						vertices[o + 2] - this.balls[4 * k + 2]
					)
				);
			}
			this.balls[4 * k + 3] = radius;
		});
		this.tableRadius = Float64Array.from(
			engine.groups,
			(g) => Math.hypot(g.steelHalfWidth, g.steelHalfHeight) + g.offsetReach
		);
	}

	/** Sine from which on no obstacle reaches table `row + from` of the last turn; 0 when none ever does. */
	clearFrom(row: number): number {
		return this.balls.length === 0 ? 0 : this.sines[row];
	}

	/** Turns to a sector of azimuth with nothing lower than the sine `lowest` in it, for tables `from` to `to`. */
	turn(fromDeg: number, toDeg: number, lowest: number, from: number, to: number): void {
		this.highest = 0;
		const { balls, engine, tableRadius } = this;
		if (balls.length === 0) return;
		if (this.sines.length < to - from) this.sines = new Float64Array(to - from);
		const { east, north, up, groupOf } = engine;
		const half = ((toDeg - fromDeg) / 2) * RADIANS_PER_DEGREE;
		const middle = ((fromDeg + toDeg) / 2) * RADIANS_PER_DEGREE;
		const sin = Math.sin(middle);
		const cos = Math.cos(middle);
		const spread = Math.tan(half);
		const shrink = Math.cos(half);
		for (let i = from; i < to; i++) {
			let bound = 0;
			for (let o = 0; o < balls.length; o += 4) {
				const dx = balls[o] - east[i];
				const dy = balls[o + 1] - north[i];
				const r = balls[o + 3] + tableRadius[groupOf[i]];
				const t = dx * sin + dy * cos;
				const q = dx * cos - dy * sin;
				const limit = r / shrink + Math.abs(t) * spread;
				if (q >= limit || -q >= limit || t <= -2 * r) continue;
				const dz = balls[o + 2] - up[i];
				const d = Math.hypot(dx, dy, dz);
				const sinReach = r / d;
				const cosReach = Math.sqrt(Math.max(0, 1 - sinReach * sinReach));
				const over = d <= r || dz / d >= cosReach;
				const sine = over ? OVER : (dz / d) * cosReach + (Math.hypot(dx, dy) / d) * sinReach + SLACK;
				if (sine > bound) bound = sine;
			}
			this.sines[i - from] = bound > lowest ? bound : 0;
			if (this.sines[i - from] > this.highest) this.highest = this.sines[i - from];
		}
	}
}
