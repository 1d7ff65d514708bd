import type { AnswersResult, Taker, TrackerAnswers } from '$lib/core';
import type { ClearWindow, MoveAnswer } from '$lib/core';
import { fineWindName, formatBearing, formatClock, formatHours, formatPercent, NBSP } from '$lib/i18n';
import { longMonthNames } from './months';
import { degreesWords } from './verdict-words';

/** "mostly on December mornings". */
export function whenWords(when: Pick<Taker, 'month' | 'half'>): string {
	return `mostly on ${longMonthNames[when.month]} ${when.half}s`;
}

/** Who it is, as said in a sentence: a tag, an obstacle's name, or the ground. */
export function takerName(taker: Pick<Taker, 'kind' | 'name'>): string {
	return taker.kind === 'ground' ? 'the rising ground' : taker.name;
}

/** A small share of the field's beam with enough digits to tell moves apart. */
export function gainWords(share: number): string {
	const percent = Math.abs(share) * 100;
	return formatPercent(share, percent >= 0.1 ? 2 : percent >= 0.01 ? 3 : 4);
}

/** What moving one tracker would do for the field: one or two sentences. */
export function moveSentence(tag: string, move: MoveAnswer): string {
	const least = 5e-7;
	if (move.bestAzimuthDeg === null || move.gainPerMetre < least) {
		return `Moving ${tag} alone wins the field nothing worth the walk: it stands well among the others.`;
	}
	const way = `${formatBearing(move.bestAzimuthDeg)} (${fineWindName(move.bestAzimuthDeg)})`;
	const gain =
		move.gainOfOneMetre === null
			? `about ${gainWords(move.gainPerMetre)} of the field's beam for the first metre`
			: `${gainWords(move.gainOfOneMetre)} of the field's beam for one metre, computed with it there`;
	const kink = move.smooth ? '' : ' Here the loss has a kink: a longer step may tell otherwise.';
	const room =
		move.blockedBy === null
			? ''
			: move.blockedBy.kind === 'tracker'
				? ` The reach circle of ${move.blockedBy.name} is in the way.`
				: ' The set-back from the boundary is in the way.';
	return `Best way to move: towards ${way}, ${gain}.${kink}${room}`;
}

/** "10:12–14:03 by the clock, 09:38–13:29 solar time". */
export function windowWords(window: ClearWindow, timeZone: string): string {
	const clock = `${formatClock(window.fromMs, timeZone)}–${formatClock(window.toMs, timeZone)}`;
	const solar = `${formatHours(window.fromSolarHour)}–${formatHours(window.toSolarHour)}`;
	return `${clock} by the clock, ${solar} solar${NBSP}time`;
}

/** Heights are refined to a hundredth; nearer to the highest sun than this is at it, degrees. */
const AT_HIGHEST_DEG = 0.02;

/** Whether shade lasts up to the highest sun of the year, so that no height of the sun is clear. */
export const neverClear = (aboveDeg: number | null, highestSunDeg: number): boolean =>
	aboveDeg !== null && aboveDeg >= highestSunDeg - AT_HIGHEST_DEG;

/** Height of the sun above which nothing is shaded, as a sentence. */
export function clearHeightSentence(
	subject: string,
	aboveDeg: number | null,
	azimuthDeg: number | null,
	highestSunDeg: number
): string {
	if (aboveDeg === null || azimuthDeg === null)
		return `${subject} is never shaded, wherever the sun of the year stands.`;
	const bearing = `${formatBearing(azimuthDeg)} (${fineWindName(azimuthDeg)})`;
	if (neverClear(aboveDeg, highestSunDeg))
		return `${subject} is never clear in the year by the sun's height alone: there is shade up to the highest sun, ${degreesWords(highestSunDeg)}, at ${bearing}.`;
	return `${subject} is clear whenever the sun stands above ${degreesWords(aboveDeg)}; the last shade comes with the sun at ${bearing}.`;
}

/** Why a tracker is among the worst: "B06, mostly on December mornings". */
export function reasonWords(tracker: TrackerAnswers): string {
	const [first, second] = tracker.takers;
	if (!first) return 'nobody';
	const also = second && second.removalLoss > 0.7 * first.removalLoss ? ` and ${takerName(second)}` : '';
	return `${takerName(first)}${also}, ${whenWords(first)}`;
}

/** How the year was looked at, for the small print. */
export function sampleWords(model: AnswersResult['model']): string {
	return model.everyDays === 1
		? 'every day of the year'
		: `one day in ${model.everyDays}, ${model.days} days, each counted for the days around it: within 0.01 points of every day on the fields that are tested, within 3${NBSP}% of a loss where trees shed leaves, whose change of leaf may fall between`;
}
