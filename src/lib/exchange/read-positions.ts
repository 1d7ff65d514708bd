import { formatNumber } from '$lib/i18n';
import { MAX_BOUNDARY_CORNERS } from '$lib/schema/plot';
import type { RawAreas } from './geojson-areas';
import { isWithinReach, swappedRefusal } from './locate-land';
import type { LonLat, Origin } from './plan-projection';
import { refusal, type Refusal } from './read-text';

/** The count comes before any look at the numbers: a file of 100,000 corners is refused without working through it. */
export function refuseCornerCount(found: RawAreas): Refusal | null {
	let corners = 0;
	for (const area of found.areas) {
		for (const ring of area.rings) if (Array.isArray(ring)) corners += openLength(ring);
	}
	if (corners <= MAX_BOUNDARY_CORNERS) return null;
	return refusal(
		'too-many-corners',
		`The file has ${formatNumber(corners)} corners; at most ${formatNumber(MAX_BOUNDARY_CORNERS)} are taken.`,
		'Simplify the outline in the program it comes from (a tolerance of 0.1 m keeps the shape) and save only the areas that you need.'
	);
}

/** Corners of a ring, the repeated last one not counted. */
function openLength(ring: unknown[]): number {
	const first: unknown = ring[0];
	const last: unknown = ring.at(-1);
	const closed =
		ring.length > 1 &&
		Array.isArray(first) &&
		Array.isArray(last) &&
		first[0] === last[0] &&
		first[1] === last[1];
	return closed ? ring.length - 1 : ring.length;
}

export interface LonLatArea {
	name: string | null;
	rings: LonLat[][];
}

/** Every position as two finite numbers in range, or the first that is not, by name. */
export function readPositions(
	found: RawAreas,
	place: Origin,
	swap: boolean
): { ok: true; areas: LonLatArea[] } | Refusal {
	const areas: LonLatArea[] = [];
	for (const [index, area] of found.areas.entries()) {
		const rings: LonLat[][] = [];
		for (const [ringIndex, ring] of area.rings.entries()) {
			const where = ringName(found.areas, index, ringIndex);
			if (!Array.isArray(ring)) {
				return refusal('malformed', `${where} is not a list of corners.`, 'Save it again as GeoJSON.');
			}
			const corners: LonLat[] = [];
			for (const [cornerIndex, position] of ring.entries()) {
				const corner = readPosition(position, swap);
				if (!corner) {
					return refusal(
						'not-a-number',
						`${where}, corner ${cornerIndex + 1}: the coordinates are ${JSON.stringify(position)?.slice(0, 60) ?? 'missing'}, not two numbers.`,
						'Give that corner its longitude and latitude, or take it out, and choose the file again.'
					);
				}
				const outside = refuseOutOfRange(corner, `${where}, corner ${cornerIndex + 1}`, found, place);
				if (outside) return outside;
				corners.push(corner);
			}
			rings.push(corners);
		}
		areas.push({ name: area.name, rings });
	}
	return { ok: true, areas };
}

function readPosition(position: unknown, swap: boolean): LonLat | null {
	if (!Array.isArray(position) || position.length < 2) return null;
	const [first, second]: unknown[] = position;
	if (typeof first !== 'number' || typeof second !== 'number') return null;
	if (!Number.isFinite(first) || !Number.isFinite(second)) return null;
	return swap ? [second, first] : [first, second];
}

function refuseOutOfRange([lon, lat]: LonLat, where: string, found: RawAreas, place: Origin): Refusal | null {
	if (Math.abs(lon) <= 180 && Math.abs(lat) <= 90) return null;
	if (Math.abs(lat) <= 180 && isWithinReach(place, [lat, lon])) {
		return swappedRefusal(`${where} has the latitude ${formatNumber(lat, 4)}°, which does not exist.`);
	}
	const grid = Math.abs(lon) > 1000 || Math.abs(lat) > 1000;
	return refusal(
		'out-of-range',
		`${where} is at ${formatNumber(lon, 2)}, ${formatNumber(lat, 2)}: these are not degrees of longitude and latitude${grid ? ' but look like metres of a survey grid' : ''}${found.crs ? ` (the file names the coordinate system ${found.crs})` : ''}.`,
		'Save the boundary again in WGS84 longitude and latitude (EPSG:4326), as GeoJSON asks for.'
	);
}

export function ringName(areas: { name: string | null }[], index: number, ringIndex: number): string {
	const area = areas.length === 1 ? 'The outline' : areaName(areas[index].name, index);
	return ringIndex === 0 ? area : `${area}, hole ${ringIndex}`;
}

export function areaName(name: string | null, index: number): string {
	return name ?? `Area ${index + 1}`;
}
