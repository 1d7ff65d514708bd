import type { BoundaryPart, PlanPoint } from '$lib/core/document';
import { MAX_REACH_M } from '$lib/schema/plot';
import {
	ringProblemSentence,
	ringProblems,
	SAME_POINT_M,
	signedDoubleArea,
	strayHole
} from '$lib/schema/plot-checks';
import { summariseBoundary } from './area-sentence';
import { boundaryWarnings, type BoundaryChoice } from './boundary-warnings';
import { collectAreas, parseJson, type RawAreas } from './geojson-areas';
import { locateLand } from './locate-land';
import { localFromLonLat, type Origin } from './plan-projection';
import { areaName, readPositions, refuseCornerCount, ringName, type LonLatArea } from './read-positions';
import { readText, refusal, type Refusal } from './read-text';

export type { BoundaryChoice } from './boundary-warnings';

export interface BoundaryReading {
	ok: true;
	choices: BoundaryChoice[];
	/** What was put right on the way in, and what to look at, in sentences. */
	warnings: string[];
	/** Something that a person must say yes to before it is taken, or null. */
	question: string | null;
	swapped: boolean;
}

export interface BoundaryRefusal extends Refusal {
	/** Reading the file with the two numbers of each pair exchanged would help. */
	canSwap: boolean;
}

export interface BoundaryOptions {
	/** Take the first number as latitude and the second as longitude. */
	swap?: boolean;
}

const WANTED = 'a GeoJSON file';

/**
 * Reads a boundary from GeoJSON (RFC 7946) into the project's local plan, puts right what can be put right without
 * guessing (open rings, winding, repeated corners, third coordinates) and refuses the rest with a sentence and a remedy.
 */
export function readBoundary(
	input: Uint8Array | string,
	fileName: string,
	place: Origin,
	options: BoundaryOptions = {}
): BoundaryReading | BoundaryRefusal {
	const swap = options.swap ?? false;
	const text = readText(input, WANTED);
	if (!text.ok) return final(withFileName(text, fileName));
	const json = parseJson(text.text);
	if (!json.ok) return final(withFileName(json, fileName));
	const areas = collectAreas(json.value);
	if (!areas.ok) return final(areas);
	const tooMany = refuseCornerCount(areas);
	if (tooMany) return final(tooMany);
	const rings = readPositions(areas, place, swap);
	if (!rings.ok) return { ...rings, canSwap: rings.problem === 'swapped' };
	const located = locateLand(
		rings.areas.flatMap((area) => area.rings),
		place,
		swap
	);
	if (!located.ok) return { ...located, canSwap: located.problem === 'swapped' };
	return toPlan(rings.areas, areas, place, swap, located.question);
}

function final(refused: Refusal): BoundaryRefusal {
	return { ...refused, canSwap: false };
}

function withFileName(refused: Refusal, fileName: string): Refusal {
	const extension = /\.(kml|kmz|shp|dxf|zip|pdf|csv|gpx|gml)$/i.exec(fileName)?.[1].toLowerCase();
	if (!extension || refused.problem === 'too-large' || refused.problem === 'empty') return refused;
	return refusal(
		'wrong-type',
		`${fileName.slice(-60)} is not ${WANTED}.`,
		'Save the boundary as GeoJSON (.geojson or .json, WGS84 longitude and latitude) and choose that file.'
	);
}

function toPlan(
	areas: LonLatArea[],
	found: RawAreas,
	place: Origin,
	swap: boolean,
	question: string | null
): BoundaryReading | BoundaryRefusal {
	const project = localFromLonLat(place);
	const choices: BoundaryChoice[] = [];
	let repeated = 0;
	let turned = 0;
	for (const [index, area] of areas.entries()) {
		const rings: PlanPoint[][] = [];
		for (const [ringIndex, ring] of area.rings.entries()) {
			const name = ringName(areas, index, ringIndex);
			const corners = withoutRepeats(ring.map(([lon, lat]) => project(lon, lat)));
			repeated += Math.max(0, corners.repeats);
			const beyond = corners.ring.findIndex(([e, n]) => Math.max(Math.abs(e), Math.abs(n)) > MAX_REACH_M);
			if (beyond >= 0) {
				return final(
					refusal(
						'far-away',
						`${name}, corner ${beyond + 1} lies more than ${MAX_REACH_M / 1000} km from the project's place.`,
						'Save only the land of this project, and choose that file.'
					)
				);
			}
			const [problem] = ringProblems(corners.ring);
			if (problem) {
				return final(refusal(problem.kind, ...splitSentence(ringProblemSentence(problem, name))));
			}
			const counterClockwise = signedDoubleArea(corners.ring) > 0;
			const wanted = ringIndex === 0;
			if (counterClockwise !== wanted) turned += 1;
			rings.push(counterClockwise === wanted ? corners.ring : corners.ring.toReversed());
		}
		const part: BoundaryPart = { outer: rings[0], holes: rings.slice(1) };
		const stray = strayHole(part);
		if (stray !== null) {
			return final(
				refusal(
					'hole-outside',
					`${ringName(areas, index, stray)} does not lie inside its area.`,
					'Take the hole out, or save the two outlines as two areas.'
				)
			);
		}
		const { areaM2, corners } = summariseBoundary([part]);
		choices.push({ name: areaName(area.name, index), part, areaM2, corners });
	}
	const warnings = boundaryWarnings(found, choices, { repeated, turned });
	return { ok: true, choices, warnings, question, swapped: swap };
}

/** The ring opened, with corners that stand on one another taken once. */
function withoutRepeats(ring: PlanPoint[]): { ring: PlanPoint[]; repeats: number } {
	const kept: PlanPoint[] = [];
	const near = (a: PlanPoint, b: PlanPoint) => Math.hypot(a[0] - b[0], a[1] - b[1]) < SAME_POINT_M;
	for (const corner of ring) if (kept.length === 0 || !near(kept[kept.length - 1], corner)) kept.push(corner);
	let closing = 0;
	while (kept.length > 1 && near(kept[0], kept[kept.length - 1])) {
		kept.pop();
		closing = 1;
	}
	return { ring: kept, repeats: ring.length - kept.length - closing };
}

/** "What is wrong: what to do." as message and remedy. */
function splitSentence(sentence: string): [message: string, remedy: string] {
	const mark = sentence.search(/\. (?=[A-Z][a-z]+ )/);
	if (mark > 0) return [sentence.slice(0, mark + 1), sentence.slice(mark + 2)];
	const colon = sentence.lastIndexOf(': ');
	const remedy = sentence.slice(colon + 2);
	return [`${sentence.slice(0, colon)}.`, remedy.charAt(0).toUpperCase() + remedy.slice(1)];
}
