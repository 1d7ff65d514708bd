/** The demo's land and field. Invented: no such farm, people or figures exist. */
import type { Layout, Place, Plot, TreeObstacle } from '$lib/core/document';
import { nextTags } from '$lib/core';
import { modelLibrary } from '$lib/schema/model-library';

export const demoName = 'Colle Mirabo, hillside farm (invented demo)';

export const demoNotes =
	'Invented demo data: there is no such farm, and its people and figures are made up. Olives and sheep on ground that ' +
	'rises 9 % to the east, an oak row on the west edge. Change anything: it is here to be tried.';

export const demoPlace: Place = {
	latitudeDeg: 41.2,
	longitudeDeg: 15.1,
	altitudeM: 420,
	timeZone: 'Europe/Rome',
	magneticDeclinationDeg: 4.1
};

/** Oaks stand every 9 m along the west edge; in winter about a third of the beam passes their bare crowns. */
const oaks = [-18, -9, 0, 9, 18].map((northM, index): TreeObstacle => ({
	id: `oak-${index + 1}`,
	kind: 'tree',
	name: `Oak ${index + 1}`,
	eastM: -52 + (index % 2),
	northM,
	heightM: 9,
	crownBaseM: 2.4,
	crownRadiusM: 3.2,
	trunkRadiusM: 0.3,
	crownTransmission: 0.35,
	growthMPerYear: 0.4,
	maxHeightM: 16
}));

export const demoPlot: Plot = {
	version: 1,
	boundary: [
		{
			outer: [
				[-44, -19],
				[-31, -21.5],
				[-12, -20],
				[8, -21],
				[22, -23],
				[35, -22],
				[47, -17.5],
				[51, -6],
				[52, 6],
				[47, 17],
				[34, 20],
				[20, 22.5],
				[3, 20],
				[-14, 21],
				[-30, 23],
				[-43, 18],
				[-47.5, 6],
				[-46, -8]
			],
			holes: []
		}
	],
	ground: { kind: 'plane', heightM: 0, risePercent: 9, riseTowardsDeg: 90 },
	skyline: [
		{ azimuthDeg: 0, elevationDeg: 3 },
		{ azimuthDeg: 40, elevationDeg: 5.5 },
		{ azimuthDeg: 75, elevationDeg: 7 },
		{ azimuthDeg: 105, elevationDeg: 6 },
		{ azimuthDeg: 130, elevationDeg: 3.5 },
		{ azimuthDeg: 170, elevationDeg: 1.5 },
		{ azimuthDeg: 215, elevationDeg: 2 },
		{ azimuthDeg: 250, elevationDeg: 3.5 },
		{ azimuthDeg: 290, elevationDeg: 4 },
		{ azimuthDeg: 330, elevationDeg: 2.5 }
	],
	obstacles: [
		...oaks,
		{
			id: 'shed',
			kind: 'box',
			name: 'Tool shed',
			eastM: -30,
			northM: -29,
			sizeXM: 8,
			sizeYM: 5,
			heightM: 3.6,
			turnDeg: 12
		}
	],
	setBackM: 3
};

/** Three rows of six at 13 x 10.5 m, every second row half a pitch to the east. */
export function demoLayout(): Layout {
	const model = modelLibrary.find((one) => one.id === 'library-ormeva-24') ?? modelLibrary[0];
	const points = Array.from({ length: 18 }, (_, index): [number, number] => {
		const row = Math.floor(index / 6);
		return [(index % 6) * 13 - 35.5 + (row % 2 === 1 ? 6.5 : 0), 10.5 - row * 10.5];
	});
	const tags = nextTags([], points, { rowToleranceM: 5 });
	return {
		version: 1,
		models: [structuredClone(model)],
		trackers: points.map(([eastM, northM], index) => ({
			id: `demo-${tags[index].toLowerCase()}`,
			tag: tags[index],
			modelId: model.id,
			eastM,
			northM,
			axisHeightM: null,
			posture: { kind: 'following' }
		})),
		mounts: { common: null, exceptions: {}, fromRunId: null }
	};
}
