import { formatDegrees } from '../i18n';
import type { PaperPoint } from './drawing';
import type { Pen } from './pen';
import { sheetColours as c } from './sheet-colours';

/**
 * True-north arrow straight up the paper with magnetic north beside it, turned by the declination that the project
 * holds; without it where that is 0, which also stands for never entered. The local grid's north is true north at the origin.
 */
export function drawNorth(pen: Pen, foot: PaperPoint, lengthMm: number, declinationDeg: number): void {
	const [x, y] = foot;
	pen.line('words', [x, y], [x, y - lengthMm], { colour: c.ink, widthMm: 0.5 });
	pen.polygon(
		'words',
		[
			[
				[x, y - lengthMm],
				[x + 3, y - lengthMm + 9],
				[x, y - lengthMm + 7]
			]
		],
		{ fill: { colour: c.ink } }
	);
	pen.polygon(
		'words',
		[
			[
				[x, y - lengthMm],
				[x - 3, y - lengthMm + 9],
				[x, y - lengthMm + 7]
			]
		],
		{ fill: { colour: c.white }, stroke: { colour: c.ink, widthMm: 0.25 } }
	);
	pen.text('words', [x, y - lengthMm - 1.4], 'N', { capMm: 3.4, weight: 800, anchor: 'middle' });
	pen.text('words', [x, y + 3.6], 'true', { anchor: 'middle', weight: 600 });
	if (declinationDeg === 0) return;
	const mx = x + 17;
	const a = (declinationDeg * Math.PI) / 180;
	const reach = lengthMm * 0.72;
	const tip: PaperPoint = [mx + Math.sin(a) * reach, y - Math.cos(a) * reach];
	pen.line('words', [mx, y], tip, { colour: c.inkSoft, widthMm: 0.3 });
	pen.line('words', [mx, y], [mx, y - reach], { colour: c.hair, widthMm: 0.2, dashMm: [1, 1] });
	pen.arrowHead('words', tip, declinationDeg, 4, c.inkSoft);
	pen.text('words', [mx, y + 3.6], 'magnetic', { anchor: 'middle', colour: c.inkSoft });
}

/** `3.2° east of true north`. */
export function declinationInWords(declinationDeg: number): string {
	const size = formatDegrees(Math.abs(declinationDeg), 1);
	if (Math.abs(declinationDeg) < 0.05) return `${size} from true north`;
	return `${size} ${declinationDeg > 0 ? 'east' : 'west'} of true north`;
}

/**
 * A bar that measures true on the paper: four steps of a round length, drawn at exactly `stepM * 1000 / reduction`
 * millimetres each.
 */
export function drawScaleBar(pen: Pen, left: PaperPoint, reduction: number): void {
	const stepM = scaleBarStepM(reduction);
	const stepMm = (stepM * 1000) / reduction;
	const [x, y] = left;
	for (let i = 0; i < SCALE_BAR_STEPS; i += 1) {
		pen.rect(
			'words',
			{ xMm: x + i * stepMm, yMm: y, widthMm: stepMm, heightMm: 2 },
			{ fill: { colour: i % 2 ? c.white : c.ink }, stroke: { colour: c.ink, widthMm: 0.25 } }
		);
	}
	for (let i = 0; i <= SCALE_BAR_STEPS; i += 1) {
		const metres = i * stepM;
		pen.text('words', [x + i * stepMm, y - 1.2], i === SCALE_BAR_STEPS ? `${metres} m` : `${metres}`, {
			anchor: 'middle',
			weight: 600
		});
	}
}

export const SCALE_BAR_STEPS = 4;

/** Round metres (1, 2 or 5 times a power of ten) that make a step of 10 to 25 mm. */
export function scaleBarStepM(reduction: number): number {
	const least = (10 * reduction) / 1000;
	const power = 10 ** Math.floor(Math.log10(least) + 1e-9);
	return [1, 2, 5, 10].map((k) => k * power).find((step) => step >= least * (1 - 1e-9)) ?? 10 * power;
}
