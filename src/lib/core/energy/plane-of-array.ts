import { RADIANS_PER_DEGREE, type SunDirection } from '../conventions';
import { groundReflected, incidenceCosine, skyParts, type SkyModel } from './sky-parts';

export interface PlaneRequest {
	/** Bearing that the glass faces and its tilt from horizontal. */
	azimuthDeg: number;
	tiltDeg: number;
	sun: SunDirection;
	/** W/m² */
	directNormal: number;
	diffuseHorizontal: number;
	/** W/m²; beam and diffuse on level ground are summed when it is not given. */
	globalHorizontal?: number;
	extraterrestrialNormal: number;
	/** Share of light that the ground sends back, 0..1. */
	albedo: number;
	model: SkyModel;
	/** Share of the table that the beam reaches, 0..1; 1 when nothing stands before it. */
	litShare?: number;
	/** Sky that neighbours and obstacles leave over what the bare plane would see, 0..1. */
	skyViewShare?: number;
	/** Ground that the plane still sees over what it would see alone, 0..1. */
	groundViewShare?: number;
}

/** Light on a table by part, W/m² of its area. */
export interface PlaneLight {
	beam: number;
	circumsolar: number;
	isotropic: number;
	horizon: number;
	ground: number;
	total: number;
}

/**
 * Light on a plane: beam x cos of incidence x lit share, the circumsolar part shaded like the beam, the isotropic part and
 * the horizon band by the sky that is left, and what the ground sends back. At night and with the sun behind the plane
 * there is no beam.
 */
export function planeOfArray(request: PlaneRequest): PlaneLight {
	const { azimuthDeg, tiltDeg, sun, directNormal, diffuseHorizontal, model } = request;
	const lit = request.litShare ?? 1;
	const sky = request.skyViewShare ?? 1;
	const cosine = incidenceCosine(azimuthDeg, tiltDeg, sun);
	const level = Math.max(0, Math.sin(sun.elevationDeg * RADIANS_PER_DEGREE));
	const up = sun.elevationDeg > 0;
	const parts = skyParts({
		tiltDeg,
		zenithDeg: Math.min(90, 90 - sun.elevationDeg),
		angleOfIncidenceDeg: up ? Math.acos(Math.min(1, Math.max(-1, cosine))) / RADIANS_PER_DEGREE : 90,
		directNormal: up ? directNormal : 0,
		diffuseHorizontal,
		extraterrestrialNormal: request.extraterrestrialNormal,
		model
	});
	const globalHorizontal = request.globalHorizontal ?? diffuseHorizontal + Math.max(0, directNormal) * level;
	const beam = up ? Math.max(0, directNormal) * Math.max(0, cosine) * lit : 0;
	const circumsolar = parts.circumsolar * lit;
	const isotropic = parts.isotropic * sky;
	const horizon = Math.max(-(circumsolar + isotropic), parts.horizon * sky);
	const ground = groundReflected(globalHorizontal, request.albedo, tiltDeg) * (request.groundViewShare ?? 1);
	return {
		beam,
		circumsolar,
		isotropic,
		horizon,
		ground,
		total: beam + circumsolar + isotropic + horizon + ground
	};
}

/** Light on a two-axis table that looks straight at the sun; below the horizon it stands upright and waits. */
export function twoAxisPlane(request: Omit<PlaneRequest, 'azimuthDeg' | 'tiltDeg'>): PlaneLight {
	const tiltDeg = Math.min(90, Math.max(0, 90 - request.sun.elevationDeg));
	return planeOfArray({ ...request, azimuthDeg: request.sun.azimuthDeg, tiltDeg });
}
