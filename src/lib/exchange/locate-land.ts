import { formatCoordinates, formatQuantity, windName } from '$lib/i18n';
import { MAX_REACH_M } from '$lib/schema/plot';
import { roughBearingDeg, roughDistanceM, type LonLat, type Origin } from './plan-projection';
import { refusal, type Refusal } from './read-text';

/** Nearer than this a boundary is believed to be the project's own, metres. */
const NEAR_M = 2_000;

export function isWithinReach(place: Origin, point: LonLat): boolean {
	return Math.abs(point[1]) <= 90 && distanceFrom(place, point) <= MAX_REACH_M;
}

export function swappedRefusal(found: string): Refusal {
	return refusal(
		'swapped',
		`${found} Latitude and longitude seem to be exchanged in this file.`,
		'Read it with the two numbers swapped, and look at the preview.'
	);
}

function distanceFrom(place: Origin, point: LonLat): number {
	return roughDistanceM([place.longitudeDeg, place.latitudeDeg], point);
}

/** Where the land lies against the project's place: near, exchanged, over the date line, or somewhere else. */
export function locateLand(
	rings: LonLat[][],
	place: Origin,
	swap: boolean
): { ok: true; question: string | null } | Refusal {
	let west = 180;
	let east = -180;
	let south = 90;
	let north = -90;
	for (const ring of rings) {
		for (const [lon, lat] of ring) {
			west = Math.min(west, lon);
			east = Math.max(east, lon);
			south = Math.min(south, lat);
			north = Math.max(north, lat);
		}
	}
	if (east - west > 180) {
		return refusal(
			'antimeridian',
			'The land lies across the 180° meridian, where longitudes jump from 180 to −180.',
			'Save the parts east and west of the meridian as two files and make a project for each.'
		);
	}
	const middle: LonLat = [(west + east) / 2, (south + north) / 2];
	const distanceM = distanceFrom(place, middle);
	if (distanceM <= MAX_REACH_M) {
		const far = distanceM > NEAR_M;
		const words = far ? `The middle of this land lies ${placeWords(place, middle, distanceM)}.` : '';
		return { ok: true, question: far ? `${words} Is it the land of this project?` : null };
	}
	const mirrored: LonLat = [middle[1], middle[0]];
	if (!swap && isWithinReach(place, mirrored)) {
		return swappedRefusal(`The land would lie ${placeWords(place, middle, distanceM)}.`);
	}
	return refusal(
		'far-away',
		`The land lies ${placeWords(place, middle, distanceM)}. Is this the right file, or the wrong place?`,
		`Choose another file, or set the project's place to ${formatCoordinates(middle[1], middle[0])} in the project's settings and bring the file in again.`
	);
}

function placeWords(place: Origin, point: LonLat, distanceM: number): string {
	const bearing = roughBearingDeg([place.longitudeDeg, place.latitudeDeg], point);
	return `${formatQuantity(distanceM / 1000, 'km', distanceM < 20_000 ? 1 : 0)} ${windName(bearing)} of the project's place`;
}
