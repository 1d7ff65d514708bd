const hourMs = 3_600_000;

/**
 * Whole hours between two instants, thinned so that a label of about 50 px has room; every 1, 2, 3 or 6 hours. UTC hours:
 * zones with a half-hour offset get labels at half past.
 */
export function stripTicks(fromMs: number, toMs: number, widthPx: number): number[] {
	const hours = (toMs - fromMs) / hourMs;
	const most = Math.max(Math.floor(widthPx / 54), 1);
	const every = [1, 2, 3, 6].find((step) => hours / step <= most) ?? 12;
	const ticks: number[] = [];
	for (let ms = Math.ceil(fromMs / hourMs) * hourMs; ms <= toMs; ms += every * hourMs) ticks.push(ms);
	return ticks;
}
