import type { TrackerModel } from '../core';
import { formatBearing, formatNumber } from '../i18n';
import type { PegRow } from '../schema/peg-row';
import type { Pen } from './pen';
import { drawStops } from './stops-picture';
import { sheetColours as c } from './sheet-colours';

/**
 * Axis height of the trackers as they are planned, metres above ground: a layout may set another height than the
 * model's own, and the crew builds the planned one.
 */
export function axisHeightInWords(rows: Pick<PegRow, 'axisHeightM'>[]): string {
	const heights = rows.map((row) => row.axisHeightM);
	const [least, most] = [Math.min(...heights), Math.max(...heights)].map((each) => formatNumber(each, 2));
	return least === most ? `${least} m above ground` : `${least}–${most} m, see coordinate table`;
}

/**
 * The arc that the table may face and the postures of a model.
 * @param rows the plan's trackers of this model, at least one
 */
export function drawStopsAndPostures(pen: Pen, model: TrackerModel, rows: PegRow[]): void {
	const x = 300;
	const y = 126;
	pen.text('words', [x, y], 'Azimuth stops and postures', { capMm: 2.6, weight: 800 });
	drawStops(pen, [x + 26, y + 32], 22, model.stops);
	const night =
		model.night.azimuthDeg === null
			? `tilt ${formatNumber(model.night.tiltDeg)}°, bearing kept`
			: `tilt ${formatNumber(model.night.tiltDeg)}°, facing ${formatBearing(model.night.azimuthDeg)}`;
	[
		['Tracker model', model.name],
		['Axis height', axisHeightInWords(rows)],
		['Tilt range', `${formatNumber(model.minTiltDeg)}° to ${formatNumber(model.maxTiltDeg)}°`],
		['Night posture', night],
		['Wind posture', `tilt ${formatNumber(model.windTiltDeg)}°`],
		['Slew', `${formatNumber(model.slewDegPerS, 2)}° a second`]
	].forEach(([label, value], i) => {
		pen.text('words', [x + 56, y + 8 + i * 8], label, { colour: c.inkSoft });
		pen.text('words', [x + 56, y + 11.4 + i * 8], value, { capMm: 2, weight: 600 });
	});
	pen.paragraph(
		'words',
		[x, y + 60],
		104,
		'Bearings clockwise from true north. The table may face any bearing of the shaded arc. Set stops by survey or sun shadow, never by a compass near steel. Wind settings are the maker’s and the engineer’s.',
		{ colour: c.inkSoft }
	);
}
