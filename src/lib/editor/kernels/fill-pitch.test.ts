import { describe, expect, it } from 'vitest';
import { fillPlot, leastPitchM, reachRadiusM } from '$lib/core';
import { emptyPlot, modelLibrary } from '$lib/schema';
import { leastAcrossM, leastAlongM } from './fill-pitch';

const [, model] = modelLibrary;
const apartM = 2 * reachRadiusM(model);
const plot = {
	...emptyPlot(),
	boundary: [
		{
			outer: [
				[0, 0],
				[120, 0],
				[120, 120],
				[0, 120]
			] as [number, number][],
			holes: []
		}
	]
};

/** Distance of the nearest two feet of a fill. */
function nearestM(eastWestM: number, northSouthM: number, stagger: number): number {
	const points = fillPlot({
		plot,
		model,
		pitchEastWestM: eastWestM,
		pitchNorthSouthM: northSouthM,
		stagger,
		turnDeg: 0
	});
	let nearest = Infinity;
	points.forEach(([x, y], i) =>
		points.slice(i + 1).forEach(([u, v]) => (nearest = Math.min(nearest, Math.hypot(x - u, y - v))))
	);
	return nearest;
}

describe('least pitches of a fill', () => {
	it('keep circles apart in the fill itself, and a little less does not', () => {
		for (const stagger of [0, 0.2, 0.5, 0.8]) {
			for (const alongM of [leastAlongM(apartM), 11, 15, 30]) {
				const acrossM = leastAcrossM(apartM, alongM, stagger);
				expect(nearestM(alongM, acrossM, stagger)).toBeGreaterThanOrEqual(apartM - 1e-6);
				expect(nearestM(alongM, acrossM - 0.05, stagger)).toBeLessThan(apartM);
			}
		}
		expect(nearestM(leastAlongM(apartM) - 0.05, 20, 0)).toBeLessThan(apartM);
	});

	it('lie below the pitch that is recommended, by its clearance', () => {
		expect(leastAlongM(apartM)).toBeLessThan(leastPitchM(model));
		expect(leastAcrossM(apartM, 20, 0)).toBe(leastAlongM(apartM));
	});
});
