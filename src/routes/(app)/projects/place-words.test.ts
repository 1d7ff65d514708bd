import { describe, expect, it } from 'vitest';
import { hemisphereWords, placeWords } from './place-words';

const read = (latitudeDeg: number, longitudeDeg: number) =>
	placeWords(latitudeDeg, longitudeDeg, 2026).replaceAll('\u00a0', ' ');

describe('a place in words', () => {
	it('tells the noon sun: 90 - latitude -/+ 23.44 degrees at the solstices, lifted a little by the air', () => {
		expect(read(41.2, 14.5)).toMatch(
			/^Shortest day: 25\.4° at noon, 9 h \d\d min of sun\. Longest day: 72\.2° at noon/
		);
		expect(read(-33.5, -70.6)).toMatch(/^Shortest day: 33\.1° at noon/);
	});

	it('names the halves of the earth', () => {
		expect(hemisphereWords(43.75, 4.85)).toBe('Northern hemisphere, east of Greenwich');
		expect(hemisphereWords(-33.5, -70.6)).toBe('Southern hemisphere, west of Greenwich');
		expect(hemisphereWords(0, 0)).toBe('On the equator, on the meridian of Greenwich');
	});

	it('knows polar night and polar day', () => {
		expect(read(75, 20)).toMatch(/^Shortest day: no sun\. Longest day: 38\.5° at noon, sun all day\.$/);
	});
});
