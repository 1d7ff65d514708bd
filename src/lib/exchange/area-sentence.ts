import type { BoundaryPart, PlanPoint } from '$lib/core/document';
import { insideRing, ringDistance, signedDoubleArea } from '$lib/schema/plot-checks';
import { formatArea, formatNumber, formatQuantity } from '$lib/i18n';

export interface BoundarySummary {
	areaM2: number;
	/** Length of all rings, holes too, metres. */
	perimeterM: number;
	extent: { westM: number; eastM: number; southM: number; northM: number };
	corners: number;
	/** From the project's place to the nearest edge; 0 when the place lies inside. */
	distanceM: number;
	placeInside: boolean;
	/** All of it in one sentence that a person can check against what they know of the land. */
	sentence: string;
}

/** Figures of a boundary in the local plan. */
export function summariseBoundary(parts: BoundaryPart[]): BoundarySummary {
	const origin: PlanPoint = [0, 0];
	let areaM2 = 0;
	let perimeterM = 0;
	let corners = 0;
	let distanceM = Infinity;
	let placeInside = false;
	const extent = { westM: Infinity, eastM: -Infinity, southM: Infinity, northM: -Infinity };
	for (const part of parts) {
		const rings = [part.outer, ...part.holes];
		areaM2 += Math.abs(signedDoubleArea(part.outer)) / 2;
		for (const hole of part.holes) areaM2 -= Math.abs(signedDoubleArea(hole)) / 2;
		for (const ring of rings) {
			corners += ring.length;
			perimeterM += ringLength(ring);
			distanceM = Math.min(distanceM, ringDistance(origin, ring));
		}
		placeInside ||= insideRing(origin, part.outer) && !part.holes.some((hole) => insideRing(origin, hole));
		for (const [east, north] of part.outer) {
			extent.westM = Math.min(extent.westM, east);
			extent.eastM = Math.max(extent.eastM, east);
			extent.southM = Math.min(extent.southM, north);
			extent.northM = Math.max(extent.northM, north);
		}
	}
	if (placeInside) distanceM = 0;
	const summary = { areaM2, perimeterM, extent, corners, distanceM, placeInside };
	return { ...summary, sentence: areaSentence(summary) };
}

function ringLength(ring: PlanPoint[]): number {
	return ring.reduce((sum, corner, index) => {
		const next = ring[(index + 1) % ring.length];
		return sum + Math.hypot(next[0] - corner[0], next[1] - corner[1]);
	}, 0);
}

function areaSentence(summary: Omit<BoundarySummary, 'sentence'>): string {
	const { extent } = summary;
	const across = formatQuantity(extent.eastM - extent.westM, 'm', 0);
	const along = formatQuantity(extent.northM - extent.southM, 'm', 0);
	const where = summary.placeInside
		? "with the project's place inside"
		: `${formatQuantity(summary.distanceM / 1000, 'km', summary.distanceM < 10_000 ? 1 : 0)} from the project's place`;
	return `${formatArea(summary.areaM2)}, ${across} east–west by ${along} north–south, ${formatNumber(summary.corners)} corners, ${where} — ${comparison(summary.areaM2)}.`;
}

/** Sizes that most people can picture, m²: recommended pitch 105 x 68, doubles court 23.77 x 10.97, parking bay 2.5 x 5 (common practice, no source). */
const PITCH_M2 = 7140;
const COURT_M2 = 260.8;
const BAY_M2 = 12.5;
const COUNTS = [
	'no',
	'one',
	'two',
	'three',
	'four',
	'five',
	'six',
	'seven',
	'eight',
	'nine',
	'ten',
	'eleven',
	'twelve'
];

/** The area in things that people have stood on: "about five football pitches". */
export function comparison(areaM2: number): string {
	if (areaM2 >= 200 * PITCH_M2) return `about ${formatQuantity(areaM2 / 1e6, 'km²', 1)}`;
	if (areaM2 >= 0.4 * PITCH_M2) return things(areaM2 / PITCH_M2, 'football pitch', 'football pitches');
	if (areaM2 >= 0.7 * COURT_M2) return things(areaM2 / COURT_M2, 'tennis court', 'tennis courts');
	if (areaM2 >= 0.7 * BAY_M2) return things(areaM2 / BAY_M2, 'parking bay', 'parking bays');
	return 'smaller than a parking bay';
}

function things(count: number, one: string, many: string): string {
	if (count < 0.7) return `about half a ${one}`;
	const whole = Math.round(count);
	if (whole <= 1) return `about one ${one}`;
	return `about ${COUNTS[whole] ?? formatNumber(whole)} ${many}`;
}
