import type { PaperPoint } from './drawing';
import type { Pen } from './pen';
import { sheetColours as c } from './sheet-colours';
import { lineWidthMm } from './font-book';

const LINE = { colour: c.ink, widthMm: 0.18 };
const CAP_MM = 2.5;

/**
 * A level dimension between two x, drawn at a height, with extension lines from where the measured points lie
 * (ISO 129-1: figure above its line, extension lines run a little past the arrows).
 */
export function dimensionAcross(pen: Pen, from: PaperPoint, to: PaperPoint, atY: number, text: string): void {
	for (const [x, y] of [from, to]) {
		const way = Math.sign(atY - y) || 1;
		pen.line('dimensions', [x, y + way * 1], [x, atY + way * 1.6], LINE);
	}
	const [left, right] = from[0] < to[0] ? [from[0], to[0]] : [to[0], from[0]];
	arrows(pen, [left, atY], [right, atY], 90);
	const room = lineWidthMm(text, CAP_MM, 600) + 2 < right - left;
	const at: PaperPoint = room ? [(left + right) / 2, atY - 1.1] : [right + 7.5, atY - 1.1];
	pen.text('dimensions', at, text, { capMm: CAP_MM, weight: 600, anchor: room ? 'middle' : 'start' });
}

/** The same up and down, the figure readable from the right. */
export function dimensionDown(pen: Pen, from: PaperPoint, to: PaperPoint, atX: number, text: string): void {
	for (const [x, y] of [from, to]) {
		const way = Math.sign(atX - x) || 1;
		pen.line('dimensions', [x + way * 1, y], [atX + way * 1.6, y], LINE);
	}
	const [top, bottom] = from[1] < to[1] ? [from[1], to[1]] : [to[1], from[1]];
	arrows(pen, [atX, top], [atX, bottom], 180);
	const room = lineWidthMm(text, CAP_MM, 600) + 2 < bottom - top;
	const at: PaperPoint = room ? [atX - 1.1, (top + bottom) / 2] : [atX - 1.1, top - 7.5];
	pen.text('dimensions', at, text, {
		capMm: CAP_MM,
		weight: 600,
		anchor: room ? 'middle' : 'start',
		turnDeg: -90
	});
}

/** Arrow heads inside the span, or outside pointing in when it is short. */
function arrows(pen: Pen, a: PaperPoint, b: PaperPoint, bearingDeg: number): void {
	const span = Math.hypot(b[0] - a[0], b[1] - a[1]);
	const inside = span > 8;
	const over = inside ? 0 : 6;
	const [ux, uy] = bearingDeg === 90 ? [1, 0] : [0, 1];
	pen.line('dimensions', [a[0] - ux * over, a[1] - uy * over], [b[0] + ux * over, b[1] + uy * over], LINE);
	pen.arrowHead('dimensions', a, inside ? bearingDeg + 180 : bearingDeg, 2.6, c.ink);
	pen.arrowHead('dimensions', b, inside ? bearingDeg : bearingDeg + 180, 2.6, c.ink);
}
