import type { WinterRule } from '$lib/core/document';
import type { WinterVerdict } from '$lib/core/results';
import { formatHours, formatNumber } from '$lib/i18n';

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
	const [worst] = verdict.brokenBy;
	const others = verdict.brokenBy.length - 1;
	const who =
		others === 0 ? `${worst.tag} is` : `${worst.tag} and ${others} ${others === 1 ? 'other' : 'others'} are`;
	const highestDeg = verdict.brokenBy.reduce((most, each) => Math.max(most, each.shadedUpToDeg), 0);
	return verdict.rule.kind === 'clear-above'
		? `Not met: ${who} shaded${others === 0 ? '' : ','} up to ${degreesWords(highestDeg)}.`
		: `Not met: ${who} shaded ${ruleSpanWords(verdict.rule)}.`;
}

/** Where the field stands beside the rule. */
export function clearAboveSentence(verdict: WinterVerdict): string {
	return verdict.clearAboveDeg === null
		? 'No tracker is shaded by others or by obstacles on the shortest day.'
		: `All are in full sun once it stands above ${degreesWords(verdict.clearAboveDeg)}.`;
}
