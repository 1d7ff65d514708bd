/** Every buffer behind the typed arrays of a value, each once. */
export function buffersOf(value: unknown): ArrayBuffer[] {
	const found = new Set<ArrayBuffer>();
	const walk = (inner: unknown): void => {
		if (typeof inner !== 'object' || inner === null) return;
		if (ArrayBuffer.isView(inner)) {
			if (inner.buffer instanceof ArrayBuffer) found.add(inner.buffer);
		} else Object.values(inner).forEach(walk);
	};
	walk(value);
	return [...found];
}
