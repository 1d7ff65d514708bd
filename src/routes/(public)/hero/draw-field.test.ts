import { describe, expect, it } from 'vitest';
import { makeCamera } from './camera';
import { drawField } from './draw-field';
import { sampleField } from './sample-field';

const camera = makeCamera([0, -40, 12], 0, 900, 1200, 500, 0.3);
const { field, trackers: feet } = sampleField();

describe('the picture of the first page', () => {
	it('puts a point at infinity on the horizon and a nearer one below it', () => {
		expect(camera.see([0, 1e7, 0])?.y).toBeCloseTo(camera.horizonY, 1);
		// 12 m below the eye at 40 m: 12 / 40 * 900 px under the horizon.
		expect(camera.see([0, 0, 0])?.y).toBeCloseTo(camera.horizonY + 270, 9);
		expect(camera.see([0, -41, 0])).toBeNull();
	});

	it('throws no shadow before sunrise', () => {
		expect(drawField(field, feet, camera, { azimuthDeg: 100, elevationDeg: -3 }).shadows).toEqual([]);
	});

	it('shows the glass of every table to an eye that has the sun behind it, fully lit when the sun is high', () => {
		const { trackers } = drawField(field, feet, camera, { azimuthDeg: 180, elevationDeg: 50 });
		expect(trackers).toHaveLength(14);
		for (const tracker of trackers) {
			expect(tracker.front).toBe(true);
			expect(tracker.lit).toHaveLength(1);
		}
	});

	it('shows backs against the sun, and the sun itself', () => {
		const drawn = drawField(field, feet, camera, { azimuthDeg: 0, elevationDeg: 10 });
		expect(drawn.trackers.every((tracker) => !tracker.front)).toBe(true);
		expect(drawn.sun?.x).toBeCloseTo(600, 3);
	});
});
