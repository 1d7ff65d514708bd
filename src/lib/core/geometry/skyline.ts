import { normaliseDeg } from '../conventions';
import type { SkylinePoint } from '../document';

/** A skyline ready for many look-ups; sorted by azimuth whatever order it came in. */
export interface PreparedSkyline {
	azimuths: Float64Array;
	elevations: Float64Array;
}

export function prepareSkyline(points: readonly SkylinePoint[]): PreparedSkyline {
	const sorted = points
		// A list that closes itself at 360 keeps that end apart from its beginning at 0.
		.map((p) => ({
			azimuth: p.azimuthDeg === 360 ? 360 : normaliseDeg(p.azimuthDeg),
			elevation: p.elevationDeg
		}))
		.sort((a, b) => a.azimuth - b.azimuth);
	return {
		azimuths: Float64Array.from(sorted, (p) => p.azimuth),
		elevations: Float64Array.from(sorted, (p) => p.elevation)
	};
}

/** Height of the skyline at an azimuth, degrees: linear between points, wrapped at 360; -90 where there is none. */
export function skylineHeightDeg(skyline: PreparedSkyline, azimuthDeg: number): number {
	const { azimuths, elevations } = skyline;
	const count = azimuths.length;
	if (count === 0) return -90;
	if (count === 1) return elevations[0];
	const azimuth = normaliseDeg(azimuthDeg);
	let low = 0;
	let high = count;
	while (low < high) {
		const mid = (low + high) >> 1;
		if (azimuths[mid] <= azimuth) low = mid + 1;
		else high = mid;
	}
	const next = low % count;
	const previous = (low + count - 1) % count;
	let span = azimuths[next] - azimuths[previous];
	let into = azimuth - azimuths[previous];
	if (span < 0) span += 360;
	if (into < 0) into += 360;
	if (span === 0) return Math.max(elevations[next], elevations[previous]);
	return elevations[previous] + ((elevations[next] - elevations[previous]) * into) / span;
}

/** True when the skyline or the level horizon hides the sun. */
export function sunHidden(skyline: PreparedSkyline, azimuthDeg: number, elevationDeg: number): boolean {
	return elevationDeg <= 0 || elevationDeg < skylineHeightDeg(skyline, azimuthDeg);
}
