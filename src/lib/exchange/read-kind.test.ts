import { describe, expect, it } from 'vitest';
import { readKind } from './read-kind';

const kindOf = (text: string, name: string, wanted: 'boundary' | 'skyline' | null = null) => {
	const found = readKind(text, name, wanted);
	return found.ok ? found.kind : found.problem;
};

describe('what a file for the plot is', () => {
	it.each([
		['{"type":"Polygon"}', 'land.txt', 'boundary'],
		['  [1, 2', 'land.geojson', 'boundary'],
		['bearing;height\n80;4,5', 'horizon.txt', 'skyline'],
		['80,4.5\r\n90,5', 'horizon', 'skyline'],
		['80\t4,5', 'horizon.csv', 'skyline'],
		['"80","4.5"', 'horizon.csv', 'skyline'],
		['-170° 3.5°', 'horizon.txt', 'skyline'],
		['<kml></kml>', 'land.kml', 'boundary'],
		['', 'empty.csv', 'skyline']
	])('tells %j in %s by what stands in it', (text, name, kind) => {
		expect(kindOf(text, name)).toBe(kind);
	});

	it.each([
		['Dear colleague, the plot is behind the barn.\nRegards', 'plot.txt'],
		['bearing;height\noak;tall', 'horizon.csv'],
		['12 May\nRegards', 'note.txt'],
		['<html></html>', 'page.html']
	])('refuses %j in %s and says what is taken', (text, name) => {
		for (const wanted of [null, 'boundary', 'skyline'] as const) {
			const found = readKind(text, name, wanted);
			expect(found.ok).toBe(false);
			if (!found.ok) expect(found.remedy).toMatch(/GeoJSON.*CSV/);
		}
	});
});
