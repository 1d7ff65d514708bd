import { prepareField } from '$lib/core';
import { emptyLayout, emptyPlot, modelLibrary } from '$lib/schema';
import { makeCamera } from './camera';
import { drawField, type DrawnField } from './draw-field';
import { samplePlace } from './sample-field';

/** Size of the picture, px. */
export const lowSunSize = { width: 440, height: 400 };
/** A winter morning. */
const sun = { azimuthDeg: 146, elevationDeg: 17 };
const lookDeg = 158;
const horizonPart = 0.47;

/** Feet of the invented machines: along the look and to the right of it, metres from the eye. */
const feet: readonly [aheadM: number, rightM: number][] = [
	[24, -3.4],
	[31, 8],
	[46, -17],
	[52, 5.5],
	[60, 26]
];

/** Some tables that face a low sun before the eye, which so looks on their backs, with the shadows coming towards it. */
export function drawLowSun(): DrawnField & { horizonY: number } {
	const model = modelLibrary[1];
	const look = (lookDeg * Math.PI) / 180;
	const trackers = feet.map(([aheadM, rightM], index) => ({
		id: String(index),
		tag: String(index),
		modelId: model.id,
		eastM: aheadM * Math.sin(look) + rightM * Math.cos(look),
		northM: aheadM * Math.cos(look) - rightM * Math.sin(look),
		axisHeightM: null,
		posture: { kind: 'following' as const }
	}));
	const field = prepareField({
		place: samplePlace,
		plot: emptyPlot(),
		layout: { ...emptyLayout(), models: [model], trackers }
	});
	const { width, height } = lowSunSize;
	const camera = makeCamera([0, 0, 7], lookDeg, 330, width, height, horizonPart);
	return { ...drawField(field, trackers, camera, sun), horizonY: camera.horizonY };
}
