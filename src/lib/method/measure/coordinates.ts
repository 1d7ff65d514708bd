/** Degrees and metres: UTM, the plan's own projection, lengths and areas. */
import proj4 from 'proj4';
import {
	boundaryPerimeterM,
	geographicFromUtm,
	metresPerDegree,
	ringAreaM2,
	utmFromGeographic,
	utmZoneOf,
	type PlanPoint,
	type UtmZone
} from '../../core';
import { localFromLonLat } from '../../exchange/plan-projection';
import { distances, single, within, type Check, type Extent, type Row } from '../check';
import { randomSource } from './random';

/** Latitude, longitude; zone, easting, northing, scale, convergence. */
const UTM: readonly (readonly [number, number, number, number, number, number, number])[] = [
	[40, -3.7, 30, 440247.949, 4427991.846, 0.999644, -0.44996],
	[45, 8, 32, 421184.697, 4983436.768, 0.9996764, -0.70714],
	[68, 20, 34, 458196.726, 7543202.547, 0.9996214, -0.9272],
	[-35, 149, 55, 682516.094, 6125129.365, 1.0000106, -1.14747],
	[0, -78.5, 17, 778276.317, 0, 1.0005587, 0]
];

function zoneOf(latitudeDeg: number, longitudeDeg: number): UtmZone {
	const zone = utmZoneOf(latitudeDeg, longitudeDeg);
	if (zone === null) throw new Error(`No zone at ${latitudeDeg} ${longitudeDeg}`);
	return zone;
}
const utmAt = (latitudeDeg: number, longitudeDeg: number) =>
	utmFromGeographic(latitudeDeg, longitudeDeg, zoneOf(latitudeDeg, longitudeDeg));

/** Every zone with its neighbours' ground: random places from 80 S to 84 N, up to 6 degrees off the zone's middle. */
function* projRows(extent: Extent): Generator<Row> {
	const random = randomSource(2011);
	const count = extent === 'whole' ? 6000 : 600;
	for (let k = 0; k < count; k++) {
		const zone = 1 + (k % 60);
		const latitudeDeg = -80 + 164 * random();
		const longitudeDeg = 6 * zone - 183 + 12 * (random() - 0.5);
		const hemisphere = latitudeDeg >= 0 ? 'north' : 'south';
		const theirs = proj4(`+proj=utm +zone=${zone}${hemisphere === 'south' ? ' +south' : ''} +ellps=WGS84`);
		const [east, north] = theirs.forward([longitudeDeg, latitudeDeg]);
		const at = `${latitudeDeg.toFixed(4)} ${longitudeDeg.toFixed(4)}, zone ${zone}`;
		const ours = utmFromGeographic(latitudeDeg, longitudeDeg, { zone, hemisphere });
		yield [`easting at ${at}`, ours.eastingM, east];
		yield [`northing at ${at}`, ours.northingM, north];
		// The way back, as metres on the ground.
		const back = geographicFromUtm({ zone, hemisphere }, east, north);
		const { northM, eastM } = metresPerDegree(latitudeDeg);
		const turn = ((back.longitudeDeg - longitudeDeg + 540) % 360) - 180;
		yield [`latitude back at ${at}`, (back.latitudeDeg - latitudeDeg) * northM, 0];
		yield [`longitude back at ${at}`, turn * eastM, 0];
	}
}

/** Convergence and scale against differences of the grid itself over a metre or so. */
function* turnRows(): Generator<Row> {
	const random = randomSource(1912);
	for (let k = 0; k < 200; k++) {
		const latitudeDeg = -75 + 150 * random();
		const longitudeDeg = -179 + 358 * random();
		const zone = zoneOf(latitudeDeg, longitudeDeg);
		const step = 1e-4;
		const a = utmFromGeographic(latitudeDeg - step, longitudeDeg, zone);
		const b = utmFromGeographic(latitudeDeg + step, longitudeDeg, zone);
		const middle = utmFromGeographic(latitudeDeg, longitudeDeg, zone);
		const east = b.eastingM - a.eastingM;
		const north = b.northingM - a.northingM;
		const at = `${latitudeDeg.toFixed(3)} ${longitudeDeg.toFixed(3)}`;
		const length = 2 * step * metresPerDegree(latitudeDeg).northM;
		// True north runs along this line, so its grid bearing is the convergence with its sign turned.
		yield [`convergence at ${at}`, middle.convergenceDeg, (-Math.atan2(east, north) * 180) / Math.PI];
		yield [`scale at ${at}`, middle.scale, Math.hypot(east, north) / length];
	}
}

/** Place, its zone, 0 for none. */
const ZONES: readonly (readonly [number, number, number])[] = [
	[60, 4, 32],
	[60, 2.9, 31],
	[55.9, 4, 31],
	[64, 4, 31],
	[78, 8, 31],
	[78, 10, 33],
	[78, 20.9, 33],
	[78, 22, 35],
	[78, 33, 37],
	[78, 42, 38],
	[71.9, 10, 32],
	[0, -180, 1],
	[0, 180, 1],
	[0, 179.9, 60],
	[40, -6, 30],
	[84, 15, 33],
	[84.1, 15, 0],
	[-80, 15, 33],
	[-80.1, 15, 0]
];

const DEGREES: readonly (readonly [number, number, number])[] = [
	[0, 110574.276, 111319.491],
	[23.4, 110749.637, 102217.957],
	[40, 111034.633, 85393.857],
	[45, 111131.777, 78846.835],
	[68, 111535.714, 41821.529]
];

/** 0.001 x 0.001 degrees at 40 N 3.7 W on the project's plan. */
function planSquare(): PlanPoint[] {
	const local = localFromLonLat({ latitudeDeg: 40, longitudeDeg: -3.7 });
	return [local(-3.7, 40), local(-3.699, 40), local(-3.699, 40.001), local(-3.7, 40.001)];
}

/** Length and bearing on the plan of the geodesic from its place to 40.01 N 3.69 W. */
function planInverse(): { lengthM: number; bearingDeg: number } {
	const [east, north] = localFromLonLat({ latitudeDeg: 40, longitudeDeg: -3.7 })(-3.69, 40.01);
	return { lengthM: Math.hypot(east, north), bearingDeg: (Math.atan2(east, north) * 180) / Math.PI };
}

export const coordinateChecks: Check[] = [
	{
		id: 'utm-metres',
		effect: 'coordinates',
		title: 'Easting and northing of five places',
		against: 'pyproj 3.4.1',
		source: 'Karney 2011 as computed by PROJ',
		provenance: 'library',
		unit: 'm',
		tolerance: within(0.001),
		measure: () =>
			distances(
				UTM.flatMap(([latitudeDeg, longitudeDeg, zone, east, north]): Row[] => {
					const point = utmAt(latitudeDeg, longitudeDeg);
					const at = `${latitudeDeg} ${longitudeDeg}`;
					return [
						[`zone at ${at}`, point.zone, zone],
						[`easting at ${at}`, point.eastingM, east],
						[`northing at ${at}`, point.northingM, north]
					];
				})
			)
	},
	{
		id: 'utm-turn',
		effect: 'coordinates',
		title: 'Convergence of the same places',
		against: 'pyproj 3.4.1',
		source: 'Karney 2011 as computed by PROJ',
		provenance: 'library',
		unit: '°',
		tolerance: within(1e-5),
		measure: () =>
			distances(
				UTM.map(([latitudeDeg, longitudeDeg, , , , , convergence]): Row => [
					`${latitudeDeg} ${longitudeDeg}`,
					utmAt(latitudeDeg, longitudeDeg).convergenceDeg,
					convergence
				])
			)
	},
	{
		id: 'utm-scale',
		effect: 'coordinates',
		title: 'Scale of the same places',
		against: 'pyproj 3.4.1',
		source: 'Karney 2011 as computed by PROJ',
		provenance: 'library',
		unit: '',
		tolerance: within(1e-7),
		measure: () =>
			distances(
				UTM.map(([latitudeDeg, longitudeDeg, , , , scale]): Row => [
					`${latitudeDeg} ${longitudeDeg}`,
					utmAt(latitudeDeg, longitudeDeg).scale,
					scale
				])
			)
	},
	{
		id: 'utm-proj4',
		effect: 'coordinates',
		title: 'Random places in all sixty zones, forward and back',
		against: 'proj4 (seed 2011)',
		source: 'proj4 2.22',
		provenance: 'library',
		unit: 'm',
		tolerance: within(0.001, 0.0001),
		measure: (extent) => distances(projRows(extent))
	},
	{
		id: 'utm-differences',
		effect: 'coordinates',
		title: 'Convergence (degrees) and scale of 200 random places',
		against: 'differences of the grid over some 20 m (seed 1912)',
		source: 'Definition of both',
		provenance: 'formula',
		unit: '',
		tolerance: within(1e-7),
		measure: () => distances(turnRows())
	},
	{
		id: 'utm-zones',
		effect: 'coordinates',
		title: 'Zones, with those of Norway and Svalbard and both ends',
		against: 'the definition of the grid',
		source: 'Defense Mapping Agency 1989, TM 8358.2 (from memory)',
		provenance: 'memory',
		unit: '',
		tolerance: within(0),
		measure: () =>
			distances(
				ZONES.map(([latitudeDeg, longitudeDeg, zone]): Row => [
					`${latitudeDeg} ${longitudeDeg}`,
					utmZoneOf(latitudeDeg, longitudeDeg)?.zone ?? 0,
					zone
				])
			)
	},
	{
		id: 'metres-per-degree',
		effect: 'coordinates',
		title: 'Metres in a degree at five latitudes',
		against: 'radii of curvature of the ellipsoid',
		source: 'WGS84, M and N',
		provenance: 'formula',
		unit: 'm',
		tolerance: within(0.001),
		measure: () =>
			distances(
				DEGREES.flatMap(([latitudeDeg, north, east]): Row[] => [
					[`latitude at ${latitudeDeg}°`, metresPerDegree(latitudeDeg).northM, north],
					[`longitude at ${latitudeDeg}°`, metresPerDegree(latitudeDeg).eastM, east]
				])
			)
	},
	{
		id: 'plan-area',
		effect: 'coordinates',
		title: 'Area of 0.001° x 0.001° on the plan',
		against: 'geodesic area, 9481.607 m²',
		source: 'Geodesic library on WGS84',
		provenance: 'library',
		unit: 'm²',
		tolerance: single(0.001),
		measure: () => distances([['40 N 3.7 W', ringAreaM2(planSquare()), 9481.607]])
	},
	{
		id: 'plan-lengths',
		effect: 'coordinates',
		title: 'Its perimeter, and the way from 40 N 3.7 W to 40.01 N 3.69 W',
		against: 'geodesics, 392.856 and 1400.705 m',
		source: 'Geodesic library on WGS84',
		provenance: 'library',
		unit: 'm',
		tolerance: within(0.001),
		measure: () =>
			distances([
				['perimeter', boundaryPerimeterM([{ outer: planSquare(), holes: [] }]), 392.856],
				['way', planInverse().lengthM, 1400.705]
			])
	},
	{
		id: 'plan-bearing',
		effect: 'coordinates',
		title: 'Bearing of that way',
		against: '37.5577°',
		source: 'Geodesic library on WGS84',
		provenance: 'library',
		unit: '°',
		tolerance: single(0.002),
		measure: () => distances([['way', planInverse().bearingDeg, 37.5577]])
	}
];
