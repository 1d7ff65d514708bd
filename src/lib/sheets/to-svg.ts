import { CAP_HEIGHT_PER_EM } from './font-book';
import type { Fill, Mark, PaperPoint, Sheet, Stroke } from './drawing';

/**
 * A sheet as SVG text with a view box in paper millimetres. Colours and lettering are written out, so it stands alone;
 * the lettering asks for Manrope, which the pages ship.
 */
export function sheetToSvg(sheet: Sheet): string {
	const { widthMm: w, heightMm: h } = sheet;
	return (
		`<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 ${n(w)} ${n(h)}" width="${n(w)}mm" height="${n(h)}mm"` +
		` role="img" aria-label="${escapeXml(sheet.name)}" font-family="'Manrope Variable', Manrope, sans-serif">` +
		`<rect width="${n(w)}" height="${n(h)}" fill="#FFFFFF"/>` +
		sheet.marks.map(markToSvg).join('') +
		'</svg>'
	);
}

function markToSvg(mark: Mark): string {
	switch (mark.kind) {
		case 'path': {
			const d = mark.rings.map((ring) => ringToPath(ring, mark.closed)).join('');
			return `<path d="${d}" data-layer="${mark.layer}"${paint(mark.stroke, mark.fill)}/>`;
		}
		case 'circle':
			return (
				`<circle cx="${n(mark.centre[0])}" cy="${n(mark.centre[1])}" r="${n(mark.radiusMm)}"` +
				` data-layer="${mark.layer}"${paint(mark.stroke, mark.fill)}/>`
			);
		case 'text': {
			const [x, y] = mark.at;
			const turn = mark.turnDeg ? ` transform="rotate(${n(mark.turnDeg)} ${n(x)} ${n(y)})"` : '';
			const anchor = mark.anchor === 'start' ? '' : ` text-anchor="${mark.anchor}"`;
			const opacity = mark.opacity === undefined ? '' : ` opacity="${n(mark.opacity)}"`;
			return (
				`<text x="${n(x)}" y="${n(y)}" font-size="${n(mark.capMm / CAP_HEIGHT_PER_EM)}"` +
				` font-weight="${mark.weight}" fill="${mark.colour}" data-layer="${mark.layer}"${anchor}${opacity}${turn}` +
				` style="font-variant-numeric:tabular-nums;white-space:pre">${escapeXml(mark.text)}</text>`
			);
		}
		case 'clip': {
			// A nested viewport clips by itself and needs no id that could clash on a page.
			const { xMm: x, yMm: y, widthMm: w, heightMm: h } = mark.window;
			const box = `${n(x)} ${n(y)} ${n(w)} ${n(h)}`;
			return (
				`<svg x="${n(x)}" y="${n(y)}" width="${n(w)}" height="${n(h)}" viewBox="${box}" overflow="hidden">` +
				mark.marks.map(markToSvg).join('') +
				'</svg>'
			);
		}
	}
}

function ringToPath(ring: PaperPoint[], closed: boolean): string {
	return ring.map(([x, y], i) => `${i ? 'L' : 'M'}${n(x)} ${n(y)}`).join('') + (closed ? 'Z' : '');
}

function paint(stroke?: Stroke, fill?: Fill): string {
	let text = fill ? ` fill="${fill.colour}" fill-rule="evenodd"` : ' fill="none"';
	if (fill?.opacity !== undefined) text += ` fill-opacity="${n(fill.opacity)}"`;
	if (stroke) {
		text += ` stroke="${stroke.colour}" stroke-width="${n(stroke.widthMm)}" stroke-linejoin="round"`;
		if (stroke.dashMm) text += ` stroke-dasharray="${stroke.dashMm.map(n).join(' ')}"`;
	}
	return text;
}

/** Tenths of a micrometre on paper are enough. */
function n(value: number): string {
	return String(Math.round(value * 1e4) / 1e4 + 0);
}

function escapeXml(text: string): string {
	return text.replace(/[&<>"']/g, (c) => `&#${c.charCodeAt(0)};`);
}
