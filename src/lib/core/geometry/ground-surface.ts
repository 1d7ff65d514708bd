/** Shape of the ground, ready for many questions. Metres, local frame; heights above the origin's datum. */
export interface GroundSurface {
	/** Height at a plan point. */
	heightM(eastM: number, northM: number): number;
	/** Rise in metres per metre towards east and towards north. */
	gradient(eastM: number, northM: number): [east: number, north: number];
	/** Where heights were measured: west, south, east, north; null for ground without end. */
	readonly extent: readonly [westM: number, southM: number, eastM: number, northM: number] | null;
	/**
	 * Tangent of the highest elevation of the ground seen from a point at height `upM` in a level direction (a unit
	 * vector). Exact for the surface wherever it rises above that height; where it does not, below 0 or -Infinity.
	 */
	skylineTangent(eastM: number, northM: number, upM: number, towardsE: number, towardsN: number): number;
	/** Triangles for drawing: x, y, z of each corner and the corners of each triangle. */
	mesh(): { points: Float64Array; corners: Int32Array };
}

/** Nearer ground than this is under the tracker itself, metres. */
export const NEAREST_GROUND_M = 1e-3;

/** A plane z = heightM + east * eastM + north * northM; nothing of it counts as a skyline. */
export class PlaneSurface implements GroundSurface {
	readonly extent = null;

	constructor(
		private readonly atOriginM: number,
		private readonly east: number,
		private readonly north: number
	) {}

	heightM(eastM: number, northM: number): number {
		return this.atOriginM + this.east * eastM + this.north * northM;
	}

	gradient(): [number, number] {
		return [this.east, this.north];
	}

	skylineTangent(): number {
		return -Infinity;
	}

	mesh(): { points: Float64Array; corners: Int32Array } {
		return { points: new Float64Array(0), corners: new Int32Array(0) };
	}
}
