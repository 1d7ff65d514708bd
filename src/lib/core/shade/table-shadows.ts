import type { LightView } from './light-view';
import type { ShadowBuffer } from './shadow-buffer';
import type { ShadowUnion } from './shadow-union';
import { UP_SUN_M } from './table-group';

/** Shadows of tables on the plane of another. */
export class TableShadows {
	/** Middle of the shadow x, y and its distance up-sun, then the same of its half sides; metres. */
	private readonly pair = new Float64Array(9);

	constructor(
		private readonly view: LightView,
		private readonly buffer: ShadowBuffer
	) {}

	/** Halves that a table throws its shadow in. */
	parts(j: number): number {
		const { groups, groupOf } = this.view;
		return groups[groupOf[j]].halfGap > 0 ? 2 : 1;
	}

	/** Whether two tables are in one pose, so that shadows have the sides of the table. */
	aligned(i: number, j: number): boolean {
		const { poses, groupOf } = this.view;
		const a = poses[groupOf[i]];
		const b = poses[groupOf[j]];
		return a === b || (a.azimuthDeg === b.azimuthDeg && a.tiltDeg === b.tiltDeg);
	}

	/** Shadow of half `part` of table j on the plane `forwardM` ahead of table i, into the buffer; its corners or 0. */
	shadow(i: number, j: number, part: number, forwardM: number): number {
		this.pairUp(i, j, forwardM);
		const { halfGap, steelHalfWidth } = this.view.groups[this.view.groupOf[j]];
		const slot = halfGap / steelHalfWidth;
		const a = halfGap > 0 && part === 1 ? slot : -1;
		const b = halfGap > 0 && part === 0 ? -slot : 1;
		return this.clipped(a, b);
	}

	/** Adds the shadow of table j on table i to a union; rectangles where `aligned`. */
	addTo(union: ShadowUnion, i: number, j: number, aligned: boolean): void {
		const { pair } = this;
		const { groups, groupOf } = this.view;
		const { halfWidth: w, halfHeight: h } = groups[groupOf[i]];
		const shader = groups[groupOf[j]];
		const { next } = union;
		this.pairUp(i, j, 0);
		const cx = pair[0];
		const cy = pair[1];
		const cd = pair[2];
		const uX = pair[3];
		const uY = pair[4];
		const uD = pair[5];
		const vX = pair[6];
		const vY = pair[7];
		const vD = pair[8];
		const ex = Math.abs(uX) + Math.abs(vX);
		const ey = Math.abs(uY) + Math.abs(vY);
		if (cx - ex >= w || cx + ex <= -w || cy - ey >= h || cy + ey <= -h) return;
		const lean = Math.abs(uD) + Math.abs(vD);
		if (cd + lean <= UP_SUN_M) return;
		const parts = shader.halfGap > 0 ? 2 : 1;
		const slot = shader.halfGap / shader.steelHalfWidth;
		for (let part = 0; part < parts; part++) {
			const a = parts === 2 && part === 1 ? slot : -1;
			const b = parts === 2 && part === 0 ? -slot : 1;
			if (aligned) {
				next[0] = cx + a * uX;
				next[1] = cx + b * uX;
				next[2] = cy - vY;
				next[3] = cy + vY;
				union.addRect();
			} else if (cd - lean > UP_SUN_M) {
				next[0] = cx + a * uX - vX;
				next[1] = cy + a * uY - vY;
				next[2] = cx + b * uX - vX;
				next[3] = cy + b * uY - vY;
				next[4] = cx + b * uX + vX;
				next[5] = cy + b * uY + vY;
				next[6] = cx + a * uX + vX;
				next[7] = cy + a * uY + vY;
				union.add(4);
			} else {
				const m = this.clipped(a, b);
				for (let c = 0; c < 2 * m; c++) next[c] = this.buffer.shadow[c];
				if (m > 0) union.add(m);
			}
		}
	}

	/** Shadow of what lies between a and b half widths of the pair's shader, into the buffer; its corners or 0. */
	private clipped(a: number, b: number): number {
		const { pair } = this;
		const { corners } = this.buffer;
		for (let c = 0; c < 4; c++) {
			const along = c === 0 || c === 3 ? a : b;
			const up = c < 2 ? -1 : 1;
			for (let k = 0; k < 3; k++) corners[3 * c + k] = pair[k] + along * pair[3 + k] + up * pair[6 + k];
		}
		return this.buffer.clipUpSun(4);
	}

	/** Projects table j on the plane `forwardM` ahead of table i along the light, into `pair`. */
	private pairUp(i: number, j: number, forwardM: number): void {
		const { pair } = this;
		const { east, north, up, poses, groups, groupOf } = this.view;
		const pose = poses[groupOf[i]];
		const other = poses[groupOf[j]];
		const { n, cosine, ux, uy, uz, vx, vy, vz } = pose;
		const dx = east[j] + other.offset[0] - east[i] - pose.offset[0] - forwardM * n[0];
		const dy = north[j] + other.offset[1] - north[i] - pose.offset[1] - forwardM * n[1];
		const dz = up[j] + other.offset[2] - up[i] - pose.offset[2] - forwardM * n[2];
		pair[0] = ux * dx + uy * dy + uz * dz;
		pair[1] = vx * dx + vy * dy + vz * dz;
		pair[2] = (n[0] * dx + n[1] * dy + n[2] * dz) / cosine;
		const { steelHalfWidth: w, steelHalfHeight: h } = groups[groupOf[j]];
		const { u, v } = other;
		pair[3] = w * (ux * u[0] + uy * u[1] + uz * u[2]);
		pair[4] = w * (vx * u[0] + vy * u[1] + vz * u[2]);
		pair[5] = (w * (n[0] * u[0] + n[1] * u[1] + n[2] * u[2])) / cosine;
		pair[6] = h * (ux * v[0] + uy * v[1] + uz * v[2]);
		pair[7] = h * (vx * v[0] + vy * v[1] + vz * v[2]);
		pair[8] = (h * (n[0] * v[0] + n[1] * v[1] + n[2] * v[2])) / cosine;
	}
}
