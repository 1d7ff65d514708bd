import type { BoundaryPart } from '$lib/core/document';
import { formatNumber } from '$lib/i18n';
import type { RawAreas } from './geojson-areas';

/** One area of the file, ready to be chosen. */
export interface BoundaryChoice {
	/** The file's own name for it, or "Area 2". */
	name: string;
	part: BoundaryPart;
	areaM2: number;
	corners: number;
}

const WGS84_NAMES = /CRS84|EPSG:{1,2}4326|WGS ?84/i;

/** What was put right on the way in and what a person should look at, in sentences. */
export function boundaryWarnings(
	found: RawAreas,
	choices: BoundaryChoice[],
	fixed: { repeated: number; turned: number }
): string[] {
	const warnings: string[] = [];
	const plural = (count: number, one: string, many: string) =>
		`${formatNumber(count)} ${count === 1 ? one : many}`;
	if (found.crs && !WGS84_NAMES.test(found.crs)) {
		warnings.push(
			`The file names the coordinate system ${found.crs}. GeoJSON is read as WGS84 longitude and latitude: check the preview against two corners that you know.`
		);
	}
	if (fixed.turned > 0) {
		warnings.push(
			`${plural(fixed.turned, 'ring ran', 'rings ran')} the wrong way round and ${fixed.turned === 1 ? 'was' : 'were'} turned.`
		);
	}
	if (fixed.repeated > 0) {
		warnings.push(
			`${plural(fixed.repeated, 'corner stood', 'corners stood')} on the one before and ${fixed.repeated === 1 ? 'was' : 'were'} left out.`
		);
	}
	if (found.leftAside > 0) {
		warnings.push(
			`${plural(found.leftAside, 'point or line was', 'points and lines were')} left aside: only areas are read.`
		);
	}
	const holes = choices.reduce((sum, choice) => sum + choice.part.holes.length, 0);
	if (holes > 0)
		warnings.push(`${plural(holes, 'hole is', 'holes are')} kept as land that does not belong to the plot.`);
	if (choices.length > 1)
		warnings.push(
			`The file has ${formatNumber(choices.length)} areas: choose those that belong to the plot.`
		);
	return warnings;
}
