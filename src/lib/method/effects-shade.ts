import type { Effect } from './effect';

export const shadeEffects = [
	{
		id: 'machine',
		title: 'Where a table stands and points',
		words:
			'A following table looks at the sun as far as its stops and tilt range allow: then at the reachable aim that is nearest in angle. Offsets of the axes and of the table carry its middle along. Reach and lowest corner are taken over every tilt, night and wind posture among them.',
		sources: [
			'n·s = sin t cos e cos(a - A) + cos t sin e, largest at tan t = cos e cos(a - A) / sin e',
			'Stops as an arc clockwise, through north where it must'
		],
		neglected: [
			{ what: 'Lag of the drive and its dead band', howBig: 'about 1° in good sun: 0.015 % of beam' },
			{ what: 'Starting and braking when times of turning are told', howBig: 'a second or two' }
		]
	},
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
			{ what: 'Light that steel and glass mirror on their neighbours', howBig: 'below 1 % of the beam' }
		]
	},
	{
		id: 'bodies',
		title: 'Trees, buildings, walls, masts',
		words:
			'Every obstacle is made of convex bodies: trunk and crown, footprints cut into convex parts, walls in pieces along their line. A crown, a fence or a hedge lets a share of the beam through; of a tree there are two, bare and in leaf. Trees grow by the year up to their cap.',
		sources: [
			'Outline of a body: convex hull of its projected corners, Andrew 1979',
			'Days in leaf where none are given: common practice, no source'
		],
		neglected: [
			{ what: 'Roundness: crowns, trunks and masts have sixteen sides', howBig: 'up to 3 % of their shadow' },
			{
				what: 'The state of the leaves, gaps and single branches',
				howBig: 'the larger doubt: a bare crown passes 0.3 to 0.6'
			}
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
	},
	{
		id: 'answers',
		title: 'Who takes whose light',
		words:
			'For every tracker the year is asked again with one neighbour away: what that gives back is what the neighbour takes. Which way to move is told from exact differences of the loss by a small step east and north. One day in seven is looked at.',
		sources: ['Loss with all minus loss without one; finite differences of 0.1 m'],
		neglected: [
			{
				what: 'Days between the ones that are looked at',
				howBig: 'within 0.01 points of every day; within 3 % of a loss where trees shed leaves'
			},
			{
				what: 'Shadows that overlap belong to nobody alone',
				howBig: 'removals need not add up to the loss: both are shown'
			},
			{
				what: 'Which way: a neighbour that crosses the plane of a grazed table is not clipped anew when it steps',
				howBig:
					'at most 1 in a million of the light, in 400 random fields, some with a table that stands still'
			}
		]
	}
] as const satisfies readonly Effect[];
