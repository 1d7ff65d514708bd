import { RADIANS_PER_DEGREE, type SunDirection } from '../conventions';
import { perezBrightening, type IrradianceRequest } from './irradiance';

export type SkyModel = 'isotropic' | 'hay-davies' | 'hdkr' | 'perez';

/** Diffuse light on a tilted plane by where in the sky it comes from, W/m². */
export interface SkyParts {
	/** From about the sun: shaded as the beam is. */
	circumsolar: number;
	/** Evenly from the whole sky that the plane sees. */
	isotropic: number;
	/** What a bright band at the horizon adds; Perez may take away. */
	horizon: number;
}

/** Cosine of the angle between the sun and the normal of a plane that faces an azimuth; below 0 the sun is behind. */
export function incidenceCosine(azimuthDeg: number, tiltDeg: number, sun: SunDirection): number {
	const tilt = tiltDeg * RADIANS_PER_DEGREE;
	const elevation = sun.elevationDeg * RADIANS_PER_DEGREE;
	const turn = (sun.azimuthDeg - azimuthDeg) * RADIANS_PER_DEGREE;
	return Math.sin(elevation) * Math.cos(tilt) + Math.cos(elevation) * Math.sin(tilt) * Math.cos(turn);
}

/**
 * Sky diffuse on a tilted plane in its parts: isotropic (Liu and Jordan 1960), Hay and Davies 1980, HDKR (their model with
 * the horizon factor 1 + sqrt(beam/global) sin³(tilt/2) of Klucher as Reindl, Beckman and Duffie 1990 put it; Duffie and
 * Beckman eq. 2.16.7) or Perez et al. 1990. All but HDKR add up to what `irradiance` gives.
 */
export function skyParts(request: Omit<IrradianceRequest, 'model'> & { model: SkyModel }): SkyParts {
	const { diffuseHorizontal, directNormal, extraterrestrialNormal } = request;
	const tilt = request.tiltDeg * RADIANS_PER_DEGREE;
	const skyView = (1 + Math.cos(tilt)) / 2;
	const none: SkyParts = { circumsolar: 0, isotropic: 0, horizon: 0 };
	if (!(diffuseHorizontal > 0)) return none;
	if (request.model === 'isotropic' || !(extraterrestrialNormal > 0)) {
		return { ...none, isotropic: diffuseHorizontal * skyView };
	}
	if (request.model === 'perez') {
		const { f1, f2 } = perezBrightening(request);
		const circumsolar = diffuseHorizontal * f1 * circumsolarRatio(request);
		const isotropic = diffuseHorizontal * (1 - f1) * skyView;
		// The whole is never below 0: what a dark horizon takes away is held to what there is.
		const horizon = Math.max(-(circumsolar + isotropic), diffuseHorizontal * f2 * Math.sin(tilt));
		return { circumsolar, isotropic, horizon };
	}
	const anisotropy = Math.min(1, Math.max(0, directNormal / extraterrestrialNormal));
	const isotropic = diffuseHorizontal * (1 - anisotropy) * skyView;
	const circumsolar = diffuseHorizontal * anisotropy * circumsolarRatio(request);
	const horizon = request.model === 'hdkr' ? isotropic * horizonFactor(request) : 0;
	return { circumsolar, isotropic, horizon };
}

/** cos of incidence over cos of zenith, the zenith held at 85 degrees: as in `irradiance`. */
function circumsolarRatio({ angleOfIncidenceDeg, zenithDeg }: Omit<IrradianceRequest, 'model'>): number {
	const onPlane = Math.max(0, Math.cos(angleOfIncidenceDeg * RADIANS_PER_DEGREE));
	return onPlane / Math.max(Math.cos(85 * RADIANS_PER_DEGREE), Math.cos(zenithDeg * RADIANS_PER_DEGREE));
}

function horizonFactor(request: Omit<IrradianceRequest, 'model'>): number {
	const beam = Math.max(0, request.directNormal * Math.cos(request.zenithDeg * RADIANS_PER_DEGREE));
	const global = beam + request.diffuseHorizontal;
	return Math.sqrt(beam / global) * Math.sin((request.tiltDeg * RADIANS_PER_DEGREE) / 2) ** 3;
}

/** Light that the ground sends up on a tilted plane, W/m²: albedo x global horizontal x (1 - cos tilt) / 2. */
export function groundReflected(globalHorizontal: number, albedo: number, tiltDeg: number): number {
	return Math.max(0, globalHorizontal) * albedo * ((1 - Math.cos(tiltDeg * RADIANS_PER_DEGREE)) / 2);
}
