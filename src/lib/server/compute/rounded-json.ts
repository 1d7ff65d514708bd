/** Digits kept of a stored number: 1e-9 of its size, far below what any input is known to. */
const SIGNIFICANT_DIGITS = 9;

/** JSON with every fractional number rounded to nine significant digits, so that stored results stay small and repeat byte for byte. */
export function roundedJson(value: unknown): string {
	return JSON.stringify(value, (_key, inner: unknown) =>
		typeof inner === 'number' && !Number.isInteger(inner)
			? Number(inner.toPrecision(SIGNIFICANT_DIGITS))
			: inner
	);
}
