import type { Mount, TrackerModel } from '../core';
import { formatNumber } from '../i18n';
import { mountCautions } from './cautions';
import { dimensionAcross, dimensionDown } from './dimension';
import type { PaperPoint, PaperRect } from './drawing';
import { chooseReduction } from './map-scale';
import { drawExceptions, exceptionSheets } from './mount-exceptions';
import { drawStopsAndPostures } from './mount-postures';
import { millimetres, mountDimensions, type MountDimensions } from './mount-words';
import type { Pen } from './pen';
import type { PlanContent } from './plan-content';
import { framedSheet, footStrip } from './sheet-frame';
import { sheetColours as c } from './sheet-colours';
import type { SheetBuilder } from './site-sheets';

const frontSpace: PaperRect = { xMm: 30, yMm: 40, widthMm: 202, heightMm: 180 };
const LARGEST_REDUCTION = 5;

/**
 * One mount drawing for each tracker model in use: the field's common place on that model's table. Trackers with their
 * own place that find no room on it follow on sheets of their own.
 */
export function mountSheets(content: PlanContent): SheetBuilder[] {
	const used = new Set(content.rows.map((row) => row.modelId));
	const models = content.layout.models.filter((model) => used.has(model.id));
	return models.flatMap((model) => {
		const name = models.length > 1 ? `Sensor mount on ${model.name}` : 'Sensor mount';
		return [
			(place) => mountSheet(content, model, name, place),
			...exceptionSheets(content, model, name)
		] satisfies SheetBuilder[];
	});
}

function mountSheet(
	content: PlanContent,
	model: TrackerModel,
	name: string,
	place: Parameters<SheetBuilder>[0]
) {
	const { common } = content.layout.mounts;
	const reduction = chooseReduction([model.widthM, model.heightM], [168, 118], LARGEST_REDUCTION);
	const scale = `1:${reduction}`;
	return framedSheet(content, place, { name, documentType: 'Mount drawing', scale }, (pen) => {
		pen.text('words', [26, 19], name, { capMm: 3.6, weight: 800 });
		pen.text(
			'words',
			[26, 24.5],
			'Front view, seen facing the glass. Left and right are the viewer’s. Dimensions in millimetres, from the glass edges to the centre of the sensor head.',
			{ colour: c.inkSoft }
		);
		const mmPerM = 1000 / reduction;
		const centre: PaperPoint = [
			frontSpace.xMm + frontSpace.widthMm / 2,
			frontSpace.yMm + frontSpace.heightMm / 2
		];
		const d = common ? mountDimensions(common, model) : null;
		drawTable(pen, model, centre, mmPerM, [d?.rightM ?? 0, d?.upM ?? 0]);
		if (common) drawMount(pen, common, model, centre, mmPerM);
		else {
			pen.text('words', [centre[0], centre[1] + 2], 'MOUNT NOT CHOSEN', {
				capMm: 5,
				weight: 800,
				anchor: 'middle',
				colour: c.stop,
				halo: c.frost
			});
			pen.text('words', [centre[0], centre[1] + 8], 'Open point: fit no sensor from this sheet.', {
				capMm: 2.4,
				weight: 600,
				anchor: 'middle',
				colour: c.stop,
				halo: c.frost
			});
		}
		drawSide(pen, common, model);
		drawExceptions(pen, content, model, place.number + 1);
		drawStopsAndPostures(
			pen,
			model,
			content.rows.filter((row) => row.modelId === model.id)
		);
		drawMountFoot(pen, d);
	});
}

/** Glass with module lines and clear slot, steel outline around it, names of the edges. */
function drawTable(
	pen: Pen,
	model: TrackerModel,
	centre: PaperPoint,
	mmPerM: number,
	[headRightM, headUpM]: [number, number]
): void {
	const [cx, cy] = centre;
	const w = model.widthM * mmPerM;
	const h = model.heightM * mmPerM;
	const margin = model.frameMarginM * mmPerM;
	if (margin > 0) {
		pen.rect(
			'table',
			{
				xMm: cx - w / 2 - margin,
				yMm: cy - h / 2 - margin,
				widthMm: w + 2 * margin,
				heightMm: h + 2 * margin
			},
			{ stroke: { colour: c.inkSoft, widthMm: 0.25 } }
		);
	}
	const gap = model.centreGapM * mmPerM;
	const halves = gap > 0 ? [cx - w / 2, cx + gap / 2] : [cx - w / 2];
	const halfWidth = gap > 0 ? (w - gap) / 2 : w;
	for (const left of halves) {
		pen.rect(
			'table',
			{ xMm: left, yMm: cy - h / 2, widthMm: halfWidth, heightMm: h },
			{ fill: { colour: c.frost }, stroke: { colour: c.ink, widthMm: 0.5 } }
		);
	}
	const line = { colour: c.faint, widthMm: 0.18 };
	const moduleWidth = (w - gap) / model.moduleColumns;
	for (let i = 1; i < model.moduleColumns; i += 1) {
		const along = i * moduleWidth;
		// The clear slot parts the columns in the middle; a line on the slot itself is its edge already.
		if (gap > 0 && Math.abs(along - (w - gap) / 2) < 1e-9) continue;
		const x = cx - w / 2 + along + (gap > 0 && along > (w - gap) / 2 ? gap : 0);
		pen.line('table', [x, cy - h / 2], [x, cy + h / 2], line);
	}
	for (let j = 1; j < model.moduleRows; j += 1) {
		const y = cy - h / 2 + (j * h) / model.moduleRows;
		for (const left of halves) pen.line('table', [left, y], [left + halfWidth, y], line);
	}
	// Names stand outside the glass, in the quarter that the head is not in.
	const quarter = (headRightM > 0 ? -1 : 1) * (w / 4);
	const name = { capMm: 2, anchor: 'middle', colour: c.inkSoft } as const;
	pen.text('words', [cx + quarter, cy - h / 2 - margin - 1.6], 'top edge (uppermost when tilted)', name);
	pen.text('words', [cx + quarter, cy + h / 2 + margin + 3.6], 'bottom edge', name);
	const aside = (headUpM > 0 ? 1 : -1) * (h / 4);
	pen.text('words', [cx - w / 2 - margin - 1.6, cy + aside], 'left side', { ...name, turnDeg: -90 });
	pen.text('words', [cx + w / 2 + margin + 3.6, cy + aside], 'right side', { ...name, turnDeg: -90 });
	dimensionAcross(
		pen,
		[cx - w / 2, cy + h / 2 + margin],
		[cx + w / 2, cy + h / 2 + margin],
		cy + h / 2 + 20,
		`${millimetres(model.widthM)} glass`
	);
	dimensionDown(
		pen,
		[cx - w / 2 - margin, cy - h / 2],
		[cx - w / 2 - margin, cy + h / 2],
		cx - w / 2 - 20,
		`${millimetres(model.heightM)} glass`
	);
}

function drawMount(pen: Pen, mount: Mount, model: TrackerModel, centre: PaperPoint, mmPerM: number): void {
	const d = mountDimensions(mount, model);
	const head: PaperPoint = [centre[0] + d.rightM * mmPerM, centre[1] - d.upM * mmPerM];
	const topY = centre[1] - (model.heightM / 2) * mmPerM;
	const sideX = centre[0] + (d.side === 'left' ? -1 : 1) * (model.widthM / 2) * mmPerM;
	const bottomY = centre[1] + (model.heightM / 2) * mmPerM;
	// The lead leaves the head downward and goes to the pole behind the table.
	const exit: PaperPoint = [head[0], Math.min(head[1] + 13, bottomY + 10)];
	pen.line('table', head, exit, { colour: c.sun, widthMm: 0.7, dashMm: [1.6, 0.8] });
	pen.arrowHead('table', [exit[0], exit[1] + 1.6], 180, 3, c.sun);
	const away = d.rightM > 0 ? -1 : 1;
	pen.text('words', [exit[0] + away * 2.4, exit[1] - 1.2], 'lead leaves downward, with a drip loop', {
		weight: 600,
		anchor: away > 0 ? 'start' : 'end',
		halo: c.frost
	});
	pen.circle('table', head, Math.max(1.6, model.sensorHeadRadiusM * mmPerM), {
		fill: { colour: c.sun },
		stroke: { colour: c.ink, widthMm: 0.4 }
	});
	pen.line('table', [head[0] - 3, head[1]], [head[0] + 3, head[1]], { colour: c.ink, widthMm: 0.2 });
	pen.line('table', [head[0], head[1] - 3], [head[0], head[1] + 3], { colour: c.ink, widthMm: 0.2 });

	const above = Math.min(topY, head[1]) - 12;
	dimensionAcross(pen, [sideX, topY], head, above, `${millimetres(d.fromSideM)} from the ${d.side} side`);
	const rightX = centre[0] + (model.widthM / 2) * mmPerM;
	const beside = Math.max(rightX, head[0]) + 14;
	const label =
		d.fromTopM < 0
			? `${millimetres(-d.fromTopM)} above the top edge`
			: `${millimetres(d.fromTopM)} from the top edge`;
	dimensionDown(pen, [rightX, topY], head, beside, label);
}

/** A cut through the edge: how far the head stands out and ahead. Drawn without scale, figures rule. */
function drawSide(pen: Pen, mount: Mount | null, model: TrackerModel): void {
	const x = 242;
	const y = 30;
	pen.text('words', [x, y], 'Side view of the edge', { capMm: 2.6, weight: 800 });
	const note = mount ? 'not to scale, figures rule' : 'drawn once a mount is chosen';
	pen.text('words', [x, y + 4], note, { colour: c.inkSoft });
	if (!mount) return;
	const glassX = x + 26;
	const edgeY = y + 40;
	// Glass seen edge-on; its edge points up here whichever edge it is; the sun stands to the right.
	pen.rect(
		'table',
		{ xMm: glassX - 2, yMm: edgeY, widthMm: 2, heightMm: 38 },
		{ fill: { colour: c.frost }, stroke: { colour: c.ink, widthMm: 0.4 } }
	);
	const outMm = mount.outM === 0 ? 0 : Math.sign(mount.outM) * 15;
	const aheadMm = mount.forwardM === 0 ? 0 : Math.sign(mount.forwardM) * 14;
	const head: PaperPoint = [glassX + aheadMm, edgeY - outMm];
	pen.line('table', [glassX - 1, edgeY + 8], [glassX - 1, head[1]], { colour: c.inkSoft, widthMm: 0.8 });
	pen.line('table', [glassX - 1, head[1]], head, { colour: c.inkSoft, widthMm: 0.8 });
	pen.circle('table', head, 2.2, { fill: { colour: c.sun }, stroke: { colour: c.ink, widthMm: 0.35 } });
	pen.line('table', [head[0] + 3, head[1]], [head[0] + 14, head[1]], { colour: c.sun, widthMm: 0.35 });
	pen.arrowHead('table', [head[0] + 16, head[1]], 90, 3, c.sun);
	// Over its arrow and ending with it, so that it keeps off the list on the right.
	pen.text('words', [head[0] + 16, head[1] - 3.6], 'looks square off the glass', {
		colour: c.inkSoft,
		anchor: 'end',
		halo: c.white
	});
	dimensionDown(
		pen,
		[glassX - 2, edgeY],
		[glassX - 2, head[1]],
		glassX - 14,
		millimetres(Math.abs(mount.outM))
	);
	dimensionAcross(
		pen,
		[glassX, edgeY + 28],
		[head[0], edgeY + 28],
		edgeY + 44,
		millimetres(Math.abs(mount.forwardM))
	);
	const words = [
		`Outward: ${millimetres(Math.abs(mount.outM))} ${mount.outM < 0 ? 'inside' : 'beyond'} the ${mount.edge} glass edge`,
		`Forward: ${millimetres(Math.abs(mount.forwardM))} ${mount.forwardM < 0 ? 'behind' : 'ahead of'} the face of the glass`,
		`Head radius ${millimetres(model.sensorHeadRadiusM)}, sees ${formatNumber(model.sensorViewDeg)}° off its axis`,
		`Lead as made: ${formatNumber(model.sensorLeadM, 1)} m`
	];
	words.forEach((line, i) => pen.text('words', [x, y + 93 + i * 4], line, { capMm: 2 }));
}

function drawMountFoot(pen: Pen, d: MountDimensions | null): void {
	const { xMm: x, yMm: y } = footStrip;
	pen.rect('frame', footStrip, { fill: { colour: c.white }, stroke: { colour: c.ink, widthMm: 0.35 } });
	pen.text('words', [x + 5, y + 6], 'Cautions', { capMm: 2.4, weight: 800, colour: c.stop });
	let top = y + 8.4;
	for (const caution of mountCautions) top = pen.paragraph('words', [x + 5, top], 98, caution) + 0.9;
	pen.text('words', [x + 110, y + 6], 'Check on the first tracker', { capMm: 2.4, weight: 800 });
	top = y + 8.4;
	const checks = [
		'Stand in front and face the glass before naming left or right.',
		d
			? `Measure twice: ${millimetres(d.fromSideM)} from the ${d.side} side and ${millimetres(Math.abs(d.fromTopM))} ${d.fromTopM < 0 ? 'above' : 'below'} the top glass edge.`
			: 'No place is chosen yet: fit no sensor.',
		'Place within 10 mm, face square to the glass within 1° (common practice; project values override).',
		'Nothing of the frame may stand ahead of the head; keep the lead clear of every joint in all postures.'
	];
	for (const check of checks) top = pen.paragraph('words', [x + 110, top], 96, check) + 0.9;
}
