import { RADIANS_PER_DEGREE } from '../conventions';
import { airMass } from './beam';

export interface IrradianceRequest {
	/** Of the plane, from horizontal. */
	tiltDeg: number;
	zenithDeg: number;
	/** Between the sun and the plane's normal. */
	angleOfIncidenceDeg: number;
	/** W/m² */
	directNormal: number;
	diffuseHorizontal: number;
	extraterrestrialNormal: number;
	model: 'isotropic' | 'hay-davies' | 'perez';
}

/** f11, f12, f13, f21, f22, f23 by sky clearness: Perez et al. 1990, all-sites composite, full digits in circulation. */
const PEREZ: readonly (readonly number[])[] = [
	[-0.0083117, 0.5877285, -0.0620636, -0.0596012, 0.0721249, -0.0220216],
	[0.1299457, 0.6825954, -0.1513752, -0.0189325, 0.065965, -0.0288748],
	[0.3296958, 0.4868735, -0.2210958, 0.055414, -0.0639588, -0.0260542],
	[0.5682053, 0.1874525, -0.295129, 0.1088631, -0.1519229, -0.0139754],
	[0.873028, -0.3920403, -0.3616149, 0.2255647, -0.4620442, 0.0012448],
	[1.1326077, -1.2367284, -0.4118494, 0.2877813, -0.8230357, 0.0558651],
	[1.0601591, -1.5999137, -0.3589221, 0.2642124, -1.127234, 0.1310694],
	[0.677747, -0.3272588, -0.2504286, 0.1561313, -1.3765031, 0.2506212]
];
const PEREZ_BOUNDS = [1.065, 1.23, 1.5, 1.95, 2.8, 4.5, 6.2];

/**
 * Sky diffuse on a tilted plane, W/m²: isotropic (Liu and Jordan 1960), Hay and Davies 1980, or Perez et al. 1990
 * with the air mass of Kasten and Young. Nothing of the ground, nothing of neighbours. Never below 0.
 */
export function irradiance(request: IrradianceRequest): { skyDiffuse: number } {
	const { directNormal, diffuseHorizontal, extraterrestrialNormal } = request;
	const tilt = request.tiltDeg * RADIANS_PER_DEGREE;
	const zenith = request.zenithDeg * RADIANS_PER_DEGREE;
	const skyView = (1 + Math.cos(tilt)) / 2;
	if (!(diffuseHorizontal > 0)) return { skyDiffuse: 0 };
	const isotropic = diffuseHorizontal * skyView;
	if (request.model === 'isotropic') return { skyDiffuse: isotropic };
	const onPlane = Math.max(0, Math.cos(request.angleOfIncidenceDeg * RADIANS_PER_DEGREE));
	const onLevel = Math.max(Math.cos(85 * RADIANS_PER_DEGREE), Math.cos(zenith));
	if (!(extraterrestrialNormal > 0)) return { skyDiffuse: isotropic };
	if (request.model === 'hay-davies') {
		const anisotropy = Math.min(1, Math.max(0, directNormal / extraterrestrialNormal));
		return {
			skyDiffuse: diffuseHorizontal * ((anisotropy * onPlane) / onLevel + (1 - anisotropy) * skyView)
		};
	}
	const { f1, f2 } = perezBrightening(request);
	const sky = (1 - f1) * skyView + (f1 * onPlane) / onLevel + f2 * Math.sin(tilt);
	return { skyDiffuse: Math.max(0, diffuseHorizontal * sky) };
}

/**
 * Sky of Perez et al. 1990 for one moment: clearness epsilon and its bin 1..8, brightness Delta with the relative air
 * mass of Kasten and Young, circumsolar share F1 (not below 0) and horizon share F2. Wants diffuse and extraterrestrial
 * above 0.
 */
export function perezBrightening(
	request: Pick<
		IrradianceRequest,
		'zenithDeg' | 'directNormal' | 'diffuseHorizontal' | 'extraterrestrialNormal'
	>
): { clearness: number; bin: number; brightness: number; f1: number; f2: number } {
	const { directNormal, diffuseHorizontal, extraterrestrialNormal } = request;
	const zenith = request.zenithDeg * RADIANS_PER_DEGREE;
	const k = 1.041 * zenith ** 3;
	const clearness = ((diffuseHorizontal + Math.max(0, directNormal)) / diffuseHorizontal + k) / (1 + k);
	const below = PEREZ_BOUNDS.findIndex((bound) => clearness < bound);
	const bin = below === -1 ? 8 : below + 1;
	const f = PEREZ[bin - 1];
	const brightness = (diffuseHorizontal * airMass(request.zenithDeg)) / extraterrestrialNormal;
	return {
		clearness,
		bin,
		brightness,
		f1: Math.max(0, f[0] + f[1] * brightness + f[2] * zenith),
		f2: f[3] + f[4] * brightness + f[5] * zenith
	};
}
