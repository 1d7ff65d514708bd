/** Numbers as the page shows them, and where a measured one stands on its tolerance bar. */

const SUPERSCRIPT: Record<string, string> = {
	'-': '⁻',
	'0': '⁰',
	'1': '¹',
	'2': '²',
	'3': '³',
	'4': '⁴',
	'5': '⁵',
	'6': '⁶',
	'7': '⁷',
	'8': '⁸',
	'9': '⁹'
};

/** Two digits; below a ten-thousandth as a power of ten: `0.0032`, `4.8 × 10⁻¹³`. */
export function figure(value: number): string {
	if (value === 0) return '0';
	if (!Number.isFinite(value) || Math.abs(value) > 1e15) return 'beyond measure';
	const magnitude = Math.abs(value);
	if (magnitude >= 1e-4 && magnitude < 1e5) return String(Number(value.toPrecision(2)));
	const [digits, power] = value.toExponential(1).split('e');
	const raised = [...power.replace('+', '')].map((sign) => SUPERSCRIPT[sign]).join('');
	return digits === '1.0' ? `10${raised}` : `${digits.replace('.0', '')} × 10${raised}`;
}

/** The bar covers this many powers of ten below the tolerance. */
export const BAR_DECADES = 4;

/** Where a distance stands on the bar, 0 (a ten-thousandth of the tolerance or less) .. 1 (the tolerance or more). */
export function barPosition(distance: number, tolerance: number): number {
	if (!(distance > 0)) return 0;
	if (!(tolerance > 0)) return 1;
	return Math.min(1, Math.max(0, 1 + Math.log10(distance / tolerance) / BAR_DECADES));
}

/** How a measured distance compares with what is allowed: `a third of it`, `1,000 times inside`. */
export function roomWords(worst: number, tolerance: number): string {
	if (worst > tolerance) return 'outside';
	if (tolerance === 0) return 'no difference';
	if (worst === 0) return 'no difference at all';
	const times = tolerance / worst;
	if (times < 1.5) return 'just inside';
	if (times < 10) return `${Number(times.toPrecision(2))} times inside`;
	if (times < 1e6) return `${Number(times.toPrecision(1)).toLocaleString('en-GB')} times inside`;
	return 'over a million times inside';
}
