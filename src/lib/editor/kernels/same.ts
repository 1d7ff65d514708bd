/** Deep equality of plain data (objects, arrays, numbers, strings, booleans, null); the order of keys does not matter. */
export function sameData(a: unknown, b: unknown): boolean {
	if (Object.is(a, b)) return true;
	if (typeof a !== 'object' || typeof b !== 'object' || a === null || b === null) return a === 0 && b === 0;
	if (Array.isArray(a) !== Array.isArray(b)) return false;
	const keysA = Object.keys(a);
	const keysB = Object.keys(b);
	if (keysA.length !== keysB.length) return false;
	const left = a as Record<string, unknown>;
	const right = b as Record<string, unknown>;
	return keysA.every((key) => key in right && sameData(left[key], right[key]));
}
