import { RADIANS_PER_DEGREE } from '../conventions';
import type { EnergySkyModel } from '../results';
import { perezBrightening } from './irradiance';

const LEAST_LEVEL = Math.cos(85 * RADIANS_PER_DEGREE);

/** A sky's diffuse light taken apart before any plane is known, W/m². */
export interface SkySplit {
	/** On a plane square to the sun: times cos of incidence. */
	circumsolar: number;
	/** On a plane that sees the whole sky: times (1 + cos tilt) / 2. */
	isotropic: number;
	/** On an upright plane: times sin tilt. */
	horizon: number;
}

/**
 * The parts of `skyParts` without the plane, so that many tables can share them: circumsolar D A / max(cos 85, cos z),
 * isotropic D (1 - A), no horizon band (Hay and Davies 1980); D F1 / max(cos 85, cos z), D (1 - F1), D F2 (Perez et al.
 * 1990); all isotropic (Liu and Jordan 1960). W/m², zenith in degrees; written into `out`.
 */
export function splitSky(
	model: EnergySkyModel,
	zenithDeg: number,
	directNormal: number,
	diffuseHorizontal: number,
	extraterrestrialNormal: number,
	out: SkySplit
): void {
	out.circumsolar = 0;
	out.isotropic = Math.max(0, diffuseHorizontal);
	out.horizon = 0;
	if (model === 'isotropic' || !(diffuseHorizontal > 0) || !(extraterrestrialNormal > 0)) return;
	const level = Math.max(LEAST_LEVEL, Math.cos(zenithDeg * RADIANS_PER_DEGREE));
	if (model === 'perez') {
		const { f1, f2 } = perezBrightening({
			zenithDeg,
			directNormal,
			diffuseHorizontal,
			extraterrestrialNormal
		});
		out.circumsolar = (diffuseHorizontal * f1) / level;
		out.isotropic = diffuseHorizontal * (1 - f1);
		out.horizon = diffuseHorizontal * f2;
		return;
	}
	const anisotropy = Math.min(1, Math.max(0, directNormal / extraterrestrialNormal));
	out.circumsolar = (diffuseHorizontal * anisotropy) / level;
	out.isotropic = diffuseHorizontal * (1 - anisotropy);
}
