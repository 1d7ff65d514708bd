import type { EnergySky, EnergySkyModel } from '../results';

/** The model that is run beside the chosen one, to show how far they are apart. */
export function otherSkyModel(model: EnergySkyModel): EnergySkyModel {
	return model === 'hay-davies' ? 'perez' : 'hay-davies';
}

/** How the models of an energy year are named in results. */
export const SKY_MODEL_WORDS: Record<EnergySkyModel, string> = {
	'hay-davies': 'Hay and Davies 1980: circumsolar light by the beam’s clearness, the rest even over the sky',
	perez: 'Perez et al. 1990: circumsolar light, even sky and a band at the horizon',
	isotropic: 'Even sky (Liu and Jordan 1960): too little for tables that face the sun'
};

export const GROUND_WORDS =
	'Ground: albedo x global x (1 - cos tilt) / 2, as from open ground without the shadows and the sight of other tables';

export const SKY_VIEW_WORDS =
	'Sky view: exact areas of what stands before each table from 96 directions of the sky, for suns every 15 degrees of azimuth, linear between';

export const STRING_WORDS =
	'Strings: Martinez-Moreno, Muñoz and Lorenzo 2010 on beam and circumsolar light, cell groups counted from the exact shadows; at least the shaded area, at most every string that a shadow touches';

export function skySourceWords(sky: EnergySky): string {
	if (sky.source === 'clear') {
		return 'Clear sky: Ineichen and Perez 2002, air mass of Kasten and Young 1989, 1361 W/m² at the mean distance of the sun';
	}
	if (sky.source === 'average') {
		return 'Average year from monthly sums: diffuse part by Erbs, Klein and Duffie 1982, hours by Collares-Pereira and Rabl 1979 and Liu and Jordan 1960, on the mean days of Klein 1977';
	}
	return `Weather file: ${sky.name || 'place without a name'}, hour by hour, cut into the run’s steps with the light of each hour kept`;
}
