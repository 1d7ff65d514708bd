import { describe, expect, it } from 'vitest';
import type { MoveAnswer } from '$lib/core';
import { clearHeightSentence, gainWords, moveSentence, whenWords, windowWords } from './answer-words';

const move: MoveAnswer = {
	lossPerMetreEast: 0,
	lossPerMetreNorth: 0.0001,
	bestAzimuthDeg: 180,
	gainPerMetre: 0.0001,
	gainOfOneMetre: null,
	smooth: true,
	blockedBy: null
};

describe('words of the answers', () => {
	it('say when, and to whom', () => {
		expect(whenWords({ month: 11, half: 'morning' })).toBe('mostly on December mornings');
	});

	it('say which way and what for, and what is in the way', () => {
		expect(moveSentence('B07', move)).toBe(
			"Best way to move: towards 180° (south), about 0.010\u00a0% of the field's beam for the first metre."
		);
		expect(moveSentence('B07', { ...move, gainOfOneMetre: 0.00009 })).toContain('computed with it there');
		expect(moveSentence('B07', { ...move, smooth: false })).toContain('kink');
		expect(moveSentence('B07', { ...move, blockedBy: { kind: 'tracker', name: 'B08' } })).toContain(
			'The reach circle of B08 is in the way.'
		);
		expect(moveSentence('B07', { ...move, bestAzimuthDeg: null })).toContain('nothing worth the walk');
	});

	it('keep digits where gains are small', () => {
		expect(gainWords(0.012)).toBe('1.20\u00a0%');
		expect(gainWords(0.00004)).toBe('0.0040\u00a0%');
	});

	it('tell a window by clock and by sun', () => {
		const fromMs = Date.UTC(2026, 11, 21, 9, 12);
		const toMs = Date.UTC(2026, 11, 21, 13, 3);
		expect(windowWords({ fromMs, toMs, fromSolarHour: 9.64, toSolarHour: 13.49 }, 'Europe/Rome')).toBe(
			'10:12–14:03 by the clock, 09:38–13:29 solar\u00a0time'
		);
	});

	it('tell a clear height, or that there is none to tell', () => {
		expect(clearHeightSentence('The field', 28.16, 147, 68.4)).toContain('above 28.2°');
		expect(clearHeightSentence('The field', 68.44, 180, 68.45)).toContain('never clear in the year');
		expect(clearHeightSentence('The field', 68.3, 180, 68.45)).toContain('is clear whenever');
		expect(clearHeightSentence('A01', null, null, 68.4)).toBe(
			'A01 is never shaded, wherever the sun of the year stands.'
		);
	});
});
