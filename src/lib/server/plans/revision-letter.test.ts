import { describe, expect, it } from 'vitest';
import { nextRevision } from './revision-letter';

describe('revision letters', () => {
	it('begin with A and run through the alphabet', () => {
		expect(nextRevision(null)).toBe('A');
		expect(nextRevision('A')).toBe('B');
		expect(nextRevision('Y')).toBe('Z');
	});

	it('go on with two letters after Z', () => {
		expect(nextRevision('Z')).toBe('AA');
		expect(nextRevision('AZ')).toBe('BA');
		expect(nextRevision('ZZ')).toBe('AAA');
	});

	it('never repeat in the first thousand', () => {
		const seen = new Set<string>();
		let letter: string | null = null;
		for (let i = 0; i < 1000; i += 1) {
			letter = nextRevision(letter);
			expect(seen.has(letter)).toBe(false);
			seen.add(letter);
		}
	});
});
