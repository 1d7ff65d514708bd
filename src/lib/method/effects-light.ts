import type { Effect } from './effect';

export const lightEffects = [
	{
		id: 'outside-air',
		title: 'Light above the air',
		words:
			'The solar constant over the squared distance of the sun. Where only a day of the year is known, a short series stands in for the true sun; it never serves to throw a shadow.',
		sources: [
			'1361 W/m²: Kopp and Lean 2011 (from memory)',
			'Series: Spencer 1971, as corrected',
			'Daily and hourly sums: Duffie and Beckman, eqs. 1.10.3 and 1.10.4'
		],
		neglected: [{ what: 'The sun’s own change over its cycle', howBig: '0.1 %' }]
	},
	{
		id: 'clear-sky',
		title: 'Clear sky',
		words:
			'What a sky without clouds sends, when no weather is given. The pages’ loss runs use a beam that hangs on air mass and altitude alone; energy runs use a sky whose haze is given month by month as Linke turbidity.',
		sources: [
			'Meinel and Meinel 1976; Laue 1970',
			'Ineichen and Perez 2002',
			'Air mass: Kasten and Young 1989',
			'Beside them: Haurwitz 1945, Hottel 1976, ASHRAE 2005'
		],
		neglected: [
			{ what: 'Haze of the single day', howBig: 'the beam of clear days differs by 10 % and more' },
			{ what: 'Factor exp(0.01 AM^1.8) of some copies of the haze model', howBig: '1 to 4 % at a high sun' }
		]
	},
	{
		id: 'average-year',
		title: 'A year from monthly sums',
		words:
			'Twelve sums of light on level ground become an average year: the diffuse part of each month from its clearness, then both spread over the hours of a mean day and brought back to the sums exactly.',
		sources: [
			'Erbs, Klein and Duffie 1982; Orgill and Hollands 1977',
			'Collares-Pereira and Rabl 1979; Liu and Jordan 1960'
		],
		neglected: [
			{
				what: 'Clear and dull days are averaged away',
				howBig: 'shade loss in percent of beam is hardly touched; peaks are'
			}
		]
	},
	{
		id: 'transposition',
		title: 'Light on a tilted table',
		words:
			'Beam by the cosine of incidence, the sky in three parts (about the sun, even, at the horizon), and what the ground sends back. The part about the sun is shaded as the beam is; the even part by the sky that neighbours leave.',
		sources: [
			'Perez et al. 1990, Solar Energy 44:271, all-sites composite',
			'Hay and Davies 1980; Reindl, Beckman and Duffie 1990; Liu and Jordan 1960'
		],
		neglected: [
			{
				what: 'Choice of sky model',
				howBig: '6 % of a two-axis year between an even sky and Hay and Davies at Golden'
			},
			{
				what: 'Reflection off the glass',
				howBig: 'nothing on tables that look at the sun; up to 3 % of the even sky'
			}
		]
	},
	{
		id: 'strings',
		title: 'Electrical effect of shade',
		words:
			'A little shade takes more power than light, because cells hang on one another. The loss is found from the shaded share and from how many protected groups of cells are touched. It applies to beam and circumsolar light, and is given with its bounds.',
		sources: [
			'Martinez-Moreno, Muñoz and Lorenzo 2010, Solar Energy Materials and Solar Cells 94:2298, eq. 6'
		],
		neglected: [
			{
				what: 'Characteristic of the converter and of the single module',
				howBig: 'unknown: the truth lies between the shaded share and all'
			}
		]
	},
	{
		id: 'weather',
		title: 'Weather files',
		words:
			'Hours of a typical year are read with their missing values, and the sun is taken in the middle of each. Global light must equal diffuse plus beam on level ground: that closure shows at once when hours, time zone or place are read wrongly.',
		sources: ['EPW: EnergyPlus data dictionary; TMY3: Wilcox and Marion 2008'],
		neglected: [
			{
				what: 'Change of sun within an hour',
				howBig: 'closure of 0.5 W/m² in the mean square on the real file'
			}
		]
	},
	{
		id: 'sky-view',
		title: 'Sky that neighbours leave',
		words:
			'The even light of the sky reaches a table from all of it. From 96 directions the exact shaded share is asked as if the sun stood there, and summed with the cosine of incidence; the answer is kept for a net of suns and read between.',
		sources: [
			'Nodes of Gauss and Legendre in height, even in azimuth',
			'Crossed strings: Hottel 1954 (from memory)'
		],
		neglected: [
			{
				what: 'Sum over directions and reading between suns',
				howBig:
					'5 % of the sky that is lost, or 0.5 % of the sky where that is more: 0.03 points of a clear year'
			},
			{ what: 'What dark glass in between shines back', howBig: 'some percent of what it covers' }
		]
	},
	{
		id: 'energy-year',
		title: 'Energy over a year',
		words:
			'Beam by lit share and incidence, light about the sun shaded as the beam, even light by the sky that is left, and light from the ground, step by step from a clear sky, monthly sums or a weather file. Losses to shade, to covered sky and to strings are told apart, as ranges with their reasons.',
		sources: [
			'Sum of the effects above',
			'Range of the string effect: from the shaded area to the worst wiring'
		],
		neglected: [
			{
				what: 'Shade of the tables on the ground that they look at',
				howBig: 'up to the light from the ground itself: some percent at albedo 0.2'
			},
			{ what: 'Everything behind the glass but the strings', howBig: 'see What is not modelled' }
		]
	}
] as const satisfies readonly Effect[];
