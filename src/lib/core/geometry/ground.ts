import { normaliseDeg, RADIANS_PER_DEGREE } from '../conventions';
import type { Ground } from '../document';
import { PlaneSurface, type GroundSurface } from './ground-surface';
import { RasterSurface } from './raster-surface';
import { TriangleSurface } from './triangle-surface';

const prepared = new WeakMap<Ground, GroundSurface>();

function makeSurface(ground: Ground): GroundSurface {
	switch (ground.kind) {
		case 'level':
			return new PlaneSurface(ground.heightM, 0, 0);
		case 'plane': {
			const towards = ground.riseTowardsDeg * RADIANS_PER_DEGREE;
			const rise = ground.risePercent / 100;
			return new PlaneSurface(ground.heightM, rise * Math.sin(towards), rise * Math.cos(towards));
		}
		case 'points':
			return new TriangleSurface(ground.points);
		case 'raster':
			return new RasterSurface(ground);
	}
}

/**
 * The surface of a ground, made once and kept as long as the same object is asked for: documents are never changed in
 * place. 20,000 points take a fraction of a second, every question after that microseconds.
 */
export function groundSurface(ground: Ground): GroundSurface {
	let surface = prepared.get(ground);
	if (!surface) {
		surface = makeSurface(ground);
		prepared.set(ground, surface);
	}
	return surface;
}

/** True for ground that was measured (points or a raster) and so can rise between the trackers and the sun. */
export const isMeasured = (ground: Ground): boolean => ground.kind === 'points' || ground.kind === 'raster';

/** Height of the ground at a plan point, metres above the origin's datum. */
export function groundHeightM(ground: Ground, eastM: number, northM: number): number {
	if (ground.kind === 'level') return ground.heightM;
	return groundSurface(ground).heightM(eastM, northM);
}

/** How the ground lies somewhere. */
export interface GroundSlope {
	/** Rise in metres per metre, without its direction. */
	gradient: number;
	/** Bearing towards which the ground falls, 0..360; 0 where it is level. */
	aspectDeg: number;
}

function slopeOf(east: number, north: number): GroundSlope {
	const gradient = Math.hypot(east, north);
	const aspectDeg = gradient < 1e-9 ? 0 : normaliseDeg(Math.atan2(-east, -north) / RADIANS_PER_DEGREE);
	return { gradient, aspectDeg };
}

/** Slope and aspect of the ground at a point; on measured ground those of the triangle or cell there. */
export function groundSlope(ground: Ground, eastM: number, northM: number): GroundSlope {
	return slopeOf(...groundSurface(ground).gradient(eastM, northM));
}

/** Bearings around a foot at which ground is looked at: a ring every 15 degrees. */
const RING = Array.from({ length: 24 }, (_, k): [number, number] => {
	const a = (k * 15 * Math.PI) / 180;
	return [Math.sin(a), Math.cos(a)];
});

/**
 * Slope and aspect under a tracker: the plane that fits the ground best (least squares) on two rings of 24 points, at
 * half the radius and at the radius. On level and sloping planes exact.
 */
export function groundSlopeWithin(
	ground: Ground,
	eastM: number,
	northM: number,
	radiusM: number
): GroundSlope {
	if (!isMeasured(ground) || !(radiusM > 0)) return groundSlope(ground, eastM, northM);
	const surface = groundSurface(ground);
	let east = 0;
	let north = 0;
	for (const share of [0.5, 1]) {
		for (const [s, c] of RING) {
			const height = surface.heightM(eastM + share * radiusM * s, northM + share * radiusM * c);
			east += share * s * height;
			north += share * c * height;
		}
	}
	// Sums of share^2 sin^2 and share^2 cos^2 over both rings: 24 / 2 (1/4 + 1) = 15; the cross sums vanish.
	return slopeOf(east / (15 * radiusM), north / (15 * radiusM));
}

/**
 * Steepest rise of the ground from a foot to any place within a radius, metres per metre, never below 0: what the lowest
 * corner loses. On planes their slope; on measured ground from 48 places on two rings.
 */
export function steepestRise(ground: Ground, eastM: number, northM: number, radiusM: number): number {
	if (!isMeasured(ground)) return groundSlope(ground, eastM, northM).gradient;
	const surface = groundSurface(ground);
	const foot = surface.heightM(eastM, northM);
	let steepest = 0;
	for (const share of [0.5, 1]) {
		const away = share * radiusM;
		for (const [s, c] of RING) {
			steepest = Math.max(steepest, (surface.heightM(eastM + away * s, northM + away * c) - foot) / away);
		}
	}
	return steepest;
}
