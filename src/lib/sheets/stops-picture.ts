import type { StopArc } from '../core';
import { formatBearing } from '../i18n';
import type { PaperPoint } from './drawing';
import type { Pen } from './pen';
import { sheetColours as c } from './sheet-colours';

/** Bearings that an arc sweeps clockwise, degrees, 0..360 wide. */
export function arcWidthDeg(stops: StopArc): number {
	return (((stops.toDeg - stops.fromDeg) % 360) + 360) % 360;
}

/** Whether the swept arc contains a bearing; it may pass through north. */
export function arcHolds(stops: StopArc, bearingDeg: number): boolean {
	return (((bearingDeg - stops.fromDeg) % 360) + 360) % 360 <= arcWidthDeg(stops);
}

/** The arc that the table may face, on a compass rose with true north up. */
export function drawStops(pen: Pen, centre: PaperPoint, radiusMm: number, stops: StopArc | null): void {
	const at = (bearingDeg: number, r: number): PaperPoint => {
		const a = (bearingDeg * Math.PI) / 180;
		return [centre[0] + Math.sin(a) * r, centre[1] - Math.cos(a) * r];
	};
	const fromDeg = stops ? stops.fromDeg : 0;
	const widthDeg = stops ? arcWidthDeg(stops) : 360;
	const steps = Math.max(2, Math.ceil(widthDeg / 4));
	const arc = Array.from({ length: steps + 1 }, (_, i) =>
		at(fromDeg + (widthDeg * i) / steps, radiusMm * 0.72)
	);
	pen.polygon('words', [[centre, ...arc]], { fill: { colour: c.sunTint } });
	pen.circle('words', centre, radiusMm * 0.72, { stroke: { colour: c.hair, widthMm: 0.25 } });
	pen.path('words', arc, { colour: c.sun, widthMm: 0.7 });
	for (const [bearing, name] of [
		[0, 'N'],
		[90, 'E'],
		[180, 'S'],
		[270, 'W']
	] as const) {
		const [x, y] = at(bearing, radiusMm * 0.5);
		pen.text('words', [x, y + 0.9], name, { anchor: 'middle', colour: c.inkSoft });
	}
	if (!stops) {
		pen.text('words', [centre[0], centre[1] + 1], 'turns freely', { anchor: 'middle', weight: 600 });
		return;
	}
	for (const bearing of [stops.fromDeg, stops.toDeg]) {
		pen.line('words', centre, at(bearing, radiusMm * 0.8), { colour: c.ink, widthMm: 0.35 });
		const [x, y] = at(bearing, radiusMm);
		pen.text('words', [x, y + 1], formatBearing(bearing), { capMm: 2, weight: 800, anchor: 'middle' });
	}
	const ways = [arcHolds(stops, 180) ? 'south' : '', arcHolds(stops, 0) ? 'north' : ''].filter(Boolean);
	pen.text(
		'words',
		[centre[0], centre[1] + radiusMm + 3],
		`turns through ${ways.join(' and ') || 'neither south nor north'}`,
		{
			anchor: 'middle'
		}
	);
}
