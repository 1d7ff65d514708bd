import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { parseCoordinates } from './parse-coordinates';

/** 45°04′12″ N is 45.07°, 7°41′24″ E is 7.69°: minutes are sixtieths, seconds 3600ths of a degree. */
const here: [number, number] = [45.07, 7.69];

function read(text: string): [number, number] {
	const parsed = parseCoordinates(text);
	if (!parsed.ok) throw new Error(`${text}: ${parsed.message}`);
	return [parsed.latitudeDeg, parsed.longitudeDeg];
}

describe('coordinates as people write them', () => {
	it.each([
		'45.07, 7.69',
		'45.07,7.69',
		'45.07 7.69',
		'(45.07, 7.69)',
		'45.07 N, 7.69 E',
		'N 45.07 E 7.69',
		'N45.07, E7.69',
		'7.69 E, 45.07 N',
		'45,07; 7,69',
		'45,07 7,69',
		'45,07, 7,69',
		'45,07° N 7,69° E',
		'45°04′12″N 7°41′24″E',
		'45° 4\' 12" N, 7° 41\' 24" E',
		'45º04’12”N, 7º41’24”E',
		"45°04'12'' 7°41'24''",
		'45 04 12 N 7 41 24 E',
		'45 04 12 7 41 24',
		'45 04.2 7 41.4',
		"45°04.2' N 7°41.4' E",
		'Lat: 45.07, Lon: 7.69',
		'latitude 45.07 longitude 7.69',
		'45.07 Nord, 7.69 Est',
		'45.07 / 7.69',
		'45.07\t7.69',
		'geo:45.07,7.69',
		'geo:45.07,7.69;crs=wgs84;u=20',
		'https://maps.example/place/A+farm/@45.07,7.69,15z/data=!3m1',
		'https://maps.example/?q=45.07,7.69&z=12',
		'https://maps.example/map?z=12&ll=45.07%2C7.69',
		'https://maps.example/@45.07,7.69,15z?q=45.07,7.69'
	])('reads %j', (text) => {
		const [latitudeDeg, longitudeDeg] = read(text);
		expect(latitudeDeg).toBeCloseTo(here[0], 9);
		expect(longitudeDeg).toBeCloseTo(here[1], 9);
	});

	it('reads the southern and western halves by letter, word or sign', () => {
		for (const text of [
			'33.5 S, 70.6 W',
			'-33.5, -70.6',
			'33,5 S 70,6 O',
			'\u221233.5 \u221270.6',
			'70.6 ouest 33.5 sud'
		]) {
			expect(read(text)).toEqual([-33.5, -70.6]);
		}
	});

	it('says that O was read as west', () => {
		expect(parseCoordinates('33.5 N, 70.6 O')).toMatchObject({
			longitudeDeg: -70.6,
			note: expect.stringContaining('west')
		});
	});

	it('keeps the altitude of a geo: address (RFC 5870, 3.3)', () => {
		expect(parseCoordinates('geo:48.2010,16.3695,183')).toEqual({
			ok: true,
			latitudeDeg: 48.201,
			longitudeDeg: 16.3695,
			altitudeM: 183
		});
	});

	it.each([
		['', 'Write latitude and longitude'],
		['somewhere nice', 'Two numbers are needed'],
		['45.07', 'Two numbers are needed'],
		['45,7', 'Two numbers are needed'],
		['107.69, 45.07', 'Latitude comes first'],
		['45.07, 207.69', 'longitude reads 207.69'],
		['45.07 N, 7.69 N', 'same axis'],
		['45°61′ N 7°41′ E', 'below 60'],
		['45.5°30′ N 7°41′ E', 'only the last part'],
		['-45 N, 7 E', 'minus sign and a letter'],
		['geo:45.07,7.69;crs=nad27', 'WGS 84'],
		['https://maps.example/@45.07,7.69,15z?q=46.1,8.2', '2 different places'],
		['https://maps.example/@107.69,45.07,15z', 'Latitude comes first'],
		['https://maps.example/?q=a+farm', 'Two numbers are needed'],
		['x'.repeat(201), 'too long']
	])('refuses %j with a remedy', (text, words) => {
		const parsed = parseCoordinates(text);
		expect(parsed.ok).toBe(false);
		if (!parsed.ok) expect(parsed.message).toContain(words);
	});

	it('takes a link that is longer than anything typed', () => {
		expect(read(`https://maps.example/@45.07,7.69,15z/${'a'.repeat(600)}`)).toEqual(here);
		expect(parseCoordinates(`https://maps.example/@45.07,7.69/${'a'.repeat(2000)}`).ok).toBe(false);
	});

	it('reads back any place that it would write itself', () => {
		const latitude = fc.integer({ min: -900000, max: 900000 });
		const longitude = fc.integer({ min: -1800000, max: 1800000 });
		fc.assert(
			fc.property(latitude, longitude, (a, b) => {
				const text = `${Math.abs(a / 1e4).toFixed(4)}° ${a < 0 ? 'S' : 'N'}, ${Math.abs(b / 1e4).toFixed(4)}° ${b < 0 ? 'W' : 'E'}`;
				const [latitudeDeg, longitudeDeg] = read(text);
				expect(latitudeDeg).toBeCloseTo(a / 1e4, 9);
				expect(longitudeDeg).toBeCloseTo(b / 1e4, 9);
			}),
			{ seed: 20, numRuns: 300 }
		);
	});
});
