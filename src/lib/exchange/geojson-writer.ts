import { buildingRing, wallLine, type Obstacle, type Place, type PlanPoint, type Plot } from '../core';
import type { PegRow } from '../schema/peg-row';
import { lonLatFromLocal } from './plan-projection';

export interface PlanNames {
	project: string;
	layout: string;
	layoutRevision: number;
	revision: string;
	/** ISO 8601, UTC. */
	issuedAt: string;
}

type Position = [number, number];

/**
 * Boundary, obstacles and trackers as GeoJSON after RFC 7946: WGS84 longitude and latitude with 7 decimals, outer rings
 * counter-clockwise, holes clockwise, first position repeated at the end. Lengths among the properties are metres and
 * say so in their names. Levels are above the project's height datum and so stay properties.
 */
export function writeGeoJson(place: Place, plot: Plot, rows: PegRow[], names: PlanNames): string {
	const toLonLat = lonLatFromLocal(place);
	const at = (eastM: number, northM: number): Position => {
		const [longitudeDeg, latitudeDeg] = toLonLat(eastM, northM);
		return [sevenDecimals(longitudeDeg), sevenDecimals(latitudeDeg)];
	};
	const ring = (points: PlanPoint[], counterClockwise: boolean): Position[] => {
		const turned = signedArea(points) > 0 === counterClockwise ? points : [...points].reverse();
		const positions = turned.map(([e, n]) => at(e, n));
		return [...positions, positions[0]];
	};
	const features: object[] = [];
	if (plot.boundary.length > 0) {
		features.push({
			type: 'Feature',
			id: 'boundary',
			geometry: {
				type: 'MultiPolygon',
				coordinates: plot.boundary.map((part) => [
					ring(part.outer, true),
					...part.holes.map((hole) => ring(hole, false))
				])
			},
			properties: { kind: 'boundary', setBackM: plot.setBackM }
		});
	}
	for (const obstacle of plot.obstacles) {
		features.push({
			type: 'Feature',
			id: `obstacle-${obstacle.id}`,
			...obstacleFeature(obstacle, at, ring)
		});
	}
	for (const row of rows) {
		features.push({
			type: 'Feature',
			id: `tracker-${row.trackerId}`,
			geometry: { type: 'Point', coordinates: at(row.eastM, row.northM) },
			properties: {
				kind: 'tracker',
				number: row.number,
				tag: row.tag,
				eastM: millimetre(row.eastM),
				northM: millimetre(row.northM),
				groundLevelM: millimetre(row.groundM),
				axisHeightAboveGroundM: millimetre(row.axisHeightM),
				axisLevelM: millimetre(row.axisLevelM),
				reachRadiusM: millimetre(row.reachM),
				trackerModel: row.modelName,
				stopEastSideDeg: row.stops?.fromDeg ?? null,
				stopWestSideDeg: row.stops?.toDeg ?? null,
				mount: row.mount ? { ...row.mount, seen: 'facing the glass' } : null,
				ownMount: row.ownMount
			}
		});
	}
	return `${JSON.stringify({
		type: 'FeatureCollection',
		name: `${names.project}, revision ${names.revision}`,
		project: names.project,
		layout: names.layout,
		layoutRevision: names.layoutRevision,
		revision: names.revision,
		issuedAt: names.issuedAt,
		about:
			'Issued plan. Local grid: metres east and north of the origin, north is true north there. Degrees are WGS84.',
		origin: { latitudeDeg: place.latitudeDeg, longitudeDeg: place.longitudeDeg, altitudeM: place.altitudeM },
		features
	})}\n`;
}

const sevenDecimals = (degrees: number) => Math.round(degrees * 1e7) / 1e7 + 0;
const millimetre = (metres: number) => Math.round(metres * 1000) / 1000 + 0;

function signedArea(points: PlanPoint[]): number {
	return points.reduce((sum, [x, y], i) => {
		const [nextX, nextY] = points[(i + 1) % points.length];
		return sum + x * nextY - nextX * y;
	}, 0);
}

/** Geometry and properties of an obstacle: footprints as polygons, walls as lines, everything else as its middle. */
function obstacleFeature(
	obstacle: Obstacle,
	at: (eastM: number, northM: number) => Position,
	ring: (points: PlanPoint[], counterClockwise: boolean) => Position[]
) {
	switch (obstacle.kind) {
		case 'building': {
			const { corners: _corners, ...properties } = obstacle;
			return { geometry: { type: 'Polygon', coordinates: [ring(buildingRing(obstacle), true)] }, properties };
		}
		case 'wall': {
			const { line: _line, ...properties } = obstacle;
			const coordinates = wallLine(obstacle).map(([e, n]) => at(e, n));
			return { geometry: { type: 'LineString', coordinates }, properties };
		}
		default:
			return {
				geometry: { type: 'Point', coordinates: at(obstacle.eastM, obstacle.northM) },
				properties: { ...obstacle, kind: obstacle.kind === 'box' ? 'block' : obstacle.kind }
			};
	}
}
