import type { WinterRule } from '$lib/core/document';
import type { DayShade, WinterVerdict } from '$lib/core/results';
import { formatHours, formatNumber } from '$lib/i18n';
import { listWords } from './level-ground';

/** 12 as `12`, 12.4 as `12.4`. */
export function degreesWords(deg: number): string {
	const tenths = Math.round(deg * 10) / 10;
	return `${formatNumber(tenths, Number.isInteger(tenths) ? 0 : 1)}°`;
}

/** When the rule asks for no shade: "while the sun is above 12°", "from 10:00 to 14:00 solar time". */
export function ruleSpanWords(rule: WinterRule): string {
	return rule.kind === 'clear-above'
		? `while the sun is above ${degreesWords(rule.elevationDeg)}`
		: `from ${formatHours(rule.fromSolarHour)} to ${formatHours(rule.toSolarHour)} solar time`;
}

/** The rule as a sentence for a title block or a statement. */
export function ruleWords(rule: WinterRule): string {
	return `No tracker is shaded ${ruleSpanWords(rule)} on the shortest day.`;
}

/** True when the shortest day never puts the rule to the test: the sun stays too low, or behind the skyline. */
export function asksNothing(verdict: WinterVerdict): boolean {
	return verdict.judgedMinutes === 0;
}

/** Met or not, and by which trackers: one sentence. */
export function verdictSentence(verdict: WinterVerdict): string {
	if (verdict.met && asksNothing(verdict)) {
		return verdict.rule.kind === 'clear-above'
			? `The sun is never seen above ${degreesWords(verdict.rule.elevationDeg)} that day, so this rule asks for nothing here.`
			: 'The sun is not seen between these hours that day, so this rule asks for nothing here.';
	}
	if (verdict.met) return `Met: no tracker is shaded ${ruleSpanWords(verdict.rule)}.`;
	return verdict.rule.kind === 'clear-above'
		? `Not met: ${heightsWords(verdict.brokenBy)}.`
		: `Not met: ${countedTags(verdict.brokenBy)} shaded ${ruleSpanWords(verdict.rule)}.`;
}

type Broken = WinterVerdict['brokenBy'];

/** "B03 is", "B03 and 1 other are". */
function countedTags(broken: Broken): string {
	const others = broken.length - 1;
	if (others === 0) return `${broken[0].tag} is`;
	return `${broken[0].tag} and ${others} ${others === 1 ? 'other' : 'others'} are`;
}

const namedAtMost = 3;

/** "B07", "B07 and E03", "B07, E03, C06 and 4 others". */
function tagsWords(tags: readonly string[]): string {
	const named = tags.length > namedAtMost + 1 ? tags.slice(0, namedAtMost) : tags;
	const rest = tags.length - named.length;
	return listWords(rest > 0 ? [...named, `${rest} others`] : named);
}

/** "B07 and E03 are shaded up to 23°, 9 others up to 14–21.6°": each height holds for those it is said of. */
function heightsWords(broken: Broken): string {
	const shown = broken.map((each) => ({ ...each, words: degreesWords(each.shadedUpToDeg) }));
	const highest = shown.reduce((most, each) => (each.shadedUpToDeg > most.shadedUpToDeg ? each : most));
	const top = shown.filter((each) => each.words === highest.words);
	const lower = shown.filter((each) => each.words !== highest.words);
	const head = `${tagsWords(top.map((each) => each.tag))} ${top.length === 1 ? 'is' : 'are'} shaded up to ${highest.words}`;
	if (lower.length === 0) return head;
	const heights = lower.map((each) => each.shadedUpToDeg);
	const [least, most] = [degreesWords(Math.min(...heights)), degreesWords(Math.max(...heights))];
	const who = lower.length === 1 ? lower[0].tag : `${lower.length} others`;
	return `${head}, ${who} up to ${least === most ? most : `${least.slice(0, -1)}–${most}`}`;
}

/** Heights nearer than this to the highest of the day are the highest, degrees: what one decimal does not tell apart. */
const noonSlackDeg = 0.1;

/** Highest sun of a day, degrees, whether the skyline hides it or not; null for a day without sun. */
export function highestSunDeg(day: Pick<DayShade, 'sunElevationDeg'>): number | null {
	return day.sunElevationDeg.length ? Math.max(...day.sunElevationDeg) : null;
}

/** Whether shade lasts up to the highest sun of the day, so that no height frees the field. */
export function shadedAtNoon(verdict: WinterVerdict, highestDeg: number | null): boolean {
	return (
		verdict.clearAboveDeg !== null && highestDeg !== null && verdict.clearAboveDeg > highestDeg - noonSlackDeg
	);
}

/** Where the field stands beside the rule; `highestDeg` is the highest sun of that day. */
export function clearAboveSentence(verdict: WinterVerdict, highestDeg: number | null): string {
	if (verdict.clearAboveDeg === null)
		return 'No tracker is shaded by others or by obstacles on the shortest day.';
	if (highestDeg === null || !shadedAtNoon(verdict, highestDeg))
		return `All are in full sun once it stands above ${degreesWords(verdict.clearAboveDeg)}.`;
	const tags = verdict.brokenBy
		.filter((each) => each.shadedUpToDeg > highestDeg - noonSlackDeg)
		.map((each) => each.tag);
	// The sentence before names them already: many are counted here.
	const who =
		tags.length === 0
			? 'Some trackers are'
			: tags.length === 1
				? `${tags[0]} is`
				: tags.length === 2
					? `${listWords(tags)} are`
					: `${tags.length} trackers are`;
	return `${who} shaded even at noon, with the sun at its highest (${degreesWords(highestDeg)}).`;
}
