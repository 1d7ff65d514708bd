import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { readSkyline } from './read-skyline';

function taken(text: string | Uint8Array) {
	const result = readSkyline(text);
	if (!result.ok) throw new Error(`${result.message} ${result.remedy}`);
	return result;
}

const pairs = (text: string) => taken(text).points.map((point) => [point.azimuthDeg, point.elevationDeg]);

describe('a skyline from CSV', () => {
	const wanted = [
		[80, 4.5],
		[120.5, 6],
		[160, 3]
	];

	it.each([
		['comma', '80,4.5\n120.5,6\n160,3'],
		['semicolon with decimal commas', '80;4,5\n120,5;6,0\n160;3'],
		['tab with decimal commas', '80\t4,5\n120,5\t6\n160\t3'],
		['blanks with decimal commas', '80 4,5\n120,5 6\n160 3'],
		['headings and Windows line ends', 'bearing,height\r\n80,4.5\r\n120.5,6\r\n160,3\r\n'],
		['exchanged columns with headings', 'Höhe;Azimut\n4,5;80\n6;120,5\n3;160'],
		['a third column named', 'bearing,height,note\n80,4.5,oak\n120.5,6,\n160,3,roof'],
		['unsorted, with units, comments and empty lines', '# invented\n160°,3°\n\n80°,4.5°\n120.5,6\n'],
		['a byte order mark', '\ufeffbearing,height\n80,4.5\n120.5,6\n160,3']
	])('is read with %s', (_name, text) => {
		expect(pairs(text)).toEqual(wanted);
	});

	it('turns negative bearings and 360 round', () => {
		expect(pairs('-30,5\n360,2\n90,1')).toEqual([
			[0, 2],
			[90, 1],
			[330, 5]
		]);
		expect(taken('-30,5\n40,2').warnings.join(' ')).toContain('−30 is 330°');
	});

	it('keeps the highest of two heights at one bearing and says so', () => {
		expect(pairs('10,5\n10,7\n20,1')).toEqual([
			[10, 7],
			[20, 1]
		]);
		expect(taken('10,5\n10,7\n20,1').warnings[0]).toContain('highest is kept');
	});

	it('warns of gaps wider than 45 degrees, over north too', () => {
		const { warnings } = taken('10,1\n50,1\n90,1\n130,1\n170,1\n210,1\n250,1\n290,1');
		expect(warnings).toHaveLength(1);
		expect(warnings[0]).toContain('from 290° to 010° (80°)');
	});

	it('reads the sample', () => {
		const reading = taken(new Uint8Array(readFileSync('tests/fixtures/invented-skyline.csv')));
		expect(reading.points).toHaveLength(27);
		expect(reading.warnings).toEqual([]);
		expect(reading.sentence).toContain('highest at 085° with 7.8°');
	});

	it.each([
		['empty', '', /empty/],
		['too-few-rows', '80,4', /one row/],
		['too-few-rows', 'bearing,height', /no row/],
		['too-few-rows', '80,4\n80,5', /same bearing/],
		['not-a-number', '80,4\n120,tall', /Row 2, column 2 \(height\) is "tall"/],
		['not-a-number', '80,4\nNaN,5', /Row 2, column 1 \(bearing\)/],
		['missing', '80;4\n120;', /Row 2, column 2 \(height\) is empty/],
		['out-of-range', '80,4\n400,5', /Row 2, column 1 \(bearing\) is 400/],
		['out-of-range', '80,4\n100,75', /Row 2, column 2 \(height\) is 75/],
		['wrong-columns', '80,4,5\n120,5,6', /3 columns/],
		['wrong-columns', '80\n120', /one column/],
		['wrong-type', '<html></html>', /not a CSV/],
		['wrong-type', '{"a":1}', /not a CSV/]
	])('refuses %s: %j', (problem, text, message) => {
		const result = readSkyline(text);
		expect(result).toMatchObject({ ok: false, problem });
		if (!result.ok) {
			expect(result.message).toMatch(message);
			expect(result.remedy.length).toBeGreaterThan(10);
		}
	});

	it('refuses what is not UTF-8 and what is too large', () => {
		expect(readSkyline(new Uint8Array([0x62, 0xe4, 0x0a]))).toMatchObject({ problem: 'not-utf8' });
		expect(readSkyline(new Uint8Array(6_000_000))).toMatchObject({ problem: 'too-large' });
	});
});
