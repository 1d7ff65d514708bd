import { BEAM_MODEL } from '../energy/beam';
import { prepareField, type Field } from '../field';
import type { RunInput } from '../results';
import { SUN_MODEL } from '../run/shade-year';
import { assertStep } from '../run/sun-steps';
import { CORE_VERSION } from '../version';
import { answerSuns, type AnswerSun } from './answer-suns';
import { clearHeightPart, fieldClearHeight, sectorsDeg, type ClearHeightPart } from './clear-height';
import { clearWindows, windowPart, type WindowPart } from './clear-window';
import { joinLedgers, lightLedger, type LightLedger } from './light-ledger';
import { bookkeeper } from './takers';
import type { AnswersResult, TrackerAnswers } from './results';
import { fieldChanges, metreMoves, MOVE_STEP_M, moveAnswer, moveChecker, stepMoves, WAYS } from './which-way';

/** One day in so many is looked at: within 0.005 points of every day on the fields it was measured on, 3 % of a loss where trees shed leaves. */
export const EVERY_DAYS = 7;
/** Moves that are computed again with the tracker really elsewhere. */
const MOST_MOVES = 10;
/** Worst trackers and strongest pairs that are named. */
const MOST_WORST = 20;
const MOST_PAIRS = 40;
/** Shares of the whole work, for progress: the heights come first. */
const HEIGHTS_SHARE = 0.2;

/** What one range of trackers contributes. Arrays only, so that it can be handed between threads without a copy. */
export interface AnswersPart {
	range: { from: number; to: number };
	ledger: LightLedger;
	heights: ClearHeightPart;
	windows: WindowPart;
}

export interface AnswersOptions {
	/** One day in so many; 1 is every day. */
	everyDays?: number;
}

const whole = (input: RunInput) => ({ from: 0, to: input.layout.trackers.length });

/**
 * The part of the answers that belongs to trackers `from` to `to` (not itself), all others standing around them. Null
 * when `onProgress` (0..1) answered false. 1,000 alike trackers take some seconds on one thread.
 */
export function answersPart(
	input: RunInput,
	onProgress?: (done01: number) => boolean,
	range: { from: number; to: number } = whole(input),
	options: AnswersOptions = {}
): AnswersPart | null {
	assertStep(input.stepMinutes);
	const field = prepareField(input);
	const tell = (from: number, share: number) =>
		onProgress && ((done: number) => onProgress(from + share * done));
	const heights = clearHeightPart(field, range, tell(0, HEIGHTS_SHARE));
	if (heights === null) return null;
	const windows = windowPart(field, input, range);
	const { suns } = answerSuns(field, input, options.everyDays ?? EVERY_DAYS);
	const moves = stepMoves(field);
	const ledger = lightLedger(field, suns, range, moves, undefined, tell(HEIGHTS_SHARE, 1 - HEIGHTS_SHARE));
	return ledger && { range, ledger, heights, windows };
}

/** Gain of the field, kWh/m², by really moving each of a few trackers one metre towards its bearing. */
function realGains(
	field: Field,
	suns: readonly AnswerSun[],
	ledger: LightLedger,
	bearings: ReadonlyMap<number, number>
): Map<number, number> {
	const targets = new Set(bearings.keys());
	for (let i = 0; i < field.engine.count; i++) {
		for (let p = ledger.pairStart[i]; p < ledger.pairStart[i + 1]; p++) {
			// A pair in which nothing is taken now, nor would be a step away, is taken to stay so.
			if (ledger.pairDetail[p] >= 0 && bearings.has(ledger.pairBy[p])) targets.add(i);
		}
	}
	const again = lightLedger(
		field,
		suns,
		{ from: 0, to: field.engine.count },
		metreMoves(field, bearings),
		[...targets].sort((a, b) => a - b)
	);
	const gains = new Map<number, number>();
	if (again === null) return gains;
	const changes = fieldChanges(again, 1);
	for (const i of bearings.keys()) gains.set(i, -changes[i]);
	return gains;
}

/** The answers from their parts, which must cover all trackers in order; the same bytes however the field was split. */
export function joinAnswers(
	input: RunInput,
	parts: readonly AnswersPart[],
	options: AnswersOptions = {}
): AnswersResult {
	const everyDays = options.everyDays ?? EVERY_DAYS;
	const field = prepareField(input);
	const { trackers } = input.layout;
	const { suns, days } = answerSuns(field, input, everyDays);
	const ledger = joinLedgers(parts.map((part) => part.ledger));
	const heights = fieldClearHeight(
		field,
		parts.map((part) => part.heights)
	);
	const windows = clearWindows(
		input,
		parts.map((part) => part.windows)
	);
	let withoutKwh = 0;
	let lostKwh = 0;
	for (let i = 0; i < trackers.length; i++) {
		withoutKwh += ledger.without[i];
		lostKwh += ledger.lost[i];
	}
	const books = bookkeeper(input, ledger, withoutKwh);
	const changes = fieldChanges(ledger, WAYS);
	const blocked = moveChecker(field);
	const told = trackers.map((tracker, i): TrackerAnswers => {
		const part = parts.find(({ range }) => i < range.to) ?? parts[0];
		const at = i - part.range.from;
		const above = part.heights.aboveDeg[at];
		const move = moveAnswer(changes, i, withoutKwh);
		return {
			trackerId: tracker.id,
			tag: tracker.tag,
			beamLoss: ledger.without[i] > 0 ? ledger.lost[i] / ledger.without[i] : 0,
			...books.takersOf(i),
			takesFromField: books.takesFromField[i],
			move: { ...move, blockedBy: move.bestAzimuthDeg === null ? null : blocked(i, move.bestAzimuthDeg) },
			clearAboveDeg: Number.isNaN(above) ? null : above,
			clearAtAzimuthDeg: Number.isNaN(above) ? null : part.heights.azimuthDeg[at],
			clearBySectorDeg: sectorsDeg(part.heights, at),
			window: windows.trackers[i]
		};
	});
	const best = told
		.map(({ move }, i) => ({ i, move }))
		.filter(({ move }) => move.bestAzimuthDeg !== null)
		.sort((a, b) => b.move.gainPerMetre - a.move.gainPerMetre || a.i - b.i)
		.slice(0, MOST_MOVES);
	const gains = realGains(
		field,
		suns,
		ledger,
		new Map(best.map(({ i, move }) => [i, move.bestAzimuthDeg ?? 0]))
	);
	for (const { i, move } of best) move.gainOfOneMetre = (gains.get(i) ?? 0) / withoutKwh;
	// Chosen by the derivative, told by what a metre really gains.
	best.sort((a, b) => (b.move.gainOfOneMetre ?? 0) - (a.move.gainOfOneMetre ?? 0) || a.i - b.i);
	return {
		coreVersion: CORE_VERSION,
		model: {
			sun: SUN_MODEL,
			beam: BEAM_MODEL,
			everyDays,
			days,
			suns: suns.length,
			moveStepM: MOVE_STEP_M
		},
		field: {
			beamLoss: withoutKwh > 0 ? lostKwh / withoutKwh : 0,
			pairs: books.strongestPairs(MOST_PAIRS),
			clearAboveDeg: heights.aboveDeg,
			clearAtAzimuthDeg: heights.azimuthDeg,
			clearBySectorDeg: heights.bySectorDeg,
			clearProfile: heights.profile,
			shortestDate: windows.date,
			window: windows.field,
			bestMoves: best.map(({ i }) => ({ trackerId: trackers[i].id, tag: trackers[i].tag })),
			worst: books.worst(MOST_WORST)
		},
		trackers: told
	};
}

/**
 * Who takes whose light, which way to move, clear heights, shade-free windows and the worst trackers of a field, over a
 * year of which one day in seven is looked at (`everyDays`). Null when stopped by `onProgress`. Errors: only for a step
 * that no run can be made of. Exact areas; losses are of beam under the clear sky named in the result.
 */
export function answersYear(
	input: RunInput,
	onProgress?: (done01: number) => boolean,
	options: AnswersOptions = {}
): AnswersResult | null {
	const part = answersPart(input, onProgress, whole(input), options);
	return part && joinAnswers(input, [part], options);
}
