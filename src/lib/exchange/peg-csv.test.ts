import { describe, expect, it } from 'vitest';
import { inventedPlan } from '../../../tests/fixtures/invented-field';
import { writeGeoJson } from './geojson-writer';
import { writePegCsv } from './peg-csv';
import { compareTags } from './peg-csv-rows';
import { localFromLonLat } from './plan-projection';

const names = {
	project: 'P',
	layout: 'L',
	layoutRevision: 1,
	revision: 'A',
	issuedAt: '2026-12-01T12:00:00.000Z'
};

describe('the peg list', () => {
	const { rows } = inventedPlan(6, 3);

	it('has a header, CRLF line ends and one line for each tracker in the order of tags', () => {
		const lines = writePegCsv(rows).split('\r\n');
		expect(lines).toHaveLength(20);
		expect(lines[19]).toBe('');
		expect(lines[0].split(',').slice(0, 5)).toEqual(['number', 'tag', 'peg_id', 'e_m', 'n_m']);
		expect(lines[1].split(',').slice(0, 8)).toEqual([
			'1',
			'A01',
			'PEG-0001',
			'-32.500',
			'10.500',
			'-2.925',
			'2.800',
			'-0.125'
		]);
		expect(lines[8].startsWith('8,B02,')).toBe(true);
	});

	it('defuses texts that a spreadsheet would run and quotes the rest, but leaves negative numbers alone', () => {
		const text = writePegCsv([{ ...rows[0], tag: '=1+1', modelName: 'Big, "quoted"' }]);
		expect(text).toContain(",'=1+1,");
		expect(text).toContain(',"Big, ""quoted""",');
		expect(text).toContain(',-32.500,');
	});

	it('writes no minus before zero', () => {
		expect(writePegCsv([{ ...rows[0], eastM: -0.0001 }])).toContain(',PEG-0001,0.000,');
	});

	it('orders tags by letters and then by the size of numbers', () => {
		expect(['A10', 'A2', 'B1', 'A02', 'a1'].sort(compareTags)).toEqual(['A02', 'A2', 'A10', 'B1', 'a1']);
	});
});

describe('the GeoJSON of a plan', () => {
	const { place, plot, rows } = inventedPlan(6, 3);

	it('follows RFC 7946: closed rings, outer counter-clockwise, holes clockwise, at most 7 decimals', () => {
		const clockwise = { ...plot, boundary: [{ outer: [...plot.boundary[0].outer].reverse(), holes: [] }] };
		const land = JSON.parse(writeGeoJson(place, clockwise, rows, names)).features[0];
		const [ring] = land.geometry.coordinates[0] as [number, number][][];
		expect(ring[0]).toEqual(ring[ring.length - 1]);
		const area = ring.reduce((sum, [x, y], i) => {
			const [nx, ny] = ring[(i + 1) % ring.length];
			return sum + x * ny - nx * y;
		}, 0);
		expect(area).toBeGreaterThan(0);
		for (const [lon, lat] of ring) {
			expect(String(lon)).toMatch(/^-?\d+(\.\d{1,7})?$/);
			expect(String(lat)).toMatch(/^-?\d+(\.\d{1,7})?$/);
		}
	});

	it('gives positions that lead back to the pegs within 12 mm, the step of the last decimal', () => {
		const { features } = JSON.parse(writeGeoJson(place, plot, rows, names));
		const toLocal = localFromLonLat(place);
		const trackers = features.filter(
			(f: { properties: { kind: string } }) => f.properties.kind === 'tracker'
		);
		expect(trackers).toHaveLength(18);
		for (const { geometry, properties } of trackers) {
			const [eastM, northM] = toLocal(geometry.coordinates[0], geometry.coordinates[1]);
			expect(Math.hypot(eastM - properties.eastM, northM - properties.northM)).toBeLessThan(0.012);
		}
	});
});
