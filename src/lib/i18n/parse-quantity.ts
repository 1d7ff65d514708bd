/** What a quantity field understood, or a sentence that says what to write instead. */
export type ParsedQuantity = { ok: true; value: number } | { ok: false; message: string };

const metres = { mm: 0.001, cm: 0.01, m: 1, km: 1000, in: 0.0254, ft: 0.3048 };
const watts = { w: 1, kw: 1000, mw: 1e6 };

/** Units that may be typed in a field, by the field's own unit, as factors to it. Inch and foot: exact since 1959. */
const suffixes: Record<string, Record<string, number>> = {
	m: metres,
	cm: Object.fromEntries(Object.entries(metres).map(([name, factor]) => [name, factor / 0.01])),
	mm: Object.fromEntries(Object.entries(metres).map(([name, factor]) => [name, factor / 0.001])),
	'°': { '°': 1, deg: 1, degrees: 1 },
	'°/s': { '°/s': 1, 'deg/s': 1 },
	'%': { '%': 1, percent: 1 },
	W: watts,
	kW: Object.fromEntries(Object.entries(watts).map(([name, factor]) => [name, factor / 1000])),
	min: { min: 1, h: 60 },
	h: { h: 1, min: 1 / 60 },
	years: { years: 1, year: 1, y: 1 },
	'm/year': { 'm/year': 1, 'cm/year': 0.01, m: 1, cm: 0.01 }
};

/**
 * One number as people write it: decimal point or decimal comma, spaces, points, commas or apostrophes between thousands.
 * A single comma is a decimal comma. Null when it can't be read as one number.
 */
export function readNumber(text: string): number | null {
	let digits = text.replace(/[\s\u00a0\u202f'’]/g, '');
	const commas = digits.split(',').length - 1;
	const points = digits.split('.').length - 1;
	if (commas && points) {
		const decimal = digits.lastIndexOf(',') > digits.lastIndexOf('.') ? ',' : '.';
		if ((decimal === ',' ? commas : points) > 1) return null;
		digits = digits.replaceAll(decimal === ',' ? '.' : ',', '').replace(decimal, '.');
	} else if (commas > 1 || points > 1) {
		if (!/^[+-]?\d{1,3}([.,]\d{3})+$/.test(digits)) return null;
		digits = digits.replace(/[.,]/g, '');
	} else {
		digits = digits.replace(',', '.');
	}
	return /^[+-]?(\d+\.?\d*|\.\d+)$/.test(digits) ? Number(digits) : null;
}

/**
 * Reads a number or a simple sum ("12.5+0.3", "6 m - 20 cm") in the field's unit. Each part may carry a unit of its own;
 * without one it is in the field's unit. `unit` '' is a bare number.
 */
export function parseQuantity(text: string, unit: string): ParsedQuantity {
	const clean = text.replace(/[\u2212\u2013]/g, '-').trim();
	const unitWords = unit ? ` in ${unit}` : '';
	if (clean === '') return { ok: false, message: `Write a number${unitWords}.` };
	const parts = clean.match(/[+-]?\s*[^+-]+/g) ?? [];
	if (parts.join('').length !== clean.length || !parts.length) {
		return {
			ok: false,
			message: `“${text.trim()}” is not a sum that can be read: write for example 12.5+0.3.`
		};
	}
	let sum = 0;
	for (const part of parts) {
		const [, sign, body] = /^([+-]?)\s*(.*)$/s.exec(part.trim()) ?? [];
		const [, number, suffix] = /^([\d.,'’\s\u00a0\u202f]*\d[.,]?)\s*(.*)$/s.exec(body) ?? [];
		const value = number === undefined ? null : readNumber(number);
		if (value === null) {
			return { ok: false, message: `“${part.trim()}” is not a number. Write a number${unitWords}.` };
		}
		const known = suffixes[unit] ?? (unit ? { [unit]: 1 } : {});
		const factor = suffix ? (known[suffix] ?? known[suffix.toLowerCase()]) : 1;
		if (factor === undefined) {
			return {
				ok: false,
				message: unit
					? `“${suffix}” is not a unit for this field. Write ${Object.keys(known).join(', ')} or no unit for ${unit}.`
					: `“${suffix}” is not needed: write a bare number.`
			};
		}
		sum += (sign === '-' ? -1 : 1) * value * factor;
	}
	if (!Number.isFinite(sum)) return { ok: false, message: `“${text.trim()}” is too large a number.` };
	// Sums of decimals: 12.5+0.3 should read 12.8, not 12.800000000000001.
	return { ok: true, value: Number(sum.toPrecision(12)) };
}

/** Says why a value is refused by its range, or null when it stands inside. */
export function outsideRange(value: number, unit: string, min?: number, max?: number): string | null {
	const words = (bound: number) => (unit === '°' || unit === '' ? `${bound}${unit}` : `${bound} ${unit}`);
	if (min !== undefined && max !== undefined && (value < min || value > max)) {
		return `Write a value from ${words(min)} to ${words(max)}.`;
	}
	if (min !== undefined && value < min) return `Write ${words(min)} or more.`;
	if (max !== undefined && value > max) return `Write ${words(max)} or less.`;
	return null;
}
