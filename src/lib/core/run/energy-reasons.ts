import type { EnergyReason, EnergyResult, RunInput } from '../results';
import { otherSkyModel } from './energy-words';
import { placesApartKm } from './energy-steps';

/** Weather made for a place further away than this is spoken of, km. */
const NEAR_KM = 30;
/** Share of the sky loss by which the sum over directions and the grid of suns may be off.. */
export const SKY_VIEW_ERROR = 0.05;
/**
 * .. or share of the even sky where that is more: in thin fields neighbours cover less than one direction stands for.
 * Measured against 24 rings of 96 directions, grids of 10 to 60 m at 10 to 60 N: at most 0.0043.
 */
export const SKY_VIEW_LEAST_ERROR = 0.005;

const names = { 'hay-davies': 'Hay and Davies', perez: 'Perez', isotropic: 'the even sky' } as const;

/**
 * Why the field's year could be otherwise, in points of the light without shade (hundredths). Figures from this very run
 * where it gives them, else the trade's (common practice, no source).
 */
export function energyReasons(input: RunInput, result: EnergyResult): EnergyReason[] {
	const settings = input.energy;
	if (!settings) return [];
	const { field } = result;
	const { losses, without } = field;
	const points = (share: number): number => share * 100;
	const reasons: EnergyReason[] = [];
	const { electrical } = losses;
	if (losses.beam > 0) {
		reasons.push({
			id: 'strings',
			words:
				'How the modules of a shaded table are wired and how its inverter finds its point: from losing the shaded area alone to losing every string that a shadow touches.',
			lessPoints: points(electrical.high - electrical.likely),
			morePoints: points(electrical.likely)
		});
	}
	const likely = without.total * (1 - losses.total.likely);
	const apart = without.total > 0 ? points((field.otherModel.withKwhM2 - likely) / without.total) : 0;
	reasons.push({
		id: 'sky-model',
		words: `Model of the sky: the same field under ${names[otherSkyModel(settings.skyModel)]} receives ${apart < 0 ? 'less' : 'more'}.`,
		lessPoints: Math.max(0, -apart),
		morePoints: Math.max(0, apart)
	});
	reasons.push(weatherReason(input));
	const heights = 20 * losses.beam + 0.2;
	if (losses.beam > 0) {
		reasons.push({
			id: 'heights',
			words:
				'Heights of ground, skyline and obstacles, unless they were measured: a fifth of the beam lost and 0.2 points (common practice, no source).',
			lessPoints: heights,
			morePoints: Math.min(heights, points(losses.beam))
		});
	}
	const groundShare = without.total > 0 ? points(without.ground / without.total) : 0;
	if (groundShare > 0) {
		reasons.push({
			id: 'ground',
			words:
				'Light sent back by the ground is counted as from open ground; tables shade part of it and hide part of it from each other, and the albedo changes with grass, dry soil and snow.',
			lessPoints: groundShare,
			morePoints: null
		});
	}
	if (losses.sky > 0 || input.layout.trackers.length > 1) {
		const least = without.total > 0 ? points((SKY_VIEW_LEAST_ERROR * without.isotropic) / without.total) : 0;
		const off = Math.max(points(losses.sky) * SKY_VIEW_ERROR, least);
		reasons.push({
			id: 'sky-view',
			words: `Sky covered by neighbours is a sum over 96 directions, off by 5 % of it, or ${least.toFixed(2)} points where that is more; what their glass and backs shine in their place is left out.`,
			lessPoints: off,
			morePoints: off + points(losses.sky) * SKY_VIEW_ERROR
		});
	}
	if (result.model.stepMinutes > 10 && losses.beam > 0) {
		reasons.push({
			id: 'steps',
			words: `Steps of ${result.model.stepMinutes} minutes see the beginning and the end of shade only so finely.`,
			lessPoints: 0.05,
			morePoints: 0.05
		});
	}
	return reasons;
}

function weatherReason(input: RunInput): EnergyReason {
	const sky = input.energy!.sky;
	if (sky.source === 'clear') {
		return {
			id: 'weather',
			words:
				'A year without a cloud is no forecast: clouds take light from every real year. A clear sky sends more light at mid-day and a larger part of it as beam than a cloudy one, so the share lost to shade may come out smaller or larger than under clouds. Monthly sums or a weather file say what shade costs under the clouds of the place.',
			lessPoints: null,
			morePoints: 0
		};
	}
	const spread = 'One year differs from another by 5 to 8 % (common practice, no source).';
	if (sky.source === 'average') {
		return {
			id: 'weather',
			words: `Every day of a month is taken as its mean day, so clear and dull days are mixed into one. ${spread}`,
			lessPoints: 8,
			morePoints: 8
		};
	}
	const km = placesApartKm(input.place, sky);
	const away = km > NEAR_KM ? ` The file was made for a place ${Math.round(km)} km away.` : '';
	return {
		id: km > NEAR_KM ? 'place' : 'weather',
		words: `The file is one year, often put together from months of several.${away} ${spread}`,
		lessPoints: 8,
		morePoints: 8
	};
}
