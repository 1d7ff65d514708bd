import { normaliseDeg, RADIANS_PER_DEGREE } from '../conventions';
import type { Field } from '../field';
import { groundHeightM } from '../geometry/ground';
import { boundaryEdges, insideBoundary, segmentDistanceM } from '../layout/polygon';
import { reachRadiusM } from '../machine/reach';
import type { LightLedger, Moves } from './light-ledger';
import type { MoveAnswer } from './results';

/** Step of the central difference, metres: far below any pitch, far above rounding. */
export const MOVE_STEP_M = 0.1;
/** East, west, north, south. */
export const WAYS = 4;
/** Slopes of the field's loss below this are rounding, per metre. */
const NO_SLOPE = 1e-9;
/** A step ahead and one back may differ by this share of the slope before the place counts as a kink. */
const KINK_SHARE = 0.25;
/** The move that is checked and computed again, metres. */
export const ONE_METRE = 1;
/** Contacts within a millimetre are not in the way, as in the checks of a layout. */
const SLACK_M = 0.001;

/** A tracker's move with the rise of the ground under it, metres. */
function vector(field: Field, i: number, eastM: number, northM: number): [number, number, number] {
	const { trackers } = field.layout;
	const { ground } = field.plot;
	const { eastM: e, northM: n } = trackers[i];
	return [eastM, northM, groundHeightM(ground, e + eastM, n + northM) - groundHeightM(ground, e, n)];
}

/** A step each way for every tracker. */
export function stepMoves(field: Field): Moves {
	const h = MOVE_STEP_M;
	const vectors = new Float64Array(field.engine.count * WAYS * 3);
	for (let i = 0; i < field.engine.count; i++) {
		const ways = [
			[h, 0],
			[-h, 0],
			[0, h],
			[0, -h]
		] as const;
		ways.forEach(([e, n], m) => vectors.set(vector(field, i, e, n), 3 * (i * WAYS + m)));
	}
	return { perTracker: WAYS, vectors };
}

/** One metre towards the given bearings; null stands still. */
export function metreMoves(field: Field, bearingsDeg: ReadonlyMap<number, number>): Moves {
	const vectors = new Float64Array(field.engine.count * 3);
	const active = new Uint8Array(field.engine.count);
	for (const [i, bearing] of bearingsDeg) {
		const a = bearing * RADIANS_PER_DEGREE;
		vectors.set(vector(field, i, ONE_METRE * Math.sin(a), ONE_METRE * Math.cos(a)), 3 * i);
		active[i] = 1;
	}
	return { perTracker: 1, vectors, active };
}

/**
 * Change of the whole field's loss by each move of each tracker, kWh/m² [tracker][move]: its own and those that it
 * shades, added in the order of the trackers.
 */
export function fieldChanges(ledger: LightLedger, perTracker: number): Float64Array {
	const changes = Float64Array.from(ledger.ownMove);
	for (let p = 0; p < ledger.pairBy.length; p++) {
		const k = ledger.pairBy[p];
		const detail = ledger.pairDetail[p];
		if (k < 0 || detail < 0) continue;
		for (let m = 0; m < perTracker; m++) {
			changes[k * perTracker + m] += ledger.detailMove[detail * perTracker + m];
		}
	}
	return changes;
}

/**
 * Derivative of the field's beam loss by moving tracker i, from the changes by a step each way; `withoutKwh` is the
 * field's beam without shade. The loss has kinks where edges of shadows meet edges of glass; over many suns they blur, and
 * where they don't `smooth` is false. Central difference: error of the order of the step squared away from kinks.
 */
export function moveAnswer(
	changes: Float64Array,
	i: number,
	withoutKwh: number
): Omit<MoveAnswer, 'blockedBy'> {
	const still = {
		lossPerMetreEast: 0,
		lossPerMetreNorth: 0,
		bestAzimuthDeg: null,
		gainPerMetre: 0,
		gainOfOneMetre: null,
		smooth: true
	};
	if (!(withoutKwh > 0)) return still;
	const [east, west, north, south] = changes.subarray(i * WAYS, (i + 1) * WAYS);
	const per = 1 / (MOVE_STEP_M * withoutKwh);
	const lossPerMetreEast = ((east - west) * per) / 2;
	const lossPerMetreNorth = ((north - south) * per) / 2;
	const gainPerMetre = Math.hypot(lossPerMetreEast, lossPerMetreNorth);
	const bend = Math.max(Math.abs(east + west), Math.abs(north + south)) * per;
	const smooth = bend <= Math.max(NO_SLOPE, KINK_SHARE * gainPerMetre);
	if (gainPerMetre < NO_SLOPE) return { ...still, smooth };
	return {
		lossPerMetreEast,
		lossPerMetreNorth,
		// The loss falls fastest against its gradient.
		bestAzimuthDeg: normaliseDeg(Math.atan2(-lossPerMetreEast, -lossPerMetreNorth) / RADIANS_PER_DEGREE),
		gainPerMetre,
		gainOfOneMetre: null,
		smooth
	};
}

/** What tracker i would run into one metre towards a bearing: a reach circle that it does not overlap already, or the set-back. */
export function moveChecker(field: Field): (i: number, azimuthDeg: number) => MoveAnswer['blockedBy'] {
	const { layout, plot, models } = field;
	const reachOf = new Map(layout.models.map((model) => [model, reachRadiusM(model)]));
	const reach = models.map((model) => reachOf.get(model) ?? 0);
	const edges = boundaryEdges(plot.boundary);
	const setBack = Math.max(0, plot.setBackM);
	return (i, azimuthDeg) => {
		const a = azimuthDeg * RADIANS_PER_DEGREE;
		const { eastM, northM } = layout.trackers[i];
		const e = eastM + ONE_METRE * Math.sin(a);
		const n = northM + ONE_METRE * Math.cos(a);
		for (let j = 0; j < models.length; j++) {
			if (j === i) continue;
			const other = layout.trackers[j];
			const least = reach[i] + reach[j] - SLACK_M;
			if (Math.abs(other.eastM - e) >= least || Math.abs(other.northM - n) >= least) continue;
			if (Math.hypot(other.eastM - e, other.northM - n) < least) return { kind: 'tracker', name: other.tag };
		}
		if (plot.boundary.length === 0) return null;
		const room = edges.reduce((least, edge) => Math.min(least, segmentDistanceM(e, n, edge)), Infinity);
		return insideBoundary(plot.boundary, e, n) && room >= reach[i] + setBack - SLACK_M
			? null
			: { kind: 'boundary', name: '' };
	};
}
