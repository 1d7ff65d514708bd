import type { PegRow } from '$lib/schema/peg-row';

/** The trackers nearest to one, with level distance and bearing clockwise from true north, as a tape check on site. */
export function nearest(row: PegRow, rows: PegRow[], count = 3) {
	return rows
		.filter((other) => other.trackerId !== row.trackerId)
		.map((other) => {
			const [east, north] = [other.eastM - row.eastM, other.northM - row.northM];
			return {
				tag: other.tag,
				distanceM: Math.hypot(east, north),
				bearingDeg: ((Math.atan2(east, north) * 180) / Math.PI + 360) % 360
			};
		})
		.sort((a, b) => a.distanceM - b.distanceM)
		.slice(0, count);
}
