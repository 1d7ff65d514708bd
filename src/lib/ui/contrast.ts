/** `#rrggbb` to its three channels, 0..255. */
export function channels(hex: string): [number, number, number] {
	const value = Number.parseInt(hex.slice(1), 16);
	return [(value >> 16) & 255, (value >> 8) & 255, value & 255];
}

/** Relative luminance of an sRGB colour, 0..1. WCAG 2.2, definition "relative luminance". */
export function relativeLuminance(hex: string): number {
	const [red, green, blue] = channels(hex).map((channel) => {
		const c = channel / 255;
		return c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4;
	});
	return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
}

/** Contrast ratio of two opaque colours, 1..21. WCAG 2.2, definition "contrast ratio". */
export function contrastRatio(a: string, b: string): number {
	const [low, high] = [relativeLuminance(a), relativeLuminance(b)].sort((x, y) => x - y);
	return (high + 0.05) / (low + 0.05);
}
