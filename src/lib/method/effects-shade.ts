import type { Effect } from './effect';

export const shadeEffects = [
	{
		id: 'shade',
		title: 'Exact shade',
		words:
			'The shaded share of a table is the area of the union of all shadows that fall on it, over its own area. Every table, body and crown that stands up-sun is projected along the sun on the table’s plane and cut away from it, edge by edge. Nothing is sampled.',
		sources: [
			'Projection: U = u - (u·s)/(n·s) n, V = v - (v·s)/(n·s) n, distance up-sun n·d/(n·s)',
			'Clipping of convex polygons: Sutherland and Hodgman 1974'
		],
		neglected: [
			{
				what: 'Thickness of tables; poles and beams throw no shadow',
				howBig: 'a pole of 0.3 m: some 1 % of what a table of 6 m takes, on its lower edge'
			},
			{
				what: 'Crowns are upright prisms with an even transmission',
				howBig: 'the state of the leaves is the larger doubt: 0.3 to 0.6 bare'
			},
			{ what: 'Light that steel and glass mirror on their neighbours', howBig: 'below 1 % of the beam' }
		]
	},
	{
		id: 'spacing',
		title: 'Reach of a shadow',
		words:
			'How far apart tables must stand to leave each other free at a given sun. The distances here are read from the shares of the exact shade, so they check it from outside: where it says 0, the old rules of spacing must end.',
		sources: ['Plane geometry; worked examples of public notes'],
		neglected: []
	},
	{
		id: 'mounts',
		title: 'Light at a sensor',
		words:
			'A sensor is a point, or a head with a radius, on the frame of its table. It is blinded while the ray from it to the sun meets any table from either side, its own included, a body, a crown or the skyline.',
		sources: ['Ray and rectangle, ray and convex body: slab method of Kay and Kajiya 1986'],
		neglected: [
			{ what: 'Half shade while the sun’s disc is cut', howBig: 'counted as a margin: distance x 0.0093' },
			{
				what: 'What the sensor’s own electronics make of a bright sky',
				howBig: 'not known; asked for as behaviour'
			}
		]
	},
	{
		id: 'year-loss',
		title: 'Shade over a year',
		words:
			'A year is walked in steps taken at their middle. In each the beam on every table is multiplied with its lit share; the loss is what is missing at the end. Steps are never coarser than 20 minutes, because hour angles repeat every day.',
		sources: ['Sum over steps; beam of Meinel and Meinel 1976 with the altitude of Laue 1970'],
		neglected: [
			{ what: 'Change of sun within a step', howBig: '0.00002 of the beam at 10 minutes' },
			{
				what: 'Clouds, unless a weather year is chosen',
				howBig: 'a loss in percent of beam changes by a tenth of itself'
			}
		]
	}
] as const satisfies readonly Effect[];
