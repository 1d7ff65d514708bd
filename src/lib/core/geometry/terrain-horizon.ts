import { normaliseDeg, RADIANS_PER_DEGREE } from '../conventions';
import type { Ground } from '../document';
import { groundSurface, isMeasured } from './ground';
import type { GroundSurface } from './ground-surface';

/** Bearings at which a tracker's own skyline is found, degrees apart. */
export const HORIZON_STEP_DEG = 3;
const BEARINGS = 360 / HORIZON_STEP_DEG;
const TOWARDS = Array.from({ length: BEARINGS }, (_, k): [number, number] => {
	const a = k * HORIZON_STEP_DEG * RADIANS_PER_DEGREE;
	return [Math.sin(a), Math.cos(a)];
});

/**
 * Skyline of the near ground by tracker: the elevation up to which measured ground hides the light from the fixed point
 * of each table (on the azimuth axis at the height of the tilt axis).
 *
 * At its bearings, every 3 degrees, it is exact for the surface: along a ray the ground's elevation has its top where
 * the ray crosses a triangle's side, or at one point inside a raster's cell. Between them it is straight. Curvature of
 * the earth and refraction along the ground are neglected: together about 0.002 degrees at 500 m. The whole table counts as hidden
 * or not with its middle. A tracker's skyline is made when it is first asked for.
 */
export class TerrainHorizons {
	private readonly known: (Float64Array | null)[];
	private readonly highest: Float64Array;

	constructor(
		private readonly surface: GroundSurface,
		private readonly east: Float64Array,
		private readonly north: Float64Array,
		private readonly up: Float64Array
	) {
		this.known = Array.from(east, () => null);
		this.highest = new Float64Array(east.length);
	}

	private skyline(i: number): Float64Array {
		const known = this.known[i];
		if (known) return known;
		const { surface, east, north, up } = this;
		const elevations = new Float64Array(BEARINGS);
		let highest = 0;
		for (let k = 0; k < BEARINGS; k++) {
			const tangent = surface.skylineTangent(east[i], north[i], up[i], TOWARDS[k][0], TOWARDS[k][1]);
			elevations[k] = tangent > 0 ? Math.atan(tangent) / RADIANS_PER_DEGREE : 0;
			highest = Math.max(highest, elevations[k]);
		}
		this.highest[i] = highest;
		this.known[i] = elevations;
		return elevations;
	}

	/** Height of tracker i's near skyline at a bearing, degrees; 0 where no measured ground rises above its axis. */
	heightDeg(i: number, azimuthDeg: number): number {
		const elevations = this.skyline(i);
		const at = normaliseDeg(azimuthDeg) / HORIZON_STEP_DEG;
		const k = Math.floor(at);
		const low = elevations[k % BEARINGS];
		return low + (at - k) * (elevations[(k + 1) % BEARINGS] - low);
	}

	/** Whether near ground hides light from this direction from the middle of tracker i. */
	hides(i: number, azimuthDeg: number, elevationDeg: number): boolean {
		this.skyline(i);
		return elevationDeg < this.highest[i] && elevationDeg < this.heightDeg(i, azimuthDeg);
	}

	/** The same with one tracker elsewhere; what is known of the others is kept. */
	moved(index: number, east: Float64Array, north: Float64Array, up: Float64Array): TerrainHorizons {
		const next = new TerrainHorizons(this.surface, east, north, up);
		for (let i = 0; i < this.known.length; i++) {
			next.known[i] = i === index ? null : this.known[i];
			next.highest[i] = this.highest[i];
		}
		return next;
	}
}

/** Near skylines of trackers standing at east, north with their axes at height `up` (metres); null on level and plane. */
export function terrainHorizons(
	ground: Ground,
	east: Float64Array,
	north: Float64Array,
	up: Float64Array
): TerrainHorizons | null {
	return isMeasured(ground) ? new TerrainHorizons(groundSurface(ground), east, north, up) : null;
}
