import type { Obstacle, PlanPoint, Plot, Tracker, TrackerModel } from '../document';
import { groundHeightM } from '../geometry/ground';
import { highestCornerM, lowestCornerM } from '../machine/reach';
import { obstacleShape } from '../shade/obstacle-outline';
import { CellIndex } from './cell-index';
import { insideBoundary, segmentDistanceM } from './polygon';

/** A reach circle that meets the body of an obstacle. */
export interface ObstacleContact {
	tracker: Tracker;
	obstacle: Obstacle;
	/** What of it is met. */
	part: 'body' | 'crown' | 'trunk';
	/** The pole itself stands inside its outline. */
	inside: boolean;
	/** Reach less the distance from the pole to the outline (0 inside it), metres. */
	intoM: number;
}

/** A convex or ring-shaped piece of an obstacle: a circle about `ring[0]`, or a ring. Heights above the datum, metres. */
interface Piece {
	obstacle: number;
	part: ObstacleContact['part'];
	ring: PlanPoint[];
	radiusM: number;
	bottomM: number;
	topM: number;
}

/** Contacts within a millimetre are none: points come from grids with rounding. */
const SLACK_M = 0.001;

function piecesOf(plot: Plot): Piece[] {
	return plot.obstacles.flatMap((each, obstacle): Piece[] => {
		const foot = groundHeightM(plot.ground, each.eastM, each.northM);
		if (each.kind === 'tree') {
			const at = { obstacle, ring: [[each.eastM, each.northM] as PlanPoint] };
			const base = foot + each.crownBaseM;
			const trunk = { ...at, part: 'trunk' as const, radiusM: each.trunkRadiusM, bottomM: -Infinity };
			const crown = { ...at, part: 'crown' as const, radiusM: each.crownRadiusM, bottomM: base };
			return [
				{ ...crown, topM: foot + each.heightM },
				{ ...trunk, topM: base }
			];
		}
		const rise = each.kind === 'building' && each.roof.kind === 'pitched' ? each.roof.riseM : 0;
		const body = { obstacle, part: 'body' as const, bottomM: -Infinity };
		const shape = obstacleShape(each);
		if (shape.kind === 'circle') {
			return [{ ...body, ring: [shape.centre], radiusM: shape.radiusM, topM: foot + each.heightM }];
		}
		return shape.rings.map((ring) => ({
			...body,
			ring,
			radiusM: 0,
			// A wall follows the ground: the highest ground under it speaks for it.
			topM:
				(each.kind === 'wall'
					? ring.reduce((most, [e, n]) => Math.max(most, groundHeightM(plot.ground, e, n)), foot)
					: foot) +
				each.heightM +
				rise
		}));
	});
}

/** Distance of a point from a piece's outline, metres; 0 inside it. */
function distanceM({ ring, radiusM }: Piece, eastM: number, northM: number): number {
	if (ring.length === 1) return Math.max(0, Math.hypot(eastM - ring[0][0], northM - ring[0][1]) - radiusM);
	if (insideBoundary([{ outer: ring, holes: [] }], eastM, northM)) return 0;
	return ring.reduce((least, [x0, y0], k) => {
		const [x1, y1] = ring[(k + 1) % ring.length];
		return Math.min(least, segmentDistanceM(eastM, northM, [x0, y0, x1, y1]));
	}, Infinity);
}

/**
 * Obstacles whose bodies stand within the reach circles of trackers: plan distance from the pole to the outline less than
 * the reach radius, where the body's top is higher than the lowest corner passes and its bottom lower than the highest. A
 * pole inside an outline meets it whatever its height, unless all of it is above the machine. One contact for a tracker and an
 * obstacle, the deepest; by tracker, then by obstacle. Neglected: what the machine does not sweep inside its circle at the
 * body's height, growth of trees, the shape of a crown (taken as
 * an upright cylinder) and of a roof (taken as high as its ridge). Near pieces are found through cells.
 */
export function obstacleContacts(
	plot: Plot,
	standing: readonly { tracker: Tracker; model: TrackerModel; reach: number }[]
): ObstacleContact[] {
	if (plot.obstacles.length === 0 || standing.length === 0) return [];
	const pieces = piecesOf(plot);
	const largest = standing.reduce((most, { reach }) => Math.max(most, reach), 0);
	const boxes = pieces.map(({ ring, radiusM }) => {
		const box = [Infinity, Infinity, -Infinity, -Infinity];
		for (const [e, n] of ring) {
			box[0] = Math.min(box[0], e - radiusM);
			box[1] = Math.min(box[1], n - radiusM);
			box[2] = Math.max(box[2], e + radiusM);
			box[3] = Math.max(box[3], n + radiusM);
		}
		return box;
	});
	const extent = boxes.reduce((most, [w, s, e, n]) => Math.max(most, e - w, n - s), 0);
	const index = new CellIndex(Math.max(1, 2 * largest, extent / 64));
	boxes.forEach(([w, s, e, n], k) => {
		if (w <= e) index.addBox(k, w - largest, s - largest, e + largest, n + largest);
	});
	const contacts: ObstacleContact[] = [];
	for (const { tracker, model, reach } of standing) {
		const { eastM, northM, posture } = tracker;
		const deepest = new Map<number, ObstacleContact>();
		for (const k of index.at(eastM, northM)) {
			const piece = pieces[k];
			const apart = distanceM(piece, eastM, northM);
			const intoM = reach - apart;
			const foot = groundHeightM(plot.ground, eastM, northM);
			if (intoM <= SLACK_M || piece.topM <= foot) continue;
			if (apart > 0 && piece.topM - foot <= lowestCornerM(model, tracker.axisHeightM, 0, posture)) continue;
			if (piece.bottomM - foot >= highestCornerM(model, tracker.axisHeightM, posture)) continue;
			const known = deepest.get(piece.obstacle);
			if (known && known.intoM >= intoM) continue;
			const obstacle = plot.obstacles[piece.obstacle];
			deepest.set(piece.obstacle, { tracker, obstacle, part: piece.part, inside: apart === 0, intoM });
		}
		for (const [, contact] of [...deepest].sort(([a], [b]) => a - b)) contacts.push(contact);
	}
	return contacts;
}
