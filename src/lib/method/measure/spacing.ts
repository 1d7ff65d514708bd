/** How far a shadow reaches: distances without shade, read from the shares that the core gives. */
import { mountScene, sunOfHourAngle, type SunDirection } from '../../core';
import { distances, single, within, type Check, type Row } from '../check';
import { pairShare } from './shade';

/** So wide, in heights, that the sides of the shadow never matter. */
const WIDE = 1e6;
const SOLSTICE_DEG = -23.44;

/**
 * Distance without shade between two wide tables of one tilt, the sunward one standing towards `facingDeg`. The share
 * falls evenly with the distance, so one share at a tenth of the height tells where it ends.
 */
function clearPitchM(heightM: number, tiltDeg: number, facingDeg: number, sun: SunDirection): number {
	const turn = (facingDeg * Math.PI) / 180;
	const at = heightM / 10;
	const offset = [at * Math.sin(turn), at * Math.cos(turn), 0];
	return at / (1 - pairShare(offset, WIDE * heightM, heightM, sun, { azimuthDeg: facingDeg, tiltDeg }));
}

const noon = (latitudeDeg: number): SunDirection => sunOfHourAngle(latitudeDeg, SOLSTICE_DEG, 0);
const NOON_PITCH: readonly (readonly [number, number])[] = [
	[0, 0.434],
	[20, 0.947],
	[30, 1.348],
	[35, 1.628],
	[40, 2.0],
	[45, 2.531],
	[50, 3.363],
	[55, 4.889],
	[60, 8.696]
];

/** Latitude; elevation, azimuth of the sun at 9 h and 15 h; shadow over height, its north-south and east-west parts. */
const NINE: readonly (readonly [number, number, number, number, number, number])[] = [
	[30, 21.28, 135.87, 2.567, 1.843, 1.787],
	[40, 13.96, 138.05, 4.022, 2.991, 2.689],
	[45, 10.22, 138.76, 5.546, 4.17, 3.656],
	[50, 6.45, 139.24, 8.849, 6.703, 5.778]
];

function* nineSun(): Generator<Row> {
	for (const [latitudeDeg, elevationDeg, azimuthDeg] of NINE) {
		for (const side of [-1, 1]) {
			const sun = sunOfHourAngle(latitudeDeg, SOLSTICE_DEG, side * 45);
			yield [`elevation at ${latitudeDeg}°`, sun.elevationDeg, elevationDeg];
			yield [`azimuth at ${latitudeDeg}°`, 180 - Math.abs(sun.azimuthDeg - 180), azimuthDeg];
		}
	}
	yield ['below the horizon at 60°', Number(sunOfHourAngle(60, SOLSTICE_DEG, 45).elevationDeg < 0), 1];
}

function* nineShadow(): Generator<Row> {
	for (const [latitudeDeg, , , along, northSouth, eastWest] of NINE) {
		const sun = sunOfHourAngle(latitudeDeg, SOLSTICE_DEG, -45);
		yield [`along the sun at ${latitudeDeg}°`, clearPitchM(1, 90, sun.azimuthDeg, sun), along];
		yield [`north-south at ${latitudeDeg}°`, clearPitchM(1, 90, 180, sun), northSouth];
		yield [`east-west at ${latitudeDeg}°`, clearPitchM(1, 90, 90, sun), eastWest];
	}
}

const NOTE_SUN: SunDirection = { azimuthDeg: 180 - 41, elevationDeg: 26 };
const workedMillimetres = (): Row[] => [
	['D′', clearPitchM(2460, 90, NOTE_SUN.azimuthDeg, NOTE_SUN), 5043.7],
	['D', clearPitchM(2460, 90, 180, NOTE_SUN), 3806.6]
];
const workedInches = (): Row[] => {
	const sun = { azimuthDeg: 135, elevationDeg: 25 };
	return [
		['along the sun', clearPitchM(96, 90, 135, sun), 206],
		['north-south', clearPitchM(96, 90, 180, sun), 146]
	];
};
const tilted = (): Row[] => {
	const height = 1.956 * Math.sin((25 * Math.PI) / 180);
	return [
		['azimuth 142, elevation 28', clearPitchM(height, 90, 180, { azimuthDeg: 142, elevationDeg: 28 }), 1.225],
		['azimuth 230, elevation 16', clearPitchM(height, 90, 180, { azimuthDeg: 230, elevationDeg: 16 }), 1.853]
	];
};

/** Height of the sun at which a point `downM` below the top edge comes clear of a neighbour, by halving. */
function clearAboveDeg(heightM: number, downM: number, distanceM: number, raisedM: number): number {
	let low = 0.001;
	let high = 89;
	for (let k = 0; k < 50; k++) {
		const elevationDeg = (low + high) / 2;
		const pose = { azimuthDeg: 180, tiltDeg: 90 - elevationDeg };
		const [{ top }] = mountScene({
			tables: [
				{ id: 'a', eastM: 0, northM: 0, upM: 0, widthM: 10, heightM },
				{ id: 'b', eastM: 0, northM: -distanceM, upM: raisedM, widthM: 10, heightM }
			],
			target: 'a',
			obstacles: [],
			points: { count: 1, insetM: downM, forwardM: 1e-6, edges: ['top'] },
			steps: [{ sun: { azimuthDeg: 180, elevationDeg }, poses: [pose, pose] }]
		});
		if (top === '1') low = elevationDeg;
		else high = elevationDeg;
	}
	return (low + high) / 2;
}

function* sensorRows(): Generator<Row> {
	for (const [distanceM, p, expected] of [
		[25, 0.5, 1.146],
		[25, 3, 6.8921],
		[25, 6, 13.8865],
		[18, 0.5, 1.5918],
		[18, 3, 9.5941],
		[18, 6, 19.4712]
	]) {
		// A table a little taller than asked, so that the lowest point stays on its glass.
		yield [`${p} m down, ${distanceM} m away`, clearAboveDeg(6.2, p, distanceM, 0), expected];
	}
	for (const [raisedM, distanceM, expected] of [
		[0.5, 25, 1.1458],
		[1, 25, 2.2906],
		[2, 20, 5.7106]
	]) {
		yield [`top edge, neighbour ${raisedM} m higher`, clearAboveDeg(6, 0, distanceM, raisedM), expected];
	}
}

export const spacingChecks: Check[] = [
	{
		id: 'spacing-solstice-noon',
		effect: 'spacing',
		title: 'No-shade pitch at winter-solstice noon, per metre of height, 0° to 60°',
		against: 'h / tan(66.56° - latitude)',
		source: 'Geometry at declination -23.44°',
		provenance: 'formula',
		unit: 'm',
		tolerance: within(0.0006),
		measure: () =>
			distances(
				NOON_PITCH.map(([latitudeDeg, pitch]): Row => [
					`${latitudeDeg}°`,
					clearPitchM(1, 90, 180, noon(latitudeDeg)),
					pitch
				])
			)
	},
	{
		id: 'spacing-nine-sun',
		effect: 'spacing',
		title: 'Sun at 9 h and 15 h of the winter solstice',
		against: 'spherical triangle at 30°, 40°, 45°, 50°, and none at 60°',
		source: 'Geometry at declination -23.44°',
		provenance: 'formula',
		unit: '°',
		tolerance: within(0.0051, 0.003),
		measure: () => distances(nineSun())
	},
	{
		id: 'spacing-nine-shadow',
		effect: 'spacing',
		title: 'Shadow over height at 9 h, whole and by its two parts',
		against: 'cot e and its parts along the compass',
		source: 'Geometry at declination -23.44°',
		provenance: 'formula',
		unit: 'm',
		tolerance: within(0.0006),
		measure: () => distances(nineShadow())
	},
	{
		id: 'spacing-note-millimetres',
		effect: 'spacing',
		title: 'Worked example: 2460 mm, sun at 26°, 41° off south',
		against: "the note's 5043.7 and 3806.6 mm",
		source: 'Public note on row spacing',
		provenance: 'published',
		unit: 'mm',
		tolerance: within(0.1),
		measure: () => distances(workedMillimetres())
	},
	{
		id: 'spacing-note-feet',
		effect: 'spacing',
		title: 'Worked example: 10 ft, sun at 13°',
		against: '43.3 ft',
		source: 'Questions and answers of a trade magazine, 2008',
		provenance: 'published',
		unit: 'ft',
		tolerance: single(0.05),
		measure: () =>
			distances([['10 ft', clearPitchM(10, 90, 180, { azimuthDeg: 180, elevationDeg: 13 }), 43.3]])
	},
	{
		id: 'spacing-note-inches',
		effect: 'spacing',
		title: 'Worked example: 96 in, sun at 25°, 45° off south',
		against: '206 and 146 in',
		source: 'Public note on row spacing',
		provenance: 'published',
		unit: 'in',
		tolerance: within(0.5, 0.3),
		measure: () => distances(workedInches())
	},
	{
		id: 'spacing-note-tilted',
		effect: 'spacing',
		title: 'Worked example: 1.956 m at 25°, two suns',
		against: '1.225 and 1.853 m; the note prints 1.23 and, by a slip, 1.83',
		source: 'Public note on row spacing',
		provenance: 'formula',
		unit: 'm',
		tolerance: within(0.0006),
		measure: () => distances(tilted())
	},
	{
		id: 'spacing-half-noon',
		effect: 'spacing',
		title: 'Rule of half the noon height: X = L (cos b + sin b / tan e), 33°',
		against: '2.651',
		source: 'Note of a state solar centre; formula read, value worked out',
		provenance: 'formula',
		unit: 'm',
		tolerance: single(0.0006),
		measure: () => {
			const sun = { azimuthDeg: 180, elevationDeg: 90 - (33 + 23.5 + 16.775) };
			return distances([['L 1 m, b 33°', clearPitchM(1, 33, 180, sun), 2.651]]);
		}
	},
	{
		id: 'spacing-followers',
		effect: 'spacing',
		title: 'Distance without shade of tables square to the sun: H / sin e',
		against: '13.42 m for H = 6 m at 26.56°',
		source: 'Geometry: L (cos B + sin B / tan e) with B = 90° - e',
		provenance: 'formula',
		unit: 'm',
		tolerance: single(0.005),
		measure: () => {
			const sun = { azimuthDeg: 180, elevationDeg: 26.56 };
			return distances([['H 6 m', clearPitchM(6, 90 - 26.56, 180, sun), 13.42]]);
		}
	},
	{
		id: 'spacing-sensor-clear',
		effect: 'mounts',
		title: 'Sun height at which a point of the table comes clear of a neighbour',
		against: 'asin(p / D) below the top edge; atan(dz / D) with a raised neighbour',
		source: 'Geometry, verified by a 3-D ray cast',
		provenance: 'formula',
		unit: '°',
		tolerance: within(0.0001),
		measure: () => distances(sensorRows())
	}
];
