/** The value that all share, or undefined when they differ or there is none. */
export function commonValue<T>(
	values: readonly T[],
	same: (a: T, b: T) => boolean = Object.is
): T | undefined {
	const [first, ...rest] = values;
	return values.length > 0 && rest.every((value) => same(first, value)) ? first : undefined;
}
