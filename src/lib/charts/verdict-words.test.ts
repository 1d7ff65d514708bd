import { describe, expect, it } from 'vitest';
import type { WinterVerdict } from '$lib/core/results';
import { asksNothing, clearAboveSentence, ruleWords, shadedAtNoon, verdictSentence } from './verdict-words';

const above: WinterVerdict = {
	rule: { kind: 'clear-above', elevationDeg: 12 },
	date: '2026-12-21',
	met: true,
	brokenBy: [],
	clearAboveDeg: 11.36,
	judgedMinutes: 240
};
const b03 = { trackerId: 'b', tag: 'B03', shadedUpToDeg: 14.24, minutes: 35 };
const a01 = { trackerId: 'a', tag: 'A01', shadedUpToDeg: 12.6, minutes: 10 };

describe('the winter rule in words', () => {
	it('says that a height rule is met', () => {
		expect(verdictSentence(above)).toBe('Met: no tracker is shaded while the sun is above 12°.');
		expect(clearAboveSentence(above, 23)).toBe('All are in full sun once it stands above 11.4°.');
	});

	it('names the worst tracker and counts the others', () => {
		expect(verdictSentence({ ...above, met: false, brokenBy: [b03] })).toBe(
			'Not met: B03 is shaded up to 14.2°.'
		);
		expect(verdictSentence({ ...above, met: false, brokenBy: [b03, a01] })).toBe(
			'Not met: B03 is shaded up to 14.2°, A01 up to 12.6°.'
		);
		// The worst is shaded longest; another one may be shaded higher.
		expect(verdictSentence({ ...above, met: false, brokenBy: [a01, b03] })).toBe(
			'Not met: B03 is shaded up to 14.2°, A01 up to 12.6°.'
		);
	});

	it('says each height of those only for whom it holds', () => {
		const at = (tag: string, shadedUpToDeg: number) => ({ trackerId: tag, tag, shadedUpToDeg, minutes: 5 });
		const some = [at('B07', 22.98), at('C06', 21.4), at('E03', 23.01), at('E02', 14)];
		expect(verdictSentence({ ...above, met: false, brokenBy: some })).toBe(
			'Not met: B07 and E03 are shaded up to 23°, 2 others up to 14–21.4°.'
		);
		const many = ['A', 'B', 'C', 'D', 'E'].map((tag) => at(tag, 15));
		expect(verdictSentence({ ...above, met: false, brokenBy: many })).toBe(
			'Not met: A, B, C and 2 others are shaded up to 15°.'
		);
	});

	it('names who is shaded at noon, since no height frees them', () => {
		const noon = { ...b03, shadedUpToDeg: 22.98 };
		const verdict = { ...above, met: false, brokenBy: [a01, noon], clearAboveDeg: 22.98 };
		expect(shadedAtNoon(verdict, 23.02)).toBe(true);
		expect(clearAboveSentence(verdict, 23.02)).toBe(
			'B03 is shaded even at noon, with the sun at its highest (23°).'
		);
		expect(shadedAtNoon(verdict, 25)).toBe(false);
		expect(clearAboveSentence(verdict, 25)).toBe('All are in full sun once it stands above 23°.');
	});

	it('speaks of solar hours for a window rule', () => {
		const rule = { kind: 'clear-window', fromSolarHour: 9.5, toSolarHour: 14 } as const;
		expect(ruleWords(rule)).toBe('No tracker is shaded from 09:30 to 14:00 solar time on the shortest day.');
		expect(verdictSentence({ ...above, rule, met: false, brokenBy: [b03] })).toBe(
			'Not met: B03 is shaded from 09:30 to 14:00 solar time.'
		);
	});

	it('does not praise a field where the sun never stands so high', () => {
		const verdict = { ...above, clearAboveDeg: 8.4, judgedMinutes: 0 };
		expect(asksNothing(verdict)).toBe(true);
		expect(verdictSentence(verdict)).toBe(
			'The sun is never seen above 12° that day, so this rule asks for nothing here.'
		);
	});

	it('knows a field that is never shaded', () => {
		expect(clearAboveSentence({ ...above, clearAboveDeg: null }, 23)).toBe(
			'No tracker is shaded by others or by obstacles on the shortest day.'
		);
	});
});
