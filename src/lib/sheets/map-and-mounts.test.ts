import { describe, expect, it } from 'vitest';
import { pegRows } from '$lib/exchange/peg-csv-rows';
import { inventedPlan } from '../../../tests/fixtures/invented-field';
import type { PlanPoint } from '../core';
import { overLand } from './draw-ground';
import type { Mark, Sheet, TextMark } from './drawing';
import { lineWidthMm } from './font-book';
import { cutsCircle, cutsRing, cutsSegment, type Box } from './paper-boxes';
import { placeTags, type PlacedTag, type TagWish } from './place-tags';
import type { PlanContent } from './plan-content';
import { planSheets } from './plan-sheets';
import { MIN_CAP_MM } from './text-fit';

function texts(marks: Mark[]): TextMark[] {
	return marks.flatMap((mark) =>
		mark.kind === 'clip' ? texts(mark.marks) : mark.kind === 'text' ? [mark] : []
	);
}
const words = (sheet: Sheet) => texts(sheet.marks).map((mark) => mark.text);
const named = (content: PlanContent, name: string) => {
	const sheet = planSheets(content).find((each) => each.name === name);
	if (!sheet) throw new Error(`No sheet ${name}.`);
	return sheet;
};
const redrawn = (content: PlanContent): PlanContent => ({
	...content,
	rows: pegRows(content.place, content.plot, content.layout)
});

describe('the mount sheet', () => {
	it('prints the axis height of the trackers as planned, not the model’s own', () => {
		const content = inventedPlan(6, 3);
		const modelM = content.layout.models[0].axisHeightM;
		const plannedM = modelM + 0.2;
		for (const tracker of content.layout.trackers) tracker.axisHeightM = plannedM;
		const all = words(named(redrawn(content), 'Sensor mount'));
		expect(all).toContain(`${plannedM.toFixed(2)} m above ground`);
		expect(all.join(' ')).not.toContain(`${modelM.toFixed(2)} m`);

		content.layout.trackers[0].axisHeightM = null;
		expect(words(named(redrawn(content), 'Sensor mount'))).toContain(
			`${modelM.toFixed(2)}–${plannedM.toFixed(2)} m, see coordinate table`
		);
	});

	it.each([
		[10, 7, 4],
		[10, 7, 30],
		[15, 12, 160]
	])(
		'of %i by %i trackers lists %i exceptions once each, and its words keep off the list',
		(columns, rows, count) => {
			const content = inventedPlan(columns, rows);
			for (const { id } of content.layout.trackers.slice(0, count)) {
				content.layout.mounts.exceptions[id] = { edge: 'left', alongM: 0.4, outM: 0.08, forwardM: 0.03 };
			}
			const sheets = planSheets(redrawn(content)).filter((sheet) => sheet.name.startsWith('Sensor mount'));
			const wanted = content.layout.trackers.slice(0, count).map(({ tag }) => tag);
			const listed = sheets.flatMap(words).filter((word) => wanted.includes(word));
			expect(listed.sort()).toEqual([...wanted].sort());
			const drawing = texts(sheets[0].marks);
			if (sheets.length > 1) {
				const own = drawing.find((mark) => /^\d+ of \d+$/.test(mark.text))?.text ?? '';
				const next = Number(own.split(' ')[0]) + 1;
				expect(drawing.some((mark) => mark.text.endsWith(`more: see sheet ${next}`))).toBe(true);
			}
			const looks = drawing.find((mark) => mark.text === 'looks square off the glass') as TextMark;
			expect(looks.anchor).toBe('end');
			const listLeftMm = (drawing.find((mark) => mark.text.startsWith('Exceptions')) as TextMark).at[0];
			expect(looks.at[0]).toBeLessThan(listLeftMm - 1);
		}
	);
});

describe('the obstacles sheet', () => {
	const tree = {
		id: 'tree',
		kind: 'tree',
		name: 'Cypress',
		eastM: 0,
		northM: 5,
		heightM: 9,
		crownBaseM: 2,
		crownRadiusM: 2,
		trunkRadiusM: 0.2,
		crownTransmission: 0.1,
		growthMPerYear: 0.3,
		maxHeightM: 15
	} as const;
	const withTree = (treeYears: number | null) => {
		const content = inventedPlan(6, 3, { treeYears });
		content.plot.obstacles = [{ ...tree }];
		return words(named(content, 'Obstacles'));
	};

	it('tells the height of today and the one that the shade was computed with', () => {
		// 9.00 m and ten years of 0.30 m make 12.00 m.
		const grown = withTree(10);
		expect(grown).toContain('9.00');
		expect(grown).toContain('12.00');
		expect(grown.join(' ')).toContain('shade computed with trees 10 years older: 12.00 m');
	});

	it('says that heights are those of the run only when they are', () => {
		expect(withTree(0).join(' ')).toContain('as the shade was computed with');
		expect(withTree(null).join(' ')).toContain('no shade run stands behind this layout');
		expect(withTree(10).join(' ')).not.toContain('as the shade was computed with');
	});
});

describe('the open points sheet', () => {
	it('names every tracker of a long point', () => {
		const content = inventedPlan(15, 12);
		const tags = content.rows.map((row) => row.tag);
		content.openPoints = [`The winter rule is not met: ${tags.join(', ')}.`];
		const all = words(named(content, 'Open points')).join(' ');
		for (const tag of tags) expect(all).toContain(tag);
		expect(all).not.toContain('…');
	});
});

describe('tags on the map', () => {
	const window = { xMm: 0, yMm: 0, widthMm: 200, heightMm: 200 };
	const boxOf = ({ text, capMm, at }: PlacedTag): Box => {
		const half = lineWidthMm(text, capMm, 800) / 2;
		return [at[0] - half, at[1] - capMm, at[0] + half, at[1]];
	};
	const awkward = (count: number): TagWish[] =>
		Array.from({ length: count }, (_, i) => ({
			text: `A${String(i + 1).padStart(2, '0')}`,
			// Rows that nearly touch; every seventh stands out of its row by a third of the pitch.
			at: [15 + (i % 10) * 13 + (i % 3), 15 + Math.floor(i / 10) * 11 + (i % 7 === 2 ? 3.2 : 0)],
			radiusMm: 3.6
		}));

	it('stand over or in their own circle, or are tied to their cross by a line', () => {
		const wishes = awkward(72);
		const placed = placeTags(wishes, window, false) ?? [];
		expect(placed).toHaveLength(72);
		expect(placed.some((tag) => tag.leader)).toBe(true);
		for (const tag of placed) {
			expect(tag.capMm).toBeGreaterThanOrEqual(MIN_CAP_MM);
			const own = wishes.find((wish) => wish.text === tag.text) as TagWish;
			const box = boxOf(tag);
			if (!tag.leader) {
				expect(Math.abs((box[0] + box[2]) / 2 - own.at[0])).toBeLessThan(0.01);
				expect(box[1]).toBeGreaterThan(own.at[1] - own.radiusMm - tag.capMm - 1.5);
				expect(box[3]).toBeLessThan(own.at[1] + own.radiusMm);
				for (const wish of wishes) expect(cutsCircle(wish, box)).toBe(false);
			} else {
				const [, to] = tag.leader;
				expect(Math.hypot(to[0] - own.at[0], to[1] - own.at[1])).toBeLessThan(0.5);
			}
			for (const { leader } of placed)
				if (leader && leader !== tag.leader) expect(cutsSegment(leader, box)).toBe(false);
		}
	});

	it('leave a building free', () => {
		const wish: TagWish = { text: 'C06', at: [100, 100], radiusMm: 3.6 };
		const block: [number, number][] = [
			[95, 90],
			[105, 90],
			[105, 96],
			[95, 96]
		];
		const [tag] = placeTags([wish], window, false, { lines: [], blocks: [block] }) ?? [];
		expect(tag.leader).not.toBeNull();
		expect(cutsRing(block, boxOf(tag))).toBe(false);
	});
});

describe('contours', () => {
	const { plot } = inventedPlan(2, 2);
	const land = {
		...plot,
		boundary: [
			{
				outer: [
					[0, 0],
					[100, 0],
					[100, 50],
					[60, 50],
					[60, 10],
					[40, 10],
					[40, 50],
					[0, 50]
				] as PlanPoint[],
				holes: []
			}
		]
	};
	const level = (northM: number) => (s: number) => [50 + s, northM] as PlanPoint;

	it('run over the land and a little further, not through a bay of the boundary', () => {
		expect(overLand(land, level(30), 4)).toEqual([
			[-54, -6],
			[6, 54]
		]);
		expect(overLand(land, level(5), 4)).toEqual([[-54, 54]]);
		expect(overLand(land, level(30), 12)).toEqual([[-62, 62]]);
		expect(overLand(land, level(60), 4)).toEqual([]);
	});
});
