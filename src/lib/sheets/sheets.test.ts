import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { inventedPlan } from '../../../tests/fixtures/invented-field';
import type { Mark, Sheet, TextMark } from './drawing';
import { CAP_HEIGHT_PER_EM, fontSubsets, lineWidthMm, sheetFont } from './font-book';
import { planSheets } from './plan-sheets';
import { MIN_CAP_MM } from './text-fit';
import { sheetsToPdf } from './to-pdf';
import { sheetToSvg } from './to-svg';

const folder = mkdtempSync(join(tmpdir(), 'tiltyard-sheets-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

const facts = {
	title: 'Invented farm',
	author: 'Somebody',
	subject: 'Test',
	date: new Date(Date.UTC(2026, 11, 1))
};

function flat(marks: Mark[]): Exclude<Mark, { kind: 'clip' }>[] {
	return marks.flatMap((mark) => (mark.kind === 'clip' ? flat(mark.marks) : [mark]));
}
const words = (sheet: Sheet) => flat(sheet.marks).filter((mark): mark is TextMark => mark.kind === 'text');

type Box = [number, number, number, number];
function boxOf(mark: TextMark): Box {
	const width = lineWidthMm(mark.text, mark.capMm, mark.weight);
	const left = mark.at[0] - (mark.anchor === 'middle' ? width / 2 : mark.anchor === 'end' ? width : 0);
	return [left, mark.at[1] - mark.capMm, left + width, mark.at[1]];
}
const overlap = (a: Box, b: Box) =>
	Math.min(a[2], b[2]) - Math.max(a[0], b[0]) > 0.05 && Math.min(a[3], b[3]) - Math.max(a[1], b[1]) > 0.05;

describe('plan sheets', () => {
	it.each([
		[1, 1],
		[6, 3],
		[10, 10],
		[15, 12]
	])(
		'of %i by %i trackers letter every tag once, with none on another and none off the map',
		(columns, rows) => {
			const content = inventedPlan(columns, rows);
			const sheets = planSheets(content);
			const wanted = new Set(content.rows.map((row) => row.tag));
			const tags: string[] = [];
			for (const sheet of sheets.filter((each) => /setting-out plan/i.test(each.name))) {
				const shown = words(sheet).filter((mark) => mark.layer === 'tags' && wanted.has(mark.text));
				tags.push(...shown.map((mark) => mark.text));
				const boxes = shown.map(boxOf);
				boxes.forEach((box, i) => {
					expect(box[0]).toBeGreaterThan(20);
					expect(box[1]).toBeGreaterThan(10);
					expect(box[2]).toBeLessThan(324);
					expect(box[3]).toBeLessThan(243);
					for (const other of boxes.slice(i + 1)) expect(overlap(box, other)).toBe(false);
				});
			}
			expect(tags.sort()).toEqual([...wanted].sort());
		}
	);

	it('number themselves, keep every lettering at 1.8 mm or more and inside the paper', () => {
		for (const content of [inventedPlan(6, 3), inventedPlan(15, 12)]) {
			const sheets = planSheets(content);
			sheets.forEach((sheet, i) => {
				expect(words(sheet).some((mark) => mark.text === `${i + 1} of ${sheets.length}`)).toBe(true);
				for (const mark of words(sheet)) {
					expect(mark.capMm).toBeGreaterThanOrEqual(MIN_CAP_MM);
					if (mark.turnDeg || mark.layer === 'ground') continue;
					const [left, top, right, bottom] = boxOf(mark);
					expect([mark.text, left >= 20 && right <= 410.2 && top >= 10 && bottom <= 287]).toEqual([
						mark.text,
						true
					]);
				}
			});
		}
	});

	it('use scales of ISO 5455 only, and a key plan above 100 trackers', () => {
		const allowed = [1, 2, 5, 10, 20, 50, 100, 200, 500, 1000, 2000, 5000, 10_000].map((n) => `1:${n}`);
		for (const [columns, rows] of [
			[1, 1],
			[6, 3],
			[15, 12]
		]) {
			for (const { scale } of planSheets(inventedPlan(columns, rows)))
				if (scale) expect(allowed).toContain(scale);
		}
		const names = planSheets(inventedPlan(15, 12)).map((sheet) => sheet.name);
		expect(names[0]).toMatch(/key/);
		expect(names.filter((name) => /part \d of 2/.test(name))).toHaveLength(2);
	});

	it('never show shade: no colour of the shade ramp and no word of it on the map', () => {
		const ramp = ['#FFF3CF', '#F4CF83', '#D79A63', '#9A6A78', '#5C4A86', '#2A2250', '#4D4A86'];
		const [site] = planSheets(inventedPlan(6, 3));
		const svg = sheetToSvg(site).toUpperCase();
		for (const colour of ramp) expect(svg).not.toContain(colour);
	});

	it('carry a watermark as a draft and none once issued', () => {
		const marked = (sheet: Sheet) => words(sheet).some((mark) => mark.text.startsWith('DRAFT — not for'));
		expect(planSheets(inventedPlan(6, 3, { issued: null })).every(marked)).toBe(true);
		expect(planSheets(inventedPlan(6, 3)).some(marked)).toBe(false);
	});

	it('refuse to be made of nothing', () => {
		expect(() => planSheets({ ...inventedPlan(1, 1), rows: [] })).toThrow(/at least one tracker/);
	});

	it('say that the mount is not chosen instead of drawing one', () => {
		const content = inventedPlan(6, 3);
		content.layout.mounts.common = null;
		const mount = planSheets(content).find((sheet) => sheet.name === 'Sensor mount') as Sheet;
		expect(words(mount).map((mark) => mark.text)).toContain('MOUNT NOT CHOSEN');
	});
});

describe('lettering', () => {
	it('takes names in many scripts, quotes and 80 characters without losing what is printed', () => {
		const project = 'Überprüfung “A” <b> & Łódź Ωμέγα Привет שלום 日本 → ≤ 5 m with words up to eighty';
		const [sheet] = planSheets(inventedPlan(6, 3, { project, owner: 'Ć'.repeat(80) }));
		const text = words(sheet)
			.map((mark) => mark.text)
			.join(' ');
		expect(text).toMatch(/Überprüfung “A” <b> & Łódź/);
		expect(text).toContain('slvm');
		expect(text).not.toMatch(/[\u0590-\u05ff\u4e00-\u9fff\u2192]/);
		expect(sheetToSvg(sheet)).not.toContain('<b>');
	});

	it('measures with the shipped fonts: capitals are 0.72 em in every file that holds them', () => {
		for (const weight of [400, 600, 800] as const) {
			const { face } = sheetFont('latin', weight);
			expect(face.capHeight / face.unitsPerEm).toBeCloseTo(CAP_HEIGHT_PER_EM, 6);
			for (const subset of fontSubsets) {
				expect(sheetFont(subset, weight).face.characterSet).toEqual(sheetFont(subset, 400).face.characterSet);
			}
		}
	});
});

describe('the PDF', () => {
	const sheets = planSheets(inventedPlan(6, 3));

	it('has the same bytes for the same sheets and date', async () => {
		const first = await sheetsToPdf(sheets, facts);
		const second = await sheetsToPdf(planSheets(inventedPlan(6, 3)), facts);
		expect(second.equals(first)).toBe(true);
		const later = await sheetsToPdf(sheets, { ...facts, date: new Date(facts.date.getTime() + 1000) });
		expect(later.equals(first)).toBe(false);
	}, 60_000);

	it('is A3, reads as text, embeds Manrope only, and its scale bar measures true', async () => {
		const file = join(folder, 'plan.pdf');
		writeFileSync(file, await sheetsToPdf(sheets, facts));
		const info = execFileSync('pdfinfo', [file], { encoding: 'utf8' });
		// ISO 216 A3: 420 x 297 mm is 1190.55 x 841.89 points.
		expect(info).toMatch(/Page size:\s+1190\.55 x 841\.89 pts \(A3\)/);
		const text = execFileSync('pdftotext', ['-layout', file, '-'], { encoding: 'utf8' });
		for (const word of [
			'SCALE 1:500',
			'Coordinate table',
			'seen facing the glass',
			'Legal owner',
			'C06',
			'Moves by itself'
		]) {
			expect(text).toContain(word);
		}
		const fonts = execFileSync('pdffonts', [file], { encoding: 'utf8' }).trim().split('\n').slice(2);
		expect(fonts.length).toBeGreaterThan(2);
		for (const line of fonts)
			expect(line).toMatch(/^[A-Z]{6}\+Manrope-\w+\s+CID TrueType\s+Identity-H\s+yes yes yes/);

		const drawn = join(folder, 'plan.svg');
		execFileSync('pdftocairo', ['-svg', '-f', '1', '-l', '1', file, drawn]);
		// Four fields of 5 m at 1:500 are 10 mm each: 28.346 points; the bar is 2 mm high.
		const widths = boxesIn(readFileSync(drawn, 'utf8')).filter(
			({ h }) => Math.abs(h - (2 * 72) / 25.4) < 0.01
		);
		expect(widths.length % 4 === 0 && widths.length > 0).toBe(true);
		for (const { w } of widths) expect(w).toBeCloseTo((10 * 72) / 25.4, 1);
		const left = Math.min(...widths.map(({ x }) => x));
		const right = Math.max(...widths.map(({ x, w }) => x + w));
		// 20 m at 1:500 are 40 mm; poppler writes tenths of a point.
		expect(Math.abs(right - left - (40 * 72) / 25.4)).toBeLessThan(0.05);
	}, 60_000);
});

/** Axis-parallel rectangles among the paths of an SVG by poppler, in points; fill and line of one are two paths. */
function boxesIn(svg: string): { x: number; w: number; h: number }[] {
	const boxes: { x: number; w: number; h: number }[] = [];
	for (const [, d, transform] of svg.matchAll(
		/<path[^>]* d="(M [^"]+Z)[^"]*"(?:[^>]*transform="matrix\(([^)]+)\)")?/g
	)) {
		const numbers = (d.match(/-?[\d.]+/g) ?? []).map(Number);
		if (numbers.length < 8 || numbers.length > 10 || /C/.test(d)) continue;
		const scale = transform ? Math.abs(Number(transform.split(/[ ,]+/)[0])) : 1;
		const xs = numbers.filter((_, i) => i % 2 === 0);
		const ys = numbers.filter((_, i) => i % 2 === 1);
		const dx = transform ? Number(transform.split(/[ ,]+/)[4]) : 0;
		boxes.push({
			x: Math.min(...xs) * scale + dx,
			w: (Math.max(...xs) - Math.min(...xs)) * scale,
			h: (Math.max(...ys) - Math.min(...ys)) * scale
		});
	}
	return boxes;
}
