import { isMeasured, type Ground } from '../core';
import { formatBearing, formatCoordinates, formatNumber } from '../i18n';
import { planCautions } from './cautions';
import { mapStrokes } from './draw-map';
import type { PaperRect } from './drawing';
import type { Pen } from './pen';
import type { PlanContent } from './plan-content';
import { sheetColours as c } from './sheet-colours';
import { declinationInWords, drawNorth } from './symbols';

/** North, legend, coordinate system and cautions down the right of a setting-out sheet. */
export function drawSidePanel(pen: Pen, content: PlanContent, panel: PaperRect): void {
	const { xMm: x, yMm: y, widthMm: w } = panel;
	pen.rect('frame', panel, { fill: { colour: c.white }, stroke: { colour: c.ink, widthMm: 0.35 } });
	drawNorth(pen, [x + 14, y + 37], 29, content.place.magneticDeclinationDeg);
	drawGroundArrow(pen, content, x + 56, y + 22);
	let top = rule(pen, panel, y + 44);
	top = drawLegend(pen, content, x + 4, top + 1.5, w - 8);
	top = rule(pen, panel, top + 1.5);
	top = drawCoordinates(pen, content, x + 4, top + 1.5, w - 8);
	top = rule(pen, panel, top + 1);
	drawCautions(pen, x + 4, top + 1.5, w - 8);
}

function rule(pen: Pen, panel: PaperRect, y: number): number {
	pen.line('frame', [panel.xMm, y], [panel.xMm + panel.widthMm, y], { colour: c.ink, widthMm: 0.2 });
	return y;
}

function drawGroundArrow(pen: Pen, content: PlanContent, x: number, y: number): void {
	const { ground } = content.plot;
	if (isMeasured(ground)) {
		pen.text('words', [x + 4, y - 2], 'Ground as', { anchor: 'middle' });
		pen.text('words', [x + 4, y + 1.4], 'measured', { anchor: 'middle' });
		return;
	}
	if (ground.kind !== 'plane' || ground.risePercent <= 0) {
		pen.text('words', [x + 4, y - 2], 'Ground taken', { anchor: 'middle' });
		pen.text('words', [x + 4, y + 1.4], 'as level', { anchor: 'middle' });
		return;
	}
	const a = (ground.riseTowardsDeg * Math.PI) / 180;
	const arm = 9;
	const tip: [number, number] = [x + 4 + Math.sin(a) * arm, y - 4 - Math.cos(a) * arm];
	pen.line('words', [x + 4 - Math.sin(a) * arm, y - 4 + Math.cos(a) * arm], tip, {
		colour: c.inkSoft,
		widthMm: 0.4
	});
	pen.arrowHead('words', tip, ground.riseTowardsDeg, 4, c.inkSoft);
	pen.text('words', [x + 4, y + 13], `ground rises ${formatNumber(ground.risePercent, 1)} %`, {
		anchor: 'middle'
	});
	pen.text('words', [x + 4, y + 16.4], `towards ${formatBearing(ground.riseTowardsDeg)}`, {
		anchor: 'middle'
	});
}

function heading(pen: Pen, x: number, y: number, text: string, colour: string = c.ink): number {
	pen.text('words', [x, y + 2.4], text, { capMm: 2.4, weight: 800, colour });
	return y + 4.6;
}

function drawLegend(pen: Pen, content: PlanContent, x: number, y: number, w: number): number {
	let top = heading(pen, x, y, 'Legend');
	const item = (words: string, draw: (cx: number, cy: number) => void) => {
		draw(x + 5, top + 1.3);
		top = Math.max(top + 4, pen.paragraph('words', [x + 13, top + 0.4], w - 13, words) + 0.7);
	};
	item('Centre of the azimuth axis, with the tracker’s tag', (cx, cy) => {
		pen.line('words', [cx - 1.2, cy], [cx + 1.2, cy], mapStrokes.cross);
		pen.line('words', [cx, cy - 1.2], [cx, cy + 1.2], mapStrokes.cross);
	});
	item('Reach circle: steel can enter it in any posture', (cx, cy) =>
		pen.circle('words', [cx, cy], 1.7, { stroke: mapStrokes.reach })
	);
	item('Boundary of the land with corner marks', (cx, cy) => {
		pen.line('words', [cx - 4, cy], [cx + 4, cy], mapStrokes.boundary);
		pen.rect(
			'words',
			{ xMm: cx - 0.7, yMm: cy - 0.7, widthMm: 1.4, heightMm: 1.4 },
			{ fill: { colour: c.white }, stroke: { colour: c.ink, widthMm: 0.3 } }
		);
	});
	if (content.plot.setBackM > 0) {
		item(`Set-back, ${formatNumber(content.plot.setBackM, 2)} m inside the boundary`, (cx, cy) =>
			pen.line('words', [cx - 4, cy], [cx + 4, cy], mapStrokes.setBack)
		);
	}
	const kinds = new Set(content.plot.obstacles.map((obstacle) => obstacle.kind));
	if (kinds.has('tree')) {
		item('T: tree, crown and trunk', (cx, cy) => {
			pen.circle('words', [cx, cy], 1.7, { fill: { colour: c.clearTint }, stroke: mapStrokes.tree });
			pen.circle('words', [cx, cy], 0.4, { fill: { colour: c.clear } });
		});
	}
	if (kinds.has('box') || kinds.has('building')) {
		item('B: building or other block', (cx, cy) =>
			pen.rect(
				'words',
				{ xMm: cx - 3, yMm: cy - 1.2, widthMm: 6, heightMm: 2.4 },
				{ fill: { colour: c.obstacleTint }, stroke: mapStrokes.box }
			)
		);
	}
	if (kinds.has('wall')) {
		item('W: wall, filled, or fence', (cx, cy) =>
			pen.rect(
				'words',
				{ xMm: cx - 4, yMm: cy - 0.4, widthMm: 8, heightMm: 0.8 },
				{ fill: { colour: c.obstacleTint }, stroke: mapStrokes.box }
			)
		);
	}
	if (kinds.has('mast')) {
		item('M: mast or pole', (cx, cy) => {
			pen.circle('words', [cx, cy], 0.6, { fill: { colour: c.obstacleTint }, stroke: mapStrokes.box });
			pen.circle('words', [cx, cy], 0.2, { fill: { colour: c.ink } });
		});
	}
	if (content.plot.ground.kind !== 'level') {
		item('Ground contour with its level', (cx, cy) =>
			pen.line('words', [cx - 4, cy], [cx + 4, cy], { ...mapStrokes.contour, colour: c.faint })
		);
	}
	return top;
}

function groundInWords(ground: Ground): string {
	switch (ground.kind) {
		case 'level':
			return `The ground is taken as level at ${formatNumber(ground.heightM, 2)}.`;
		case 'plane':
			return `The ground is a plane through level ${formatNumber(ground.heightM, 2)} at the origin.`;
		case 'points':
			return `The ground runs straight between ${formatNumber(ground.points.length)} measured heights.`;
		case 'raster':
			return `The ground runs straight between heights on a grid of ${formatNumber(ground.cellM, 2)} m.`;
	}
}

function drawCoordinates(pen: Pen, content: PlanContent, x: number, y: number, w: number): number {
	const { place, plot } = content;
	let top = heading(pen, x, y, 'Coordinates and levels');
	const origin = formatCoordinates(place.latitudeDeg, place.longitudeDeg, 7);
	const rise = groundInWords(plot.ground);
	for (const sentence of [
		`Local grid in metres, E east and N north of the origin (small circled cross) at ${origin}, WGS84.`,
		'Grid north is true north at the origin; distances are on the ground (transverse Mercator about the origin, scale 1). Bearings run clockwise from true north.',
		// Zero is also what stands there while nobody has entered any: nothing is said then.
		...(place.magneticDeclinationDeg === 0
			? []
			: [`Magnetic north ${declinationInWords(place.magneticDeclinationDeg)}, as entered for the project.`]),
		`Levels in metres above the project’s height datum: level 0.00 is ${formatNumber(place.altitudeM, 1)} m above sea level as entered. ${rise}`
	]) {
		top = pen.paragraph('words', [x, top], w, sentence) + 0.7;
	}
	return top;
}

function drawCautions(pen: Pen, x: number, y: number, w: number): void {
	let top = heading(pen, x, y, 'Cautions', c.stop);
	for (const caution of planCautions) {
		pen.text('words', [x, top + 1.9], caution.head, { capMm: 1.9, weight: 800, colour: c.stop });
		top = pen.paragraph('words', [x, top + 3.3], w, caution.text) + 0.9;
	}
}
