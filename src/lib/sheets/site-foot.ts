import { formatNumber } from '../i18n';
import { checkDistances, checkSums, toMillimetre } from './check-sums';
import type { Pen } from './pen';
import type { PlanContent } from './plan-content';
import { sheetColours as c } from './sheet-colours';
import { footStrip } from './sheet-frame';
import { drawScaleBar } from './symbols';
import { cutToWidth, wrap } from './text-fit';

/** Scale bar, check figures and issue notes beside the title block. */
export function drawSiteFoot(pen: Pen, content: PlanContent, reduction: number, hidden: string | null): void {
	const { xMm: x, yMm: y, widthMm: w } = footStrip;
	pen.rect('frame', footStrip, { fill: { colour: c.white }, stroke: { colour: c.ink, widthMm: 0.35 } });
	const half = 122;
	pen.line('frame', [x + half, y], [x + half, y + footStrip.heightMm], { colour: c.ink, widthMm: 0.2 });

	pen.text('words', [x + 5, y + 5.6], `SCALE 1:${reduction}`, { capMm: 2.6, weight: 800 });
	pen.text('words', [x + 36, y + 5.6], 'true on A3 printed at 100 %: measure the bar', { colour: c.inkSoft });
	drawScaleBar(pen, [x + 6, y + 12.4], reduction);

	const sums = checkSums(content.rows);
	const rows = content.rows;
	const lines = [
		`${formatNumber(sums.count)} ${sums.count === 1 ? 'tracker' : 'trackers'}   Σ E ${formatNumber(sums.eastM, 3)} m   Σ N ${formatNumber(sums.northM, 3)} m`,
		...[rows[0], ...(rows.length > 1 ? [rows[rows.length - 1]] : [])].map(
			(row, i) =>
				`${i ? 'last' : 'first'}: ${row.tag}   E ${formatNumber(toMillimetre(row.eastM), 3)}   N ${formatNumber(toMillimetre(row.northM), 3)}`
		),
		checkDistances(rows)
			.map(({ from, to, metres }) => `${from} – ${to} ${formatNumber(metres, 3)} m`)
			.join('   ')
	];
	pen.text('words', [x + 5, y + 21.2], 'Check before setting out', { capMm: 2, weight: 800 });
	lines.forEach((line, i) => {
		const text = i === lines.length - 1 && line ? `check distances: ${line}` : line;
		pen.text('words', [x + 5, y + 25.4 + i * 3.9], cutToWidth(text, half - 8, 1.9, 400), { capMm: 1.9 });
	});
	if (hidden) pen.text('words', [x + 5, y + 25.4 + lines.length * 3.9], hidden, { colour: c.inkSoft });

	drawIssueNotes(pen, content, x + half + 4, y, w - half - 7);
}

function drawIssueNotes(pen: Pen, content: PlanContent, x: number, y: number, w: number): void {
	const { heading, openPoints } = content;
	pen.text('words', [x, y + 5.6], 'This issue', { capMm: 2.4, weight: 800 });
	let top = y + 8;
	const count = openPoints.length;
	const notes = [
		heading.supersedes
			? `Supersedes revision ${heading.supersedes}: destroy or mark old copies.`
			: 'First issue.',
		heading.shadeNote ?? 'No shade run stands behind this layout revision.',
		count === 0
			? 'Nothing was open at issue.'
			: `${count} open ${count === 1 ? 'point' : 'points'}: see the sheet “Open points”.`,
		heading.reason ? `Reason: ${heading.reason}` : ''
	].filter(Boolean);
	const floor = y + 42.5;
	for (const note of notes) {
		const lines = wrap(note, w, 1.8, 400);
		for (let i = 0; i < lines.length; i += 1) {
			if (top + 1.8 > floor) return;
			const last = top + 2 * 3.15 > floor && i < lines.length - 1;
			pen.text('words', [x, top + 1.8], last ? cutToWidth(lines.slice(i).join(' '), w, 1.8, 400) : lines[i], {
				weight: note.startsWith(`${count} open`) ? 800 : 400
			});
			top += 3.15;
			if (last) return;
		}
		top += 0.7;
	}
}
