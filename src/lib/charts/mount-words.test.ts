import { describe, expect, it } from 'vitest';
import type { Mount } from '$lib/core/document';
import { mountWords, sameMount } from './mount-words';

const top: Mount = { edge: 'top', alongM: 0.6, outM: 0.08, forwardM: 0.03 };

describe('a mount in words', () => {
	it('is named as seen facing the glass', () => {
		expect(mountWords(top)).toBe(
			'Top edge, 0.60 m right of the middle, 8 cm above the glass edge, 3 cm in front'
		);
		expect(mountWords({ edge: 'left', alongM: -1.5, outM: 0.08, forwardM: 0 })).toBe(
			'Left side, 1.50 m below the middle, 8 cm outside the glass edge, level with the glass'
		);
		expect(mountWords({ edge: 'bottom', alongM: 0, outM: -0.05, forwardM: -0.02 })).toBe(
			'Bottom edge, in the middle, 5 cm inside the glass edge, 2 cm behind'
		);
	});

	it('is the same place to a millimetre', () => {
		expect(sameMount(top, { ...top, alongM: 0.6000001 })).toBe(true);
		expect(sameMount(top, { ...top, alongM: 0.61 })).toBe(false);
		expect(sameMount(top, { ...top, edge: 'bottom' })).toBe(false);
		expect(sameMount(null, null)).toBe(true);
		expect(sameMount(top, null)).toBe(false);
	});
});
