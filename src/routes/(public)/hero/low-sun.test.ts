import { describe, expect, it } from 'vitest';
import { drawLowSun, lowSunSize } from './low-sun';

/** Every y of a path. */
const heights = (path: string) =>
	[...path.matchAll(/[ML]-?[\d.]+ (-?[\d.]+)/g)].map((match) => Number(match[1]));

describe('the picture of the low sun', () => {
	const picture = drawLowSun();

	it('has the sun in it, above the horizon', () => {
		expect(picture.sun).not.toBeNull();
		expect(picture.sun!.x).toBeGreaterThan(0);
		expect(picture.sun!.x).toBeLessThan(lowSunSize.width);
		expect(picture.sun!.y).toBeGreaterThan(0);
		expect(picture.sun!.y).toBeLessThan(picture.horizonY);
	});

	it('shows the backs of the tables: a glass that faces the sun can not face an eye that looks into it', () => {
		expect(picture.trackers.length).toBeGreaterThan(2);
		expect(picture.trackers.every((tracker) => !tracker.front)).toBe(true);
	});

	it('lets every shadow fall towards the eye, below the feet', () => {
		const farthestFoot = Math.min(...picture.trackers.map((tracker) => Math.max(...heights(tracker.post))));
		expect(picture.shadows.length).toBeGreaterThanOrEqual(picture.trackers.length);
		for (const shadow of picture.shadows) expect(Math.max(...heights(shadow))).toBeGreaterThan(farthestFoot);
	});
});
