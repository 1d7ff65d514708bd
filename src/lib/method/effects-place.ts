import type { Effect } from './effect';

export const placeEffects = [
	{
		id: 'ground',
		title: 'Ground and skylines',
		words:
			'Ground is level, a slope, or measured: triangles between points or cells of a raster. Each tracker stands on it with its foot. Measured ground near a tracker makes a skyline of its own, every 3 degrees of bearing; the far skyline is the one that was entered.',
		sources: ['Triangulation of Delaunay 1934', 'Bilinear interpolation inside a cell'],
		neglected: [
			{ what: 'Near skyline between its bearings', howBig: 'up to half a degree on strongly rolling ground' },
			{
				what: 'A table counts as hidden by ground or not with its middle',
				howBig: 'minutes a day on steep land'
			},
			{
				what: 'Ground beyond the measured outline is held at the height of its edge and hides no sun',
				howBig: 'all of a slope that was not measured: measure beyond the field, or enter it as skyline'
			},
			{ what: 'Curvature and refraction along the ground', howBig: '0.002° at 500 m' }
		]
	},
	{
		id: 'coordinates',
		title: 'Degrees and metres',
		words:
			'The plan is a transverse Mercator projection about the project’s place, true to scale there. UTM eastings and northings are summed from the series of Krueger, with the convergence that turns a grid bearing into a true one.',
		sources: [
			'Krueger 1912, to the sixth power of n as Karney 2011, J. Geodesy 85:475, eqs. 35 and 36',
			'WGS84; zones of TM 8358.2 (from memory)'
		],
		neglected: [
			{ what: 'Scale of the plan away from its place', howBig: '1.2 × 10⁻⁸ at 1 km, 5 × 10⁻⁶ at 20 km' },
			{ what: 'Seventh power of n', howBig: 'some nanometres' }
		]
	}
] as const satisfies readonly Effect[];
