import { describe, expect, it } from 'vitest';
import { inventedPlan } from '../../../tests/fixtures/invented-field';
import { pegRows } from '$lib/exchange/peg-csv-rows';
import { writeGeoJson } from '$lib/exchange/geojson-writer';
import { groundHeightM, type GroundPoint, type Obstacle } from '../core';
import type { Mark, TextMark } from './drawing';
import type { PlanContent } from './plan-content';
import { obstacleCodes } from './obstacle-codes';
import { planSheets } from './plan-sheets';

const obstacles: Obstacle[] = [
	{
		id: 'b1',
		kind: 'building',
		name: 'Barn',
		eastM: -40,
		northM: -20,
		corners: [
			[0, 0],
			[12, 0],
			[12, 6],
			[0, 6]
		],
		heightM: 4,
		roof: { kind: 'pitched', riseM: 2.5, ridgeDeg: 90 }
	},
	{
		id: 'w1',
		kind: 'wall',
		name: 'Deer fence',
		eastM: -40,
		northM: 20,
		line: [
			[0, 0],
			[30, 0],
			[30, 4]
		],
		heightM: 2,
		thicknessM: 0.1,
		transmission: 0.6
	},
	{ id: 'm1', kind: 'mast', name: 'Line pole', eastM: 40, northM: 0, heightM: 11, radiusM: 0.16 }
];

function content(): PlanContent {
	const plan = inventedPlan(6, 3);
	plan.plot.obstacles = obstacles;
	plan.plot.ground = {
		kind: 'points',
		points: Array.from({ length: 400 }, (_, k): GroundPoint => {
			const [e, n] = [((k * 7919) % 10007) / 50 - 100, ((k * 6311) % 9973) / 80 - 62];
			return [e, n, 0.001 * (e * e + n * n)];
		})
	};
	return { ...plan, rows: pegRows(plan.place, plan.plot, plan.layout) };
}
const flat = (marks: Mark[]): Mark[] =>
	marks.flatMap((mark) => (mark.kind === 'clip' ? flat(mark.marks) : [mark]));
const words = (marks: Mark[]) =>
	flat(marks)
		.filter((mark): mark is TextMark => mark.kind === 'text')
		.map((mark) => mark.text);

describe('sheets of a plot with buildings, walls and masts on measured ground', () => {
	const plan = content();
	const sheets = planSheets(plan);
	const site = sheets.find(({ name }) => name.startsWith('S')) ?? sheets[0];

	it('give every kind a code of its own and say each in the legend', () => {
		expect(obstacleCodes(obstacles)).toEqual(['B1', 'W1', 'M1']);
		const said = words(site.marks).join(' ');
		for (const part of ['B: building', 'W: wall', 'M: mast', 'B1', 'W1', 'M1']) expect(said).toContain(part);
	});

	it('list their heights to the ridge and their sizes', () => {
		const list = words(sheets.find(({ name }) => name === 'Obstacles')?.marks ?? []);
		expect(list).toContain('6.50');
		expect(list).toContain('4 corners, eaves 4.00, ridge along 90.0°');
		expect(list).toContain('34.00 long, 0.10 thick, 60 % passes');
		expect(list).toContain('fence');
		expect(list).toContain('radius 0.16');
	});

	it('draw contours with their levels, and say what the ground is', () => {
		const ground = flat(site.marks).filter((mark) => 'layer' in mark && mark.layer === 'ground');
		expect(ground.length).toBeGreaterThan(50);
		const said = words(site.marks);
		expect(said.join(' ')).toContain('400 measured heights');
		expect(said).toContain('measured');
		expect(said.filter((word) => /^\d\.[0257]\d$/.test(word)).length).toBeGreaterThan(5);
	});

	it('peg levels are those of the ground under each tracker', () => {
		for (const row of plan.rows) {
			expect(row.groundM).toBe(groundHeightM(plan.plot.ground, row.eastM, row.northM));
		}
		expect(new Set(plan.rows.map((row) => row.groundM)).size).toBeGreaterThan(6);
	});
});

describe('obstacles in GeoJSON', () => {
	it('are a polygon, a line and a point, with their heights', () => {
		const plan = content();
		const names = {
			project: 'Invented',
			layout: 'One',
			layoutRevision: 1,
			revision: 'A',
			issuedAt: '2026-01-01T00:00:00Z'
		};
		const { features } = JSON.parse(writeGeoJson(plan.place, plan.plot, plan.rows, names)) as {
			features: { id: string; geometry: { type: string; coordinates: unknown[][] }; properties: object }[];
		};
		const of = (id: string) => features.find((feature) => feature.id === `obstacle-${id}`);
		expect(of('b1')?.geometry.type).toBe('Polygon');
		const ring = of('b1')?.geometry.coordinates[0] ?? [];
		expect(ring).toHaveLength(5);
		expect(ring[0]).toEqual(ring[4]);
		expect(of('w1')?.geometry.type).toBe('LineString');
		expect(of('w1')?.geometry.coordinates).toHaveLength(3);
		expect(of('m1')?.geometry.type).toBe('Point');
		expect(of('b1')?.properties).toMatchObject({ kind: 'building', heightM: 4 });
		expect(of('b1')?.properties).not.toHaveProperty('corners');
	});
});
