import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { gunzipSync } from 'node:zlib';

/** Tests and builds both run at the root of the project. */
const folder = join(process.cwd(), 'tests/fixtures');

/** A file of reference values under tests/fixtures/checks; its shape is that of its producer. */
export function referenceValues<Shape>(name: string): Shape {
	return JSON.parse(readFileSync(join(folder, 'checks', name), 'utf8')) as Shape;
}

/** The real weather file of Golden, unpacked. */
export function goldenBytes(): Uint8Array {
	return gunzipSync(readFileSync(join(folder, 'weather/golden-tmy3.csv.gz')));
}
