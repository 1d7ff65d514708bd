import { formatUtcOffset, isoDateAt, formatClock, utcOffsetMinutes } from '../i18n';
import { A3_LANDSCAPE, type PaperRect, type Sheet } from './drawing';
import { LINE_PITCH, Pen } from './pen';
import type { PlanContent } from './plan-content';
import { sheetColours as c } from './sheet-colours';
import { cutToWidth, fitLines } from './text-fit';

/** Edges of the drawing space on A3: 20 mm at the filing side, 10 mm at the others (ISO 5457). */
export const drawingSpace: PaperRect = { xMm: 20, yMm: 10, widthMm: 390, heightMm: 277 };
/** The title block: 180 mm wide in the lower right corner (ISO 7200). */
export const titleBlock: PaperRect = { xMm: 230, yMm: 243, widthMm: 180, heightMm: 44 };
/** Strip beside the title block. */
export const footStrip: PaperRect = { xMm: 20, yMm: 243, widthMm: 210, heightMm: 44 };
/** What is left above both. */
export const upperSpace: PaperRect = { xMm: 20, yMm: 10, widthMm: 390, heightMm: 233 };

export interface SheetPlace {
	/** 1.. */
	number: number;
	total: number;
}

/** Date and clock of the issue at the site with its offset, `2026-12-01 13:07 UTC+1`; a draft has none. */
export function issueMoment(content: PlanContent): string {
	const { issued } = content.heading;
	if (!issued) return 'not issued';
	const zone = content.place.timeZone;
	const offset = formatUtcOffset(utcOffsetMinutes(issued.timeMs, zone));
	return `${isoDateAt(issued.timeMs, zone)} ${formatClock(issued.timeMs, zone)} ${offset}`;
}

/** Starts a sheet with frame and title block; what the sheet shows is drawn by the caller. */
export function framedSheet(
	content: PlanContent,
	place: SheetPlace,
	facts: { name: string; documentType: string; scale: string | null },
	draw: (pen: Pen) => void
): Sheet {
	const pen = new Pen();
	draw(pen);
	pen.rect('frame', drawingSpace, { stroke: { colour: c.ink, widthMm: 0.7 } });
	drawTitleBlock(pen, content, place, facts);
	if (!content.heading.issued) drawWatermark(pen);
	return { name: facts.name, ...A3_LANDSCAPE, scale: facts.scale, marks: pen.marks };
}

function drawTitleBlock(
	pen: Pen,
	content: PlanContent,
	place: SheetPlace,
	facts: { name: string; documentType: string; scale: string | null }
): void {
	const { heading } = content;
	const { xMm: x, yMm: y } = titleBlock;
	pen.rect('frame', titleBlock, { fill: { colour: c.white }, stroke: { colour: c.ink, widthMm: 0.5 } });
	const draft = heading.issued === null;
	const cell = (left: number, row: number, width: number, label: string, value: string, bold = false) => {
		const top = y + row * 11;
		pen.rect(
			'frame',
			{ xMm: x + left, yMm: top, widthMm: width, heightMm: 11 },
			{ stroke: { colour: c.ink, widthMm: 0.25 } }
		);
		pen.text('frame', [x + left + 1.5, top + 3.4], label, { colour: c.inkSoft });
		const weight = bold ? 800 : 600;
		const room = width - 3;
		const { lines, capMm } = fitLines(value, room, 1, [2.8, 2.5, 2.2, 2, 1.8], weight);
		pen.text('frame', [x + left + 1.5, top + 8.6], lines[0] ?? '', { capMm, weight });
	};
	cell(0, 0, 84, 'Legal owner', heading.owner);
	cell(84, 0, 52, 'Document type', facts.documentType);
	cell(136, 0, 44, 'Document number', heading.documentNumber);

	const top = y + 11;
	pen.rect(
		'frame',
		{ xMm: x, yMm: top, widthMm: 84, heightMm: 22 },
		{ stroke: { colour: c.ink, widthMm: 0.25 } }
	);
	pen.text('frame', [x + 1.5, top + 3.4], 'Title', { colour: c.inkSoft });
	const title = fitLines(heading.project, 70, 2, [3.6, 3.2, 2.8, 2.4, 2, 1.8], 800);
	let line = top + 5.2 + title.capMm;
	for (const text of title.lines) {
		pen.text('frame', [x + 1.5, line], text, { capMm: title.capMm, weight: 800 });
		line += title.capMm * LINE_PITCH;
	}
	pen.text('frame', [x + 1.5, top + 19.8], cutToWidth(facts.name, 81, 2.2, 600), {
		capMm: 2.2,
		weight: 600
	});

	cell(84, 1, 52, 'Date and time of issue', issueMoment(content));
	cell(136, 1, 22, 'Revision', heading.revision, true);
	cell(158, 1, 22, 'Sheet', `${place.number} of ${place.total}`, true);
	cell(84, 2, 52, 'Issued by', heading.issued?.by ?? 'not issued');
	cell(136, 2, 22, 'Scale', facts.scale ?? 'no scale');
	cell(158, 2, 22, 'Supersedes', heading.supersedes ?? 'none');
	cell(0, 3, 84, 'Layout', `${heading.layoutName} · revision ${heading.layoutRevision}`);
	cell(84, 3, 52, 'Status', draft ? 'DRAFT' : 'Issued', true);
	cell(136, 3, 44, 'Approved: name, date', '');
	drawMark(pen, x + 74, y + 13.2, 8);
}

/** The product's mark in one colour: post, tilted table, long thin shadow. */
function drawMark(pen: Pen, x: number, y: number, size: number): void {
	const at = (u: number, v: number): [number, number] => [x + u * size, y + v * size];
	pen.polygon('frame', [[at(0.1, 0.38), at(0.52, 0.02), at(0.66, 0.2), at(0.24, 0.56)]], {
		fill: { colour: c.ink }
	});
	pen.line('frame', at(0.38, 0.4), at(0.38, 0.86), { colour: c.ink, widthMm: size * 0.07 });
	pen.polygon('frame', [[at(0.38, 0.82), at(1, 0.9), at(0.38, 0.92)]], { fill: { colour: c.ink } });
}

function drawWatermark(pen: Pen): void {
	for (const [x, y] of [
		[150, 95],
		[230, 205]
	]) {
		pen.text('watermark', [x, y], 'DRAFT — not for construction', {
			capMm: 13,
			weight: 800,
			anchor: 'middle',
			colour: c.stop,
			opacity: 0.16,
			turnDeg: -18
		});
	}
}
