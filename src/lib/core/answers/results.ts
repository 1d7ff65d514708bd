/**
 * What the answers run gives back. Losses are shares 0..1 of the beam without shade over the days that were looked at:
 * a tracker's own for its takers, the field's for moves and pairs. Degrees, metres, UTC milliseconds.
 */

/** Who takes light: another tracker, an obstacle, or the ground rising near the tracker (which has no id). */
export interface Taker {
	kind: 'tracker' | 'obstacle' | 'ground';
	id: string;
	/** Tag of a tracker, name of an obstacle. */
	name: string;
	/** Loss with all minus the loss without this one: what its removal would give back. */
	removalLoss: number;
	/** Loss that this one alone would cause. */
	aloneLoss: number;
	/** Month 0..11 and half of the solar day in which it takes most. */
	month: number;
	half: 'morning' | 'afternoon';
}

export interface TakersRest {
	count: number;
	removalLoss: number;
	aloneLoss: number;
}

/** Which way to move one tracker, the others staying. Positive gains are light won by the field. */
export interface MoveAnswer {
	/** Change of the field's beam loss by moving east and north, a metre. */
	lossPerMetreEast: number;
	lossPerMetreNorth: number;
	/** Bearing of the best gain; null when moving changes nothing. */
	bestAzimuthDeg: number | null;
	/** Gain of the field's loss by one metre that way, from the derivative. */
	gainPerMetre: number;
	/** The same with the tracker really moved one metre; null where it was not computed again. */
	gainOfOneMetre: number | null;
	/** False where a step ahead and a step back tell unlike slopes: a kink, and the derivative holds nearby only. */
	smooth: boolean;
	/** What one metre that way would run into; null when nothing. */
	blockedBy: { kind: 'tracker' | 'boundary'; name: string } | null;
}

/** A span of the shortest day with sun and no shade. */
export interface ClearWindow {
	fromMs: number;
	toMs: number;
	fromSolarHour: number;
	toSolarHour: number;
}

export interface TrackerAnswers {
	trackerId: string;
	tag: string;
	beamLoss: number;
	/** Worst first; those that matter least are summed in `rest`. */
	takers: Taker[];
	rest: TakersRest | null;
	/** What it takes from the other trackers, in the field's loss, by removal. */
	takesFromField: number;
	move: MoveAnswer;
	/** Height of the sun above which it is never shaded in the year; null when it never is. */
	clearAboveDeg: number | null;
	/** Bearing of the sun at that height. */
	clearAtAzimuthDeg: number | null;
	/** The same by sector of 30 degrees from north, to the half degree above. */
	clearBySectorDeg: (number | null)[];
	/** Longest span of the shortest day with sun and no shade; null when there is none. */
	window: ClearWindow | null;
}

/** One of the field's strongest pairs: `by` takes from `from`. */
export interface LightPair {
	fromId: string;
	fromTag: string;
	by: Taker;
	/** By removal, in the field's loss. */
	fieldLoss: number;
}

export interface WorstTracker {
	trackerId: string;
	tag: string;
	beamLoss: number;
	/** Who takes most from it. */
	by: Taker | null;
	/** Month, and clock hour of standard time, of its greatest loss. */
	month: number;
	hour: number;
	half: 'morning' | 'afternoon';
}

export interface AnswersResult {
	coreVersion: string;
	model: {
		sun: string;
		beam: string;
		/** Every so many days of the year. */
		everyDays: number;
		days: number;
		suns: number;
		/** Step of the finite difference, metres. */
		moveStepM: number;
	};
	field: {
		beamLoss: number;
		pairs: LightPair[];
		clearAboveDeg: number | null;
		clearAtAzimuthDeg: number | null;
		clearBySectorDeg: (number | null)[];
		/** By bearing, every three degrees that the sun comes to: height above which nothing is shaded, 0 where nothing ever is. */
		clearProfile: { azimuthDeg: number; elevationDeg: number }[];
		shortestDate: string;
		window: ClearWindow | null;
		/** Best moves of one tracker, each computed again with the tracker one metre away; greatest gain so computed first. */
		bestMoves: { trackerId: string; tag: string }[];
		worst: WorstTracker[];
	};
	trackers: TrackerAnswers[];
}
