import { longestDate, shortestDate, sunDay, sunPosition } from '$lib/core';
import { formatDegrees, formatMinutes } from '$lib/i18n';

/** On which half of the earth a place lies, both ways: "Northern hemisphere, east of Greenwich". */
export function hemisphereWords(latitudeDeg: number, longitudeDeg: number): string {
	const half =
		latitudeDeg === 0 ? 'On the equator' : `${latitudeDeg > 0 ? 'Northern' : 'Southern'} hemisphere`;
	if (longitudeDeg === 0) return `${half}, on the meridian of Greenwich`;
	return `${half}, ${longitudeDeg > 0 ? 'east' : 'west'} of Greenwich`;
}

/** What the sun does at a place, in one sentence, so that a wrong sign or a swapped pair is seen at once. */
export function placeWords(latitudeDeg: number, longitudeDeg: number, year: number): string {
	const at = { latitudeDeg, longitudeDeg };
	const solarOffsetMinutes = longitudeDeg * 4;
	const words = (dateIso: string) => {
		const day = sunDay(dateIso, at, solarOffsetMinutes);
		if (day.kind === 'polar-night') return 'no sun';
		const noon = sunPosition(day.transitMs, latitudeDeg, longitudeDeg).apparentElevationDeg;
		const length =
			day.riseMs !== null && day.setMs !== null
				? `${formatMinutes((day.setMs - day.riseMs) / 60_000)} of sun`
				: 'sun all day';
		return `${formatDegrees(noon)} at noon, ${length}`;
	};
	return `Shortest day: ${words(shortestDate(latitudeDeg, year))}. Longest day: ${words(longestDate(latitudeDeg, year))}.`;
}
