import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { relativeLuminance } from '$lib/ui/contrast';
import { shadeColour, shadeLegend, shadeStops } from './shade-ramp';

describe('the shade ramp', () => {
	it('meets its stops exactly', () => {
		for (const { share, colour } of shadeStops) expect(shadeColour(share)).toBe(colour);
	});

	it('lies halfway between two stops at their middle', () => {
		// #fff3cf and #f4cf83: (255+244)/2, (243+207)/2, (207+131)/2
		expect(shadeColour(0.1)).toBe('#fae1a9');
	});

	it('grows darker with every percent', () => {
		const lightness = Array.from({ length: 101 }, (_, i) => relativeLuminance(shadeColour(i / 100)));
		for (let i = 1; i < lightness.length; i++) expect(lightness[i]).toBeLessThan(lightness[i - 1]);
	});

	it('holds shares outside 0 to 1 to the ends', () => {
		expect(shadeColour(-0.2)).toBe(shadeColour(0));
		expect(shadeColour(1.2)).toBe(shadeColour(1));
		expect(shadeColour(Number.NaN)).toBe(shadeColour(0));
	});

	it('labels its legend in percent', () => {
		expect(shadeLegend.map((stop) => stop.label)).toEqual(
			['0', '20', '40', '60', '80', '100'].map((n) => `${n}\u00a0%`)
		);
	});

	it('has the same stops in app.css', () => {
		const css = readFileSync(new URL('../../app.css', import.meta.url), 'utf8');
		const found = [...css.matchAll(/--shade-ramp-(\d+):\s*(#[0-9a-f]{6});/g)];
		expect(found.map(([, percent, colour]) => ({ share: Number(percent) / 100, colour }))).toEqual(
			shadeStops
		);
	});
});
