/**
 * A drawing in paper millimetres. The origin is the paper's top left corner, x to the right, y down; both renderers
 * (SVG for the screen, PDF for the paper) show the same marks. Layers name what a mark stands for.
 */
export type Layer =
	| 'frame'
	| 'ground'
	| 'boundary'
	| 'set-back'
	| 'obstacles'
	| 'reach'
	| 'trackers'
	| 'tags'
	| 'table'
	| 'dimensions'
	| 'words'
	| 'watermark';

export type PaperPoint = [xMm: number, yMm: number];

export interface Stroke {
	colour: string;
	widthMm: number;
	/** Lengths of dash and gap in millimetres. */
	dashMm?: number[];
}

export interface Fill {
	colour: string;
	/** 0 clear .. 1 opaque. */
	opacity?: number;
}

export type LetterWeight = 400 | 600 | 800;

export interface PathMark {
	kind: 'path';
	layer: Layer;
	/** Several rings make one path, filled by the even-odd rule. */
	rings: PaperPoint[][];
	closed: boolean;
	stroke?: Stroke;
	fill?: Fill;
}

export interface CircleMark {
	kind: 'circle';
	layer: Layer;
	centre: PaperPoint;
	radiusMm: number;
	stroke?: Stroke;
	fill?: Fill;
}

export interface TextMark {
	kind: 'text';
	layer: Layer;
	/** Left end, middle or right end of the baseline, by anchor. */
	at: PaperPoint;
	text: string;
	/** Height of a capital letter, millimetres (the nominal size of lettering). */
	capMm: number;
	weight: LetterWeight;
	anchor: 'start' | 'middle' | 'end';
	colour: string;
	opacity?: number;
	/** Clockwise turn about `at`, degrees. */
	turnDeg?: number;
}

/** Marks that show only inside a rectangle. */
export interface ClipMark {
	kind: 'clip';
	layer: Layer;
	window: PaperRect;
	marks: Mark[];
}

export type Mark = PathMark | CircleMark | TextMark | ClipMark;

export interface PaperRect {
	xMm: number;
	yMm: number;
	widthMm: number;
	heightMm: number;
}

export interface Sheet {
	/** What this sheet shows, for lists and page flipping. */
	name: string;
	widthMm: number;
	heightMm: number;
	/** Designation of the sheet's main scale, `1:500`; null when nothing on it is to scale. */
	scale: string | null;
	marks: Mark[];
}

/** ISO 216 A3, lying. */
export const A3_LANDSCAPE = { widthMm: 420, heightMm: 297 } as const;

/** PDF points in a millimetre: 72 to the inch of 25.4 mm. */
export const POINTS_PER_MM = 72 / 25.4;
