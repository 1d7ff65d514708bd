import type { Fill, Layer, LetterWeight, Mark, PaperPoint, PaperRect, Stroke } from './drawing';
import { lineWidthMm } from './font-book';
import { lettered } from './letters';
import { sheetColours } from './sheet-colours';
import { wrap } from './text-fit';

export interface TextStyle {
	capMm?: number;
	weight?: LetterWeight;
	anchor?: 'start' | 'middle' | 'end';
	colour?: string;
	opacity?: number;
	turnDeg?: number;
	/** Colour of a patch that is laid under level text, so that lines do not run through it. */
	halo?: string;
}

/** Collects the marks of one drawing. Every method takes the layer first. */
export class Pen {
	readonly marks: Mark[] = [];

	line(layer: Layer, from: PaperPoint, to: PaperPoint, stroke: Stroke): void {
		this.marks.push({ kind: 'path', layer, rings: [[from, to]], closed: false, stroke });
	}

	path(layer: Layer, points: PaperPoint[], stroke: Stroke): void {
		if (points.length > 1) this.marks.push({ kind: 'path', layer, rings: [points], closed: false, stroke });
	}

	paths(layer: Layer, rings: PaperPoint[][], stroke: Stroke): void {
		if (rings.length > 0) this.marks.push({ kind: 'path', layer, rings, closed: false, stroke });
	}

	polygon(layer: Layer, rings: PaperPoint[][], style: { stroke?: Stroke; fill?: Fill }): void {
		this.marks.push({ kind: 'path', layer, rings, closed: true, ...style });
	}

	rect(layer: Layer, rect: PaperRect, style: { stroke?: Stroke; fill?: Fill }): void {
		const { xMm: x, yMm: y, widthMm: w, heightMm: h } = rect;
		this.polygon(
			layer,
			[
				[
					[x, y],
					[x + w, y],
					[x + w, y + h],
					[x, y + h]
				]
			],
			style
		);
	}

	circle(layer: Layer, centre: PaperPoint, radiusMm: number, style: { stroke?: Stroke; fill?: Fill }): void {
		this.marks.push({ kind: 'circle', layer, centre, radiusMm, ...style });
	}

	text(layer: Layer, at: PaperPoint, text: string, style: TextStyle = {}): void {
		const shown = lettered(text);
		if (!shown) return;
		if (style.halo) this.patch(layer, at, shown, style, style.halo);
		this.marks.push({
			kind: 'text',
			layer,
			at,
			text: shown,
			capMm: style.capMm ?? 1.8,
			weight: style.weight ?? 400,
			anchor: style.anchor ?? 'start',
			colour: style.colour ?? sheetColours.ink,
			...(style.opacity === undefined ? {} : { opacity: style.opacity }),
			...(style.turnDeg ? { turnDeg: style.turnDeg } : {})
		});
	}

	private patch(layer: Layer, [x, y]: PaperPoint, text: string, style: TextStyle, colour: string): void {
		const capMm = style.capMm ?? 1.8;
		const width = lineWidthMm(text, capMm, style.weight ?? 400);
		const left = style.anchor === 'middle' ? x - width / 2 : style.anchor === 'end' ? x - width : x;
		this.rect(
			layer,
			{ xMm: left - 0.3, yMm: y - capMm - 0.3, widthMm: width + 0.6, heightMm: capMm + 0.6 },
			{ fill: { colour } }
		);
	}

	/** Wrapped text under a top left corner; answers the y under its last line. */
	paragraph(layer: Layer, topLeft: PaperPoint, widthMm: number, text: string, style: TextStyle = {}): number {
		const capMm = style.capMm ?? 1.8;
		const pitchMm = capMm * LINE_PITCH;
		let y = topLeft[1];
		for (const line of wrap(text, widthMm, capMm, style.weight ?? 400)) {
			this.text(layer, [topLeft[0], y + capMm], line, { ...style, capMm });
			y += pitchMm;
		}
		return y;
	}

	/** Marks that are cut off outside a rectangle. */
	clipped(layer: Layer, window: PaperRect, draw: (pen: Pen) => void): void {
		const inner = new Pen();
		draw(inner);
		this.marks.push({ kind: 'clip', layer, window, marks: inner.marks });
	}

	/** A solid arrow head with its tip at a point, pointing along a paper bearing (clockwise from up). */
	arrowHead(layer: Layer, tip: PaperPoint, bearingDeg: number, lengthMm: number, colour: string): void {
		const a = (bearingDeg * Math.PI) / 180;
		const back = (side: number): PaperPoint => [
			tip[0] - Math.sin(a) * lengthMm + Math.cos(a) * side,
			tip[1] + Math.cos(a) * lengthMm + Math.sin(a) * side
		];
		this.polygon(layer, [[tip, back(lengthMm * 0.18), back(-lengthMm * 0.18)]], { fill: { colour } });
	}
}

/** Line pitch over capital height. */
export const LINE_PITCH = 1.75;
