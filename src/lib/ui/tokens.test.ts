import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { contrastRatio } from './contrast';
import { darkTokens, lightTokens, type TokenName, type Tokens } from './tokens';

const css = readFileSync(new URL('../../app.css', import.meta.url), 'utf8');

function cssTokens(opening: string): Record<string, string> {
	const start = css.indexOf(opening);
	const block = css.slice(start, css.indexOf('\n}', start));
	const found: Record<string, string> = {};
	for (const [, name, value] of block.matchAll(/--color-([a-z-]+):\s*(#[0-9a-f]{6});/g)) {
		found[name.replace(/-([a-z])/g, (_, letter: string) => letter.toUpperCase())] = value;
	}
	return found;
}

/** Text pairs: 4.5:1 (WCAG 2.2, 1.4.3). */
const textPairs: [TokenName, TokenName][] = [
	...(['paper', 'sheet'] as const).flatMap((ground) =>
		(['ink', 'inkSoft', 'sunInk', 'shade', 'blind', 'clear', 'stop'] as const).map(
			(text): [TokenName, TokenName] => [text, ground]
		)
	),
	['onSun', 'sun'],
	['onStop', 'stop'],
	['paper', 'ink'],
	['sheet', 'ink'],
	...(['sunWash', 'shadeWash', 'blindWash', 'clearWash', 'stopWash', 'frost'] as const).map(
		(ground): [TokenName, TokenName] => ['ink', ground]
	),
	['sunInk', 'sunWash'],
	['shade', 'shadeWash'],
	['blind', 'blindWash'],
	['clear', 'clearWash'],
	['stop', 'stopWash'],
	['inkSoft', 'field']
];

/** Controls and marks: 3:1 (WCAG 2.2, 1.4.11). The sun's disc on light paper is always outlined in ink or labelled. */
const markPairs: [TokenName, TokenName][] = [
	['edge', 'sheet'],
	['edge', 'paper'],
	['ink', 'hill'],
	['shade', 'hill'],
	['blind', 'sheet'],
	['clear', 'sheet']
];

describe.each<[string, Tokens, string]>([
	['light', lightTokens, '@theme {'],
	['dark', darkTokens, ":root[data-theme='dark'] {"]
])('the %s tokens', (_name, tokens, opening) => {
	it('stand in app.css with the same values', () => {
		expect(cssTokens(opening)).toEqual(tokens);
	});

	it.each(textPairs)('give text in %s on %s a contrast of at least 4.5', (text, ground) => {
		expect(contrastRatio(tokens[text], tokens[ground])).toBeGreaterThanOrEqual(4.5);
	});

	it.each(markPairs)('give marks in %s on %s a contrast of at least 3', (mark, ground) => {
		expect(contrastRatio(tokens[mark], tokens[ground])).toBeGreaterThanOrEqual(3);
	});
});

describe('contrast', () => {
	it('is 21 for black on white and 1 for a colour on itself, as WCAG defines it', () => {
		expect(contrastRatio('#000000', '#ffffff')).toBeCloseTo(21, 9);
		expect(contrastRatio('#4d4a86', '#4d4a86')).toBe(1);
	});
});
