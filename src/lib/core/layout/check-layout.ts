import type { Layout, Plot, Tracker, TrackerModel } from '../document';
import { groundSlopeWithin, steepestRise } from '../geometry/ground';
import { lowestCornerM, reachRadiusM } from '../machine/reach';
import { CellIndex } from './cell-index';
import { obstacleContacts } from './obstacle-contacts';
import { boundaryEdges, insideBoundary, segmentDistanceM } from './polygon';

export type FindingKind =
	| 'circles-overlap'
	| 'set-back'
	| 'outside'
	| 'meets-obstacle'
	| 'double-tag'
	| 'low-corner'
	| 'steep-ground'
	| 'no-boundary';

/** Something in a layout that should be looked at before it is built. */
export interface Finding {
	kind: FindingKind;
	trackerIds: string[];
	/** A sentence for people. */
	message: string;
	/** How much is missing or overlaps, metres. */
	amountM?: number;
	/** Least axis height, in steps of 5 cm, that puts low corners right; metres above ground. */
	clearAxisM?: number;
}

/** A corner below this height above ground is reported, metres: common practice, no source. */
export const LOW_CORNER_M = 0.5;
/** Ground steeper than this under a tracker is reported, metres per metre: common practice, no source. */
export const STEEP_GROUND = 0.15;
/** Axis heights are named in steps of this, metres. */
const AXIS_STEP_M = 0.05;
/** Contacts within a millimetre are not findings: points come from grids with rounding. */
const SLACK_M = 0.001;

const metres = (value: number): string => `${value.toFixed(2)} m`;

export interface Standing {
	tracker: Tracker;
	model: TrackerModel;
	reach: number;
}

function overlapFindings(standing: readonly Standing[], largest: number): Finding[] {
	const findings: Finding[] = [];
	const index = new CellIndex(Math.max(1, 2 * largest));
	standing.forEach(({ tracker: t, reach }, i) =>
		index.addBox(i, t.eastM - reach, t.northM - reach, t.eastM + reach, t.northM + reach)
	);
	standing.forEach((a, i) => {
		const seen = new Set<number>();
		for (const dx of [-1, 1]) {
			for (const dy of [-1, 1]) {
				for (const j of index.at(a.tracker.eastM + dx * a.reach, a.tracker.northM + dy * a.reach)) {
					if (j > i) seen.add(j);
				}
			}
		}
		for (const j of [...seen].sort((p, q) => p - q)) {
			const b = standing[j];
			const apart = Math.hypot(a.tracker.eastM - b.tracker.eastM, a.tracker.northM - b.tracker.northM);
			const overlap = a.reach + b.reach - apart;
			if (overlap <= SLACK_M) continue;
			findings.push({
				kind: 'circles-overlap',
				trackerIds: [a.tracker.id, b.tracker.id],
				message: `${a.tracker.tag} and ${b.tracker.tag}: reach circles overlap by ${metres(overlap)}.`,
				amountM: overlap
			});
		}
	});
	return findings;
}

function boundaryFindings(plot: Plot, standing: readonly Standing[], largest: number): Finding[] {
	const findings: Finding[] = [];
	const edges = boundaryEdges(plot.boundary);
	const setBack = Math.max(0, plot.setBackM);
	const near = largest + setBack;
	// Long edges fill many cells, so cells are not made much smaller than the land.
	const extent = edges.reduce((m, e) => Math.max(m, Math.abs(e[2] - e[0]), Math.abs(e[3] - e[1])), 0);
	const index = new CellIndex(Math.max(2 * near, extent / 64, 1));
	edges.forEach(([x0, y0, x1, y1], k) =>
		index.addBox(
			k,
			Math.min(x0, x1) - near,
			Math.min(y0, y1) - near,
			Math.max(x0, x1) + near,
			Math.max(y0, y1) + near
		)
	);
	for (const { tracker, reach } of standing) {
		if (!insideBoundary(plot.boundary, tracker.eastM, tracker.northM)) {
			findings.push({
				kind: 'outside',
				trackerIds: [tracker.id],
				message: `${tracker.tag} stands outside the boundary.`
			});
			continue;
		}
		let distance = Infinity;
		for (const k of index.at(tracker.eastM, tracker.northM)) {
			distance = Math.min(distance, segmentDistanceM(tracker.eastM, tracker.northM, edges[k]));
		}
		const missing = reach + setBack - distance;
		if (missing <= SLACK_M) continue;
		findings.push({
			kind: 'set-back',
			trackerIds: [tracker.id],
			message:
				distance < reach
					? `${tracker.tag}: its reach circle crosses the boundary by ${metres(reach - distance)}.`
					: `${tracker.tag}: its reach circle is ${metres(distance - reach)} from the boundary; the set-back is ${metres(setBack)}.`,
			amountM: missing
		});
	}
	return findings;
}

function tagFindings(trackers: readonly Tracker[]): Finding[] {
	const byTag = new Map<string, string[]>();
	for (const { id, tag } of trackers) byTag.set(tag, [...(byTag.get(tag) ?? []), id]);
	const findings: Finding[] = [];
	for (const [tag, ids] of byTag) {
		if (ids.length < 2) continue;
		findings.push({
			kind: 'double-tag',
			trackerIds: ids,
			message: `The tag ${tag} is used ${ids.length} times; give each tracker its own.`
		});
	}
	return findings;
}

function obstacleFindings(plot: Plot, standing: readonly Standing[]): Finding[] {
	return obstacleContacts(plot, standing).map(({ tracker, obstacle, part, inside, intoM }) => {
		const what = part === 'body' ? obstacle.name : `the ${part} of ${obstacle.name}`;
		return {
			kind: 'meets-obstacle',
			trackerIds: [tracker.id],
			message: inside
				? `${tracker.tag} stands inside ${what}: its reach circle meets it by ${metres(intoM)}.`
				: `${tracker.tag}: its reach circle meets ${what} by ${metres(intoM)}.`,
			amountM: intoM
		};
	});
}

/** Trackers of one model and axis height; on uneven ground the steepest foot speaks for them. */
function cornerFindings(plot: Plot, standing: readonly Standing[]): Finding[] {
	const groups = new Map<string, { ids: string[]; model: TrackerModel; axisM: number; lowest: number }>();
	// On planes every tracker of a kind has the same answer.
	const known = new Map<string, number>();
	for (const { tracker, model, reach } of standing) {
		const axisM = tracker.axisHeightM ?? model.axisHeightM;
		const rise = steepestRise(plot.ground, tracker.eastM, tracker.northM, reach);
		const { posture } = tracker;
		const kind = `${model.id} ${axisM} ${rise} ${posture.kind === 'standing' ? posture.tiltDeg : ''}`;
		const lowest = known.get(kind) ?? lowestCornerM(model, axisM, rise, posture);
		known.set(kind, lowest);
		if (lowest >= LOW_CORNER_M - SLACK_M) continue;
		const key = `${model.id} ${axisM}`;
		const group = groups.get(key);
		if (!group) groups.set(key, { ids: [tracker.id], model, axisM, lowest });
		else {
			group.ids.push(tracker.id);
			group.lowest = Math.min(group.lowest, lowest);
		}
	}
	const findings: Finding[] = [];
	for (const { ids, model, axisM, lowest } of groups.values()) {
		const who = `${model.name}, axis at ${metres(axisM)}`;
		// The corner rises with the axis, metre for metre.
		const clearAxisM = Number(
			(Math.ceil((axisM + LOW_CORNER_M - SLACK_M - lowest) / AXIS_STEP_M) * AXIS_STEP_M).toFixed(2)
		);
		const remedy = `raise the axis to ${metres(clearAxisM)}.`;
		findings.push({
			kind: 'low-corner',
			trackerIds: ids,
			message:
				lowest < 0
					? `${who}: its lowest corner would run ${metres(-lowest)} into the ground; ${remedy}`
					: `${who}: its lowest corner comes down to ${metres(lowest)} above ground, where ${metres(LOW_CORNER_M)} is common; ${remedy}`,
			amountM: LOW_CORNER_M - lowest,
			clearAxisM
		});
	}
	return findings;
}

function steepFindings(plot: Plot, standing: readonly Standing[]): Finding[] {
	const steep: Standing[] = [];
	let most = 0;
	for (const one of standing) {
		const { tracker, reach } = one;
		const { gradient } = groundSlopeWithin(plot.ground, tracker.eastM, tracker.northM, reach);
		if (gradient <= STEEP_GROUND + 1e-9) continue;
		steep.push(one);
		most = Math.max(most, gradient);
	}
	if (steep.length === 0) return [];
	const percent = (share: number) => `${(100 * share).toFixed(0)} %`;
	const who =
		steep.length === 1
			? `${steep[0].tracker.tag} stands on ground`
			: `${steep.length} trackers stand on ground`;
	return [
		{
			kind: 'steep-ground',
			trackerIds: steep.map(({ tracker }) => tracker.id),
			message: `${who} that falls up to ${percent(most)}; above ${percent(STEEP_GROUND)} digging, lifting and mowing are hard: look for flatter places.`
		}
	];
}

/**
 * What is wrong or doubtful with a layout on its plot: circles that overlap, set-backs broken (holes included), trackers
 * outside, obstacles within reach, tags used twice, corners near the ground, steep ground. Trackers whose model is missing are passed over. Two thousand
 * trackers take a few milliseconds: near things are found through cells.
 */
export function checkLayout(plot: Plot, layout: Layout): Finding[] {
	const models = new Map(layout.models.map((model) => [model.id, model]));
	const reaches = new Map(layout.models.map((model) => [model.id, reachRadiusM(model)]));
	const standing: Standing[] = [];
	let largest = 0;
	for (const tracker of layout.trackers) {
		const model = models.get(tracker.modelId);
		if (!model) continue;
		const reach =
			tracker.posture.kind === 'standing'
				? reachRadiusM(model, tracker.posture)
				: (reaches.get(model.id) ?? 0);
		largest = Math.max(largest, reach);
		standing.push({ tracker, model, reach });
	}
	const findings = tagFindings(layout.trackers);
	if (standing.length === 0) return findings;
	if (plot.boundary.length === 0) {
		findings.push({
			kind: 'no-boundary',
			trackerIds: [],
			message: 'The plot has no boundary yet, so set-backs are not checked.'
		});
	} else {
		findings.push(...boundaryFindings(plot, standing, largest));
	}
	findings.push(
		...overlapFindings(standing, largest),
		...obstacleFindings(plot, standing),
		...cornerFindings(plot, standing),
		...steepFindings(plot, standing)
	);
	return findings;
}
