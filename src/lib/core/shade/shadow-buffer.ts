import { flatArea } from './pieces';
import { UP_SUN_M } from './table-group';

/** Shadows below this area are rounding, m². */
export const LEAST_SHADOW_M2 = 1e-13;
/** Most corners of one body, and of its shadow. */
export const MOST_SHADOW_CORNERS = 512;

/** Corners of one thing on the plane of a table, and the part of its shadow that counts. */
export class ShadowBuffer {
	/** x, y on the table and the distance up-sun of each corner, metres. */
	readonly corners = new Float64Array(3 * MOST_SHADOW_CORNERS);
	/** x, y of the shadow's corners, counter-clockwise. */
	readonly shadow = new Float64Array(2 * MOST_SHADOW_CORNERS);

	/** Keeps the part of the flat-ordered `corners` (x, y, distance up-sun) that stands up-sun; counter-clockwise. */
	clipUpSun(m: number): number {
		const { corners, shadow } = this;
		let size = 0;
		for (let k = 0; k < m; k++) {
			const o = 3 * k;
			const q = k + 1 === m ? 0 : o + 3;
			const d = corners[o + 2] - UP_SUN_M;
			const e = corners[q + 2] - UP_SUN_M;
			if (d > 0) {
				shadow[2 * size] = corners[o];
				shadow[2 * size++ + 1] = corners[o + 1];
			}
			if (d > 0 !== e > 0) {
				const t = d / (d - e);
				shadow[2 * size] = corners[o] + (corners[q] - corners[o]) * t;
				shadow[2 * size++ + 1] = corners[o + 1] + (corners[q + 1] - corners[o + 1]) * t;
			}
		}
		if (size < 3) return 0;
		const area = flatArea(shadow, 0, size);
		if (Math.abs(area) < LEAST_SHADOW_M2) return 0;
		if (area < 0) this.reverse(size);
		return size;
	}

	/** Turns the shadow's m corners the other way round. */
	reverse(m: number): void {
		const { shadow } = this;
		for (let a = 0, b = m - 1; a < b; a++, b--) {
			for (let c = 0; c < 2; c++) {
				const keep = shadow[2 * a + c];
				shadow[2 * a + c] = shadow[2 * b + c];
				shadow[2 * b + c] = keep;
			}
		}
	}
}
