import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { comparison, summariseBoundary } from './area-sentence';
import {
	readBoundary,
	type BoundaryOptions,
	type BoundaryReading,
	type BoundaryRefusal
} from './read-boundary';
import { lonLatFromLocal } from './plan-projection';
import { refuseLargeFile } from './read-text';

const place = { latitudeDeg: 41.2, longitudeDeg: 14.5 };
const toLonLat = lonLatFromLocal(place);
type Ring = [number, number][];
const square: Ring = [
	[0, 0],
	[100, 0],
	[100, 50],
	[0, 50]
];

function degrees(ring: Ring, close = true): number[][] {
	const corners = ring.map(([e, n]) => toLonLat(e, n) as number[]);
	return close ? [...corners, corners[0]] : corners;
}

function polygon(...rings: number[][][]) {
	return { type: 'Polygon', coordinates: rings };
}

function read(value: unknown, options: BoundaryOptions = {}) {
	const input = typeof value === 'string' || value instanceof Uint8Array ? value : JSON.stringify(value);
	return readBoundary(input, 'land.geojson', place, options);
}

function taken(value: unknown, options: BoundaryOptions = {}): BoundaryReading {
	const result = read(value, options);
	if (!result.ok) throw new Error(`${result.message} ${result.remedy}`);
	return result;
}

function refused(value: unknown, options: BoundaryOptions = {}): BoundaryRefusal {
	const result = read(value, options);
	if (result.ok) throw new Error('This should have been refused.');
	expect(result.message).toMatch(/[.?]$/);
	expect(result.remedy).toMatch(/\.$/);
	return result;
}

const area = (reading: BoundaryReading) => reading.choices.reduce((sum, choice) => sum + choice.areaM2, 0);

describe('a boundary from GeoJSON', () => {
	it('is read from every type that can hold areas', () => {
		const one = polygon(degrees(square));
		const feature = { type: 'Feature', properties: { name: 'North field' }, geometry: one };
		for (const value of [
			one,
			feature,
			{ type: 'FeatureCollection', features: [feature] },
			{ type: 'MultiPolygon', coordinates: [one.coordinates] },
			{ type: 'GeometryCollection', geometries: [one] }
		]) {
			const reading = taken(value);
			expect(area(reading)).toBeCloseTo(5000, 3);
			expect(reading.choices[0].corners).toBe(4);
		}
		expect(taken(feature).choices[0].name).toBe('North field');
	});

	it('gives the area of a square of 0.001 degrees as a geodesic library does', () => {
		// 9481.607 m² and 392.856 m at 40 N 3.7 W on WGS84, computed with an independent geodesic library.
		const corner = { latitudeDeg: 40, longitudeDeg: -3.7 };
		const ring = [
			[-3.7, 40],
			[-3.699, 40],
			[-3.699, 40.001],
			[-3.7, 40.001],
			[-3.7, 40]
		];
		const reading = readBoundary(JSON.stringify(polygon(ring)), 'a.json', corner);
		if (!reading.ok) throw new Error(reading.message);
		const summary = summariseBoundary(reading.choices.map((choice) => choice.part));
		expect(summary.areaM2).toBeCloseTo(9481.607, 1);
		expect(summary.perimeterM).toBeCloseTo(392.856, 2);
	});

	it('is the same closed or not, and either way round', () => {
		const closed = taken(polygon(degrees(square)));
		const open = taken(polygon(degrees(square, false)));
		const turned = taken(polygon(degrees([...square].reverse())));
		expect(open.choices[0].part).toEqual(closed.choices[0].part);
		expect(turned.warnings.join(' ')).toContain('wrong way round');
		expect(closed.warnings).toEqual([]);
		const { outer } = turned.choices[0].part;
		const doubled = outer.reduce((sum, [e, n], i) => {
			const [e2, n2] = outer[(i + 1) % outer.length];
			return sum + e * n2 - e2 * n;
		}, 0);
		expect(doubled).toBeGreaterThan(0);
	});

	it('leaves third coordinates aside and repeated corners out', () => {
		const ring = degrees(square).map((corner) => [...corner, 312.4]);
		const reading = taken(polygon([ring[0], ring[1], ring[1], ...ring.slice(2)]));
		expect(reading.choices[0].corners).toBe(4);
		expect(reading.warnings.join(' ')).toContain('1 corner stood on the one before');
	});

	it('keeps holes and takes them off the area', () => {
		const hole: Ring = [
			[20, 10],
			[40, 10],
			[40, 30],
			[20, 30]
		];
		const reading = taken(polygon(degrees(square), degrees(hole)));
		expect(area(reading)).toBeCloseTo(4600, 3);
		expect(reading.choices[0].part.holes).toHaveLength(1);
		const far: Ring = hole.map(([e, n]) => [e + 200, n]);
		expect(refused(polygon(degrees(square), degrees(far))).problem).toBe('hole-outside');
	});

	it('offers several areas to choose from and counts what is no area', () => {
		const second: Ring = square.map(([e, n]) => [e + 150, n]);
		const reading = taken({
			type: 'FeatureCollection',
			features: [
				{ type: 'Feature', properties: { name: 'Upper' }, geometry: polygon(degrees(square)) },
				{ type: 'Feature', properties: null, geometry: polygon(degrees(second)) },
				{ type: 'Feature', properties: {}, geometry: { type: 'Point', coordinates: [14.5, 41.2] } },
				{ type: 'Feature', properties: {}, geometry: null }
			]
		});
		expect(reading.choices.map((choice) => choice.name)).toEqual(['Upper', 'Area 2']);
		expect(reading.warnings.join(' ')).toMatch(/1 point or line was left aside.*2 areas: choose/);
	});

	it('has a sentence that a person can check', () => {
		const big: Ring = [
			[300, -90],
			[510, -90],
			[510, 90],
			[300, 90]
		];
		const summary = summariseBoundary([{ outer: big, holes: [] }]);
		expect(summary.sentence.replaceAll('\u00a0', ' ')).toBe(
			"3.78 ha, 210 m east–west by 180 m north–south, 4 corners, 0.3 km from the project's place — about five football pitches."
		);
		expect(comparison(3500)).toBe('about half a football pitch');
		expect(comparison(520)).toBe('about two tennis courts');
		expect(comparison(12)).toBe('about one parking bay');
		expect(comparison(3)).toBe('smaller than a parking bay');
		expect(comparison(2_000_000).replaceAll('\u00a0', ' ')).toBe('about 2.0 km²');
	});

	it('reads the sample with more than 20 corners', () => {
		const reading = taken(new Uint8Array(readFileSync('tests/fixtures/invented-boundary.geojson')));
		expect(reading.choices[0].part.outer.length).toBeGreaterThan(20);
		expect(reading.choices[0].part.holes).toHaveLength(1);
		expect(reading.question).toBeNull();
	});

	it('takes a byte order mark', () => {
		const bytes = new TextEncoder().encode('\ufeff' + JSON.stringify(polygon(degrees(square))));
		expect(bytes[0]).toBe(0xef);
		expect(area(taken(bytes))).toBeCloseTo(5000, 3);
	});

	it('notes an old coordinate system member', () => {
		const crs = (name: string) => ({
			...polygon(degrees(square)),
			crs: { type: 'name', properties: { name } }
		});
		expect(taken(crs('urn:ogc:def:crs:EPSG::25833')).warnings.join(' ')).toContain('EPSG::25833');
		expect(taken(crs('urn:ogc:def:crs:OGC:1.3:CRS84')).warnings).toEqual([]);
	});

	it('asks when the land lies some kilometres off', () => {
		const off: Ring = square.map(([e, n]) => [e + 8050, n]);
		expect(taken(polygon(degrees(off))).question).toMatch(/8\.1\u00a0km east of the project's place.*\?/);
	});
});

describe('a boundary is refused with a remedy', () => {
	it('when the file is too large, before it is read', () => {
		expect(refuseLargeFile(50_000_000)?.message).toContain('50 MB');
		expect(refused(new Uint8Array(5_000_001)).problem).toBe('too-large');
	});

	it('when it has 100,000 corners, without a look at them', () => {
		const ring = Array.from({ length: 100_000 }, (_, i) => {
			const turn = (i / 100_000) * 2 * Math.PI;
			return toLonLat(500 * Math.cos(turn), 500 * Math.sin(turn)).map((value) => Number(value.toFixed(7)));
		});
		const result = refused(polygon([...ring, ring[0]]));
		expect(result.problem).toBe('too-many-corners');
		expect(result.message).toContain('100\u00a0000');
	});

	it('but 5,000 corners are taken', () => {
		const ring: Ring = Array.from({ length: 5000 }, (_, i) => {
			const turn = (i / 5000) * 2 * Math.PI;
			return [500 * Math.cos(turn), 500 * Math.sin(turn)];
		});
		expect(taken(polygon(degrees(ring))).choices[0].corners).toBe(5000);
	});

	it.each([
		['empty', ''],
		['empty', '  \r\n'],
		['not-json', '{"type": "Polygon",\n "coordinates": [[[14.5, 41.2],\n [14.501 41.2]]]}'],
		['not-json', '{"type": "Polygon", "coordinates": [[[14.5, 41.2],'],
		['not-a-number', '{"type":"Polygon","coordinates":[[[NaN,41.2],[14.6,41.2],[14.6,41.3]]]}'],
		['wrong-type', '<kml><Placemark/></kml>'],
		['wrong-type', '[1, 2, 3]'],
		['wrong-type', '{"type":"Topology"}'],
		['no-area', '{"type":"Point","coordinates":[14.5,41.2]}'],
		['no-area', '{"type":"FeatureCollection","features":[]}'],
		['malformed', '{"type":"Polygon"}'],
		['malformed', '{"type":"Polygon","coordinates":["a"]}']
	])('%s: %s', (problem, text) => {
		expect(refused(text).problem).toBe(problem);
	});

	it('naming the line of the fault', () => {
		const text = '{"type": "Polygon",\n "coordinates": [[[14.5, 41.2],\n [14.501 41.2]]]}';
		expect(refused(text).message).toContain('line 3, column 10');
	});

	it('when it is another kind of file', () => {
		expect(refused(new Uint8Array([0x50, 0x4b, 3, 4, 0, 0])).message).toContain('zip');
		expect(refused(new TextEncoder().encode('%PDF-1.7')).message).toContain('PDF');
		expect(readBoundary('abc', 'corners.csv', place)).toMatchObject({ ok: false, problem: 'wrong-type' });
	});

	it('when it is not UTF-8', () => {
		const latin1 = new Uint8Array([...new TextEncoder().encode('{"name":"'), 0xe8, 0x22, 0x7d]);
		expect(refused(latin1).problem).toBe('not-utf8');
		expect(refused(new Uint8Array([0xff, 0xfe, 0x7b, 0])).message).toContain('UTF-16');
	});

	it('when a coordinate is missing, naming where', () => {
		const ring = degrees(square) as unknown[];
		ring[2] = [14.5, null];
		expect(refused(polygon(ring as number[][])).message).toContain('corner 3');
		ring[2] = null;
		expect(refused(polygon(ring as number[][])).problem).toBe('not-a-number');
	});

	it('when fewer than three corners are left or nothing is enclosed', () => {
		expect(refused(polygon(degrees(square.slice(0, 2)))).problem).toBe('too-few-corners');
		const flat: Ring = [
			[0, 0],
			[50, 0],
			[100, 0]
		];
		expect(refused(polygon(degrees(flat))).problem).toBe('no-area');
	});

	it('when the outline crosses itself, naming where', () => {
		const bow: Ring = [
			[0, 0],
			[100, 50],
			[100, 0],
			[0, 50]
		];
		const result = refused(polygon(degrees(bow)));
		expect(result.problem).toBe('crosses');
		expect(result.message).toContain('50.0 m east, 25.0 m north');
	});

	it('when latitude and longitude are exchanged, and reads it swapped', () => {
		const swapped = polygon(degrees(square).map(([lon, lat]) => [lat, lon]));
		const result = refused(swapped);
		expect(result).toMatchObject({ problem: 'swapped', canSwap: true });
		expect(area(taken(swapped, { swap: true }))).toBeCloseTo(5000, 3);
	});

	it('when exchanged numbers make a latitude that does not exist', () => {
		const east = { latitudeDeg: 35, longitudeDeg: 139 };
		const ring = [
			[35, 139],
			[35, 139.001],
			[35.001, 139.001]
		];
		expect(readBoundary(JSON.stringify(polygon(ring)), 'a.json', east)).toMatchObject({ problem: 'swapped' });
	});

	it('when it is in metres of a grid', () => {
		const ring = [
			[458000, 4561000],
			[458100, 4561000],
			[458100, 4561100]
		];
		expect(refused(polygon(ring)).message).toContain('metres of a survey grid');
	});

	it('when it lies far away, with the place it would need', () => {
		const madrid = degrees(square).map(([lon, lat]) => [lon - 18.2, lat - 0.8]);
		const result = refused(polygon(madrid));
		expect(result.problem).toBe('far-away');
		expect(result.remedy).toContain('40.4');
	});

	it('when it lies across the 180° meridian', () => {
		const ring = [
			[179.999, -17],
			[-179.999, -17],
			[-179.999, -16.999]
		];
		const result = readBoundary(JSON.stringify(polygon(ring)), 'a.json', {
			latitudeDeg: -17,
			longitudeDeg: 180
		});
		expect(result).toMatchObject({ ok: false, problem: 'antimeridian' });
	});
});
