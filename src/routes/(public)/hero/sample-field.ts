import { prepareField, type Field, type Place, type Tracker } from '$lib/core';
import { emptyLayout, emptyPlot, modelLibrary } from '$lib/schema';

/** An invented place, for the picture on the first page. */
export const samplePlace: Place = {
	latitudeDeg: 41.2,
	longitudeDeg: 14.5,
	altitudeM: 300,
	timeZone: 'Europe/Rome',
	magneticDeclinationDeg: 0
};

/** Height of the sun above which the sample asks for no shade, degrees. */
export const sampleRuleDeg = 12;

const [pitchEastM, pitchNorthM] = [13, 11];

/** Fourteen invented machines in three staggered rows, the nearest row southmost. */
export function sampleField(): { field: Field; trackers: Tracker[] } {
	const model = modelLibrary[1];
	const rows = [
		{ northM: 2 * pitchNorthM, count: 5, shiftM: 0 },
		{ northM: pitchNorthM, count: 5, shiftM: pitchEastM / 2 },
		{ northM: 0, count: 4, shiftM: pitchEastM }
	];
	const trackers = rows.flatMap(({ northM, count, shiftM }, row) =>
		Array.from({ length: count }, (_, index): Tracker => {
			const tag = `${'ABC'[row]}0${index + 1}`;
			const eastM = (index - 2) * pitchEastM + shiftM - pitchEastM / 2;
			return {
				id: tag,
				tag,
				modelId: model.id,
				eastM,
				northM,
				axisHeightM: null,
				posture: { kind: 'following' }
			};
		})
	);
	const field = prepareField({
		place: samplePlace,
		plot: emptyPlot(),
		layout: { ...emptyLayout(), models: [model], trackers }
	});
	return { field, trackers };
}
