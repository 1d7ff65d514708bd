import type { Effect } from './effect';

export const sunEffects = [
	{
		id: 'sun',
		title: 'Sun position',
		words:
			'Where the sun stands at a moment, seen from the plot. The earth’s path is summed from its series, then nutation, aberration, the turn of the earth and the parallax are put on. Year runs sum the series once an hour and read between.',
		sources: [
			'VSOP87, Bretagnon and Francou 1988, as shortened by Reda and Andreas 2003 (NREL/TP-560-34302, table A4.2) and Meeus, Astronomical Algorithms',
			'Nutation: Meeus, chapter 22, the short form'
		],
		neglected: [
			{ what: 'Terms of the series below 10⁻⁶ radian', howBig: 'together less than 2 arcsec, 0.0006°' },
			{ what: 'UT1 is taken as UTC', howBig: 'at most 0.9 s of time, 0.004°' },
			{ what: 'Height of the place above the sea', howBig: 'less than 0.000002°' }
		]
	},
	{
		id: 'refraction',
		title: 'Refraction',
		words:
			'The air lifts the sun. Shade, aim and sensors all take the apparent sun, because beam and eye both see it there. The air is that of 1010 mbar and 10 °C.',
		sources: ['Saemundsson 1986 (Meeus, Astronomical Algorithms, eq. 16.4)'],
		neglected: [
			{
				what: 'Pressure and temperature of the day',
				howBig: 'a fifth of the refraction at 2,000 m: 0.02° at 5° of height, 0.1° at the horizon'
			}
		]
	},
	{
		id: 'sun-day',
		title: 'Rise, noon and set',
		words:
			'First and last light are the moments when the sun’s upper limb touches a flat horizon. Polar day and polar night have their own answer: there is then no rise and no set, and none is invented.',
		sources: ['Almanac convention: 34 arcmin of refraction and the sun’s true half-width'],
		neglected: [{ what: 'Air of the day at the horizon', howBig: 'some seconds, in frost up to a minute' }]
	},
	{
		id: 'frame',
		title: 'Frame and angles',
		words:
			'Metres east, north and up at the project’s place, aligned to true north. Azimuths run clockwise from north, tilt 0 lies flat with the glass up. A table has the axes u to the right of someone who faces it, v up its slope, n out of the glass.',
		sources: ['Conventions of this project; bearings are those of the trade'],
		neglected: [
			{ what: 'Curvature of the earth inside a plot', howBig: '0.08 m at 1 km, 0.005° of height' },
			{
				what: 'Light comes from one point, not from a disc of 0.53°',
				howBig:
					'the edge of a shadow is blurred over 0.0093 of its distance: 0.23 m at 25 m, with no change of its mean'
			}
		]
	}
] as const satisfies readonly Effect[];
