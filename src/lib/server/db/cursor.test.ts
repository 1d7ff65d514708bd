import { describe, expect, it } from 'vitest';
import { AppError } from '../errors';
import { readCursor, writeCursor } from './cursor';

describe('a cursor', () => {
	it('comes back as it was written', () => {
		const now = Date.now();
		expect(readCursor(writeCursor([now, 'id']), ['number', 'string'])).toEqual([now, 'id']);
	});

	it.each([
		['text that is none', 'garbage'],
		['a moment that no date can hold', writeCursor([1e99, 'a'])],
		['a moment beyond the database', writeCursor([8.64e15, 'a'])],
		['a number below zero', writeCursor([-1, 'a'])],
		['a broken number', writeCursor([0.5, 'a'])],
		['too few parts', writeCursor([1])],
		['another kind of part', writeCursor(['1', 'a'])]
	])('is refused when it is %s', (_what, text) => {
		expect(() => readCursor(text, ['number', 'string'])).toThrow(AppError);
	});
});
