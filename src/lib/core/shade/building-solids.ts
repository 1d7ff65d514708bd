import { RADIANS_PER_DEGREE, type Vec3 } from '../conventions';
import type { BuildingObstacle, PlanPoint } from '../document';
import { convexParts, isConvex, ringCentre } from '../geometry/convex-parts';
import { atHeight } from './prism-solids';
import { ringSolid, sideLoops, solidFromLoops, type Solid } from './solid';

/** Corners nearer to the ridge line than this stand on it, metres. */
const ON_RIDGE_M = 1e-9;

/** Footprint on the plan. */
export const buildingRing = (building: BuildingObstacle): PlanPoint[] =>
	building.corners.map(([e, n]): PlanPoint => [building.eastM + e, building.northM + n]);

/** Top of a building above the ground under its middle, metres. */
export const buildingTopM = (building: Pick<BuildingObstacle, 'heightM' | 'roof'>): number =>
	building.heightM + (building.roof.kind === 'pitched' ? building.roof.riseM : 0);

interface RidgePlace {
	/** Distance of a plan point across from the ridge, metres. */
	offRidge(point: PlanPoint): number;
	/** Half the footprint's width across the ridge. */
	halfWidthM: number;
}

function ridgePlace(ring: readonly PlanPoint[], ridgeDeg: number): RidgePlace {
	const a = ridgeDeg * RADIANS_PER_DEGREE;
	const across = ([e, n]: PlanPoint): number => e * Math.cos(a) - n * Math.sin(a);
	const distances = ring.map(across);
	const low = Math.min(...distances);
	const high = Math.max(...distances);
	const middle = (low + high) / 2;
	return {
		halfWidthM: (high - low) / 2,
		offRidge: (point) => {
			const d = across(point) - middle;
			return Math.abs(d) < ON_RIDGE_M ? 0 : d;
		}
	};
}

/** Corners of a ring, and where the ridge crosses it, with their distances from the ridge. */
function withRidgePoints(ring: readonly PlanPoint[], place: RidgePlace): { at: PlanPoint; d: number }[] {
	return ring.flatMap((from, k) => {
		const to = ring[(k + 1) % ring.length];
		const d0 = place.offRidge(from);
		const d1 = place.offRidge(to);
		const corner = { at: from, d: d0 };
		if (d0 === 0 || d1 === 0 || d0 > 0 === d1 > 0) return [corner];
		const w = d0 / (d0 - d1);
		const crossing: PlanPoint = [from[0] + w * (to[0] - from[0]), from[1] + w * (to[1] - from[1])];
		return [corner, { at: crossing, d: 0 }];
	});
}

/** Ends of the ridge on the plan, metres; null under a flat roof. */
export function ridgeLine(building: BuildingObstacle): [PlanPoint, PlanPoint] | null {
	const { roof } = building;
	const ring = buildingRing(building);
	if (roof.kind !== 'pitched' || ring.length < 3) return null;
	const ends = withRidgePoints(ring, ridgePlace(ring, roof.ridgeDeg)).filter(({ d }) => d === 0);
	return ends.length < 2 ? null : [ends[0].at, ends[ends.length - 1].at];
}

/**
 * A convex footprint under two roof planes: at distance d across from the ridge, which runs through the middle of the
 * footprint's width across, the roof stands at eaves + rise (1 - |d| / half width). Walls go up to it.
 */
function pitchedSolid(
	ring: readonly PlanPoint[],
	baseM: number,
	eavesM: number,
	roof: { riseM: number; ridgeDeg: number },
	source: number
): Solid {
	const place = ridgePlace(ring, roof.ridgeDeg);
	const outline = withRidgePoints(ring, place);
	const n = outline.length;
	const bottom = atHeight(
		outline.map(({ at }) => at),
		baseM
	);
	const top = outline.map(({ at, d }): Vec3 => [
		at[0],
		at[1],
		eavesM + roof.riseM * (1 - Math.abs(d) / place.halfWidthM)
	]);
	const slope = (sign: number) => outline.flatMap(({ d }, k) => (sign * d >= 0 ? [n + k] : []));
	const loops = [bottom.map((_, k) => k), slope(1), slope(-1), ...sideLoops(n, 0, n)];
	return solidFromLoops([...bottom, ...top], loops, 0, source);
}

/**
 * A building: its footprint as convex parts from the lowest ground under its corners up to the eaves, heights counted
 * from the ground under its middle. A pitched roof needs a convex footprint; over another one it is left out (the schema
 * refuses it).
 */
export function buildingSolids(
	building: BuildingObstacle,
	groundAt: (eastM: number, northM: number) => number,
	source: number
): Solid[] {
	if (!(building.heightM > 0) || building.corners.length < 3) return [];
	const ring = buildingRing(building);
	const [east, north] = ringCentre(ring);
	const floorM = groundAt(east, north);
	const baseM = ring.reduce((lowest, [e, n]) => Math.min(lowest, groundAt(e, n)), floorM);
	const eavesM = floorM + building.heightM;
	const { roof } = building;
	if (roof.kind === 'pitched' && roof.riseM > 0 && isConvex(ring))
		return [pitchedSolid(ring, baseM, eavesM, roof, source)];
	return convexParts(ring).map((part) => ringSolid(atHeight(part, baseM), atHeight(part, eavesM), 0, source));
}
