import { describe, expect, it } from 'vitest';
import { readHeights } from './read-heights';

const points = [
	[0.5, -30, 12.4],
	[-20, -30.25, 12.9],
	[0, 30, 1313.1]
];

describe('pasted heights', () => {
	it.each([
		['blanks', '0.5 -30 12.4\n-20 -30.25 12.9\n0 30 1313.1'],
		['tabs and a heading', 'East\tNorth\tHeight\r\n0.5\t-30\t12.4\r\n-20\t-30.25\t12.9\r\n0\t30\t1313.1\r\n'],
		['semicolons and decimal commas', '0,5;-30;12,4\n-20;-30,25;12,9\n0;30;1313,1'],
		['commas', '0.5,-30,12.4\n-20,-30.25,12.9\n0,30,1313.1'],
		['commas with blanks', '0.5, -30, 12.4\n-20, -30.25, 12.9\n0, 30, 1313.1'],
		['decimal commas between blanks', '# levels\n\n0,5 -30 12,4\n  -20   -30,25  12,9\n0 30 1313,1']
	])('are read between %s', (_, text) => {
		expect(readHeights(text)).toEqual({ points, problems: [], more: 0 });
	});

	it('are refused line by line, with the number of the line and what to give', () => {
		const read = readHeights('0 0 1\n5 5\n0 ten 3\n0 99999 3\n\n1 2 3 4');
		expect(read.problems).toEqual([
			{ line: 2, message: '2 values: give east, north and height.' },
			{ line: 3, message: '“ten” is no number for the north.' },
			{ line: 4, message: 'The north must lie between -20000 and 20000 m.' },
			{ line: 6, message: '4 values: give east, north and height.' }
		]);
		expect(readHeights('x 1\n'.repeat(30)).more).toBe(22);
	});

	it('are refused as a whole: too few, on one line, two heights at one place', () => {
		const message = (text: string) => readHeights(text).problems[0];
		expect(message('0 0 1\n5 5 2').message).toContain('three places');
		expect(message('0 0 1\n5 5 2\n9 9 2').message).toContain('one line');
		expect(message('# a\n0 0 1\n5 5 2\n9 0 2\n\n5 5 8')).toEqual({
			line: 6,
			message: 'Heights 2 and 4 stand at the same place and differ by 6.00 m: take one out.'
		});
		expect(
			message(Array.from({ length: 20_001 }, (_, k) => `${k % 150} ${k / 150} 1`).join('\n')).message
		).toContain('at most 20000');
	});
});
