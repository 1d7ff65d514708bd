import { describe, expect, it } from 'vitest';
import { fileStem } from './plan-files';

describe('file names of a plan', () => {
	it('are plain whatever the project is called', () => {
		expect(fileStem('Tre Sorgive — hillside farm')).toBe('tre-sorgive-hillside-farm');
		expect(fileStem('Überprüfung "A/B"')).toBe('uberprufung-a-b');
		expect(fileStem('שלום')).toBe('tiltyard');
		expect(fileStem('x'.repeat(200))).toHaveLength(40);
	});
});
