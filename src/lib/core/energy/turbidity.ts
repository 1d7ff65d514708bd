/**
 * Linke turbidity by month where nobody has given any, January first: 3 in the darkest month to 4 in the brightest one
 * outside the tropics, along a cosine with its top in mid-July (mid-January in the south); 4 all the year between the
 * tropics. A rule of thumb from memory, no source: clean cold air has 2, hazy air 5 to 6. Replace it by the values of the
 * place. Latitude in degrees, north positive.
 */
export function defaultLinkeTurbidity(latitudeDeg: number): number[] {
	if (Math.abs(latitudeDeg) <= 23.44) return Array<number>(12).fill(4);
	const top = latitudeDeg > 0 ? 6 : 0;
	return Array.from({ length: 12 }, (_, month) => {
		const value = 3.5 + 0.5 * Math.cos(((month - top) * Math.PI) / 6);
		return Math.round(value * 100) / 100;
	});
}
