import type { Neglected } from './effect';

/** What no figure of the application contains, and what it can amount to. Sizes are common practice, no source. */
export const notModelled: readonly Neglected[] = [
	{
		what: 'Dirt and snow on the glass',
		howBig: 'dirt 1 to 5 % of a year; snow whatever lies and for as long as it lies'
	},
	{
		what: 'Temperature and spectrum, mismatch, cables, converters, transformers',
		howBig: '10 to 20 % of a year together, nearly alike for every tracker of a field'
	},
	{
		what: 'Reflection on the glass',
		howBig: 'none on a table that looks at the sun, some percent of slanting light'
	},
	{
		what: 'Bending of tables and poles in the wind, play in the gears',
		howBig: 'up to a degree: 0.015 % of beam, but a shadow edge moved by 0.4 m at 25 m'
	},
	{
		what: 'Shadows of poles, beams and cables of the trackers themselves',
		howBig: 'about 1 % of what a table throws'
	},
	{
		what: 'Light mirrored or scattered by neighbours, walls and roofs',
		howBig: 'a few W/m², a gain that is not counted'
	},
	{
		what: 'Shape of single trees, wind in leaves, snow on branches',
		howBig: 'crowns are simple bodies with one transmission by season'
	},
	{ what: 'Fog, smoke and haze that stand on the plot alone', howBig: 'the weather of the file, or none' },
	{
		what: 'The blurred edge of a shadow, where light is counted',
		howBig: 'its mean is exact; cells in half shade count as lit or shaded by area'
	},
	{
		what: 'Ground outside the measured outline, also under a tracker that stands there',
		howBig: 'held at the height of the edge and hides no sun: enter what rises there as skyline'
	},
	{ what: 'Errors of the survey', howBig: 'usually the largest of all: 0.3 m of height is 0.7° at 25 m' },
	{ what: 'Any maker’s controller', howBig: 'behaviour is asked for; what is not asked is not known' }
];
