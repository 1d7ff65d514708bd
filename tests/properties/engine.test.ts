/** One engine, several ways through the same geometry: they must agree. */
import fc from 'fast-check';
import { describe, expect, it, vi } from 'vitest';
import { prepareField } from '../../src/lib/core';
import { tableGroup } from '../../src/lib/core/field';
import { ShadeEngine } from '../../src/lib/core/shade/engine';
import type { TableGroup } from '../../src/lib/core/shade/table-group';
import { testModel } from '../../src/lib/core/test-field';
import { randomSource } from '../../src/lib/method/measure/random';
import { randomField } from '../../src/lib/method/measure/random-fields';
import { holds } from './scenes';

// Long only on a machine that is busy with other things.
vi.setConfig({ testTimeout: 300_000 });

const between = (min: number, max: number) => fc.double({ min, max, noNaN: true });

interface Alike {
	columns: number;
	pitch: [number, number];
	stagger: number;
	up: number[];
	centreGapM: number;
	frameMarginM: number;
	sun: { azimuthDeg: number; elevationDeg: number };
}
const alikeFields: fc.Arbitrary<Alike> = fc.record({
	columns: fc.integer({ min: 2, max: 5 }),
	pitch: fc.tuple(between(6.5, 15), between(5, 15)),
	// On the grid itself edges of shadows coincide.
	stagger: fc.constantFrom(0, 0, 0.5),
	up: fc.array(fc.oneof(fc.constant(0), between(0, 2)), { minLength: 20, maxLength: 20 }),
	centreGapM: fc.constantFrom(0, 0, 0.2),
	frameMarginM: fc.constantFrom(0, 0, 0.1),
	sun: fc.record({ azimuthDeg: between(0, 359), elevationDeg: between(1, 40) })
});

/** A field of equal followers; with `apart` each has a group of its own, turned by 1e-13 degrees against the last. */
function engineOf(
	{ columns, pitch, stagger, up, centreGapM, frameMarginM }: Alike,
	apart: boolean
): ShadeEngine {
	const count = 4 * columns;
	const group = tableGroup(testModel({ centreGapM, frameMarginM }), { kind: 'following' });
	const turned = (by: number): TableGroup => ({
		...group,
		poseAt(azimuthDeg, elevationDeg) {
			const pose = group.poseAt(azimuthDeg, elevationDeg);
			return { ...pose, azimuthDeg: pose.azimuthDeg + by * 1e-13 * Math.max(1, pose.azimuthDeg) };
		}
	});
	const row = (k: number): number => Math.floor(k / columns);
	return new ShadeEngine(
		Float64Array.from({ length: count }, (_, k) => ((k % columns) + stagger * (row(k) % 2)) * pitch[0]),
		Float64Array.from({ length: count }, (_, k) => row(k) * pitch[1]),
		Float64Array.from({ length: count }, (_, k) => up[k]),
		Int32Array.from({ length: count }, (_, k) => (apart ? k : 0)),
		apart ? Array.from({ length: count }, (_, k) => turned(k + 1)) : [group],
		[]
	);
}

/** Area of flat convex polygons. */
function areaOf(pieces: readonly number[][]): number {
	return pieces.reduce((sum, piece) => {
		let twice = 0;
		for (let k = 0; k < piece.length; k += 2) {
			const j = (k + 2) % piece.length;
			twice += piece[k] * piece[j + 1] - piece[j] * piece[k + 1];
		}
		return sum + twice / 2;
	}, 0);
}

describe('ways through the engine', () => {
	it('alike poses by rectangles and the same poses by cutting give the same shares', () => {
		let partly = 0;
		holds(
			fc.property(alikeFields, (field) => {
				const alike = engineOf(field, false);
				const apart = engineOf(field, true);
				const { azimuthDeg, elevationDeg } = field.sun;
				alike.setSun(azimuthDeg, elevationDeg);
				apart.setSun(azimuthDeg, elevationDeg);
				for (let i = 0; i < alike.count; i++) {
					const share = alike.share(i);
					if (share > 0 && share < 1) partly++;
					expect(Math.abs(share - apart.share(i)), `table ${i}`).toBeLessThan(1e-9);
				}
			})
		);
		expect(partly).toBeGreaterThan(500);
	});

	it('lit pieces cover what the share leaves', () => {
		holds(
			fc.property(alikeFields, (field) => {
				const engine = engineOf(field, false);
				engine.setSun(field.sun.azimuthDeg, field.sun.elevationDeg);
				const { halfWidth, halfHeight, halfGap } = engine.groups[0];
				const area = 4 * (halfWidth - halfGap) * halfHeight;
				for (let i = 0; i < engine.count; i++) {
					const lit = areaOf(engine.litPolygons(i, 1)) / area;
					expect(Math.abs(1 - lit - engine.share(i))).toBeLessThan(1e-9);
				}
			}),
			150
		);
	});

	it('shares in bulk, in parts, with and without the index are those of single tables', () => {
		holds(
			fc.property(fc.integer(), between(0, 359), between(0.5, 60), (seed, azimuthDeg, elevationDeg) => {
				const { engine } = prepareField(randomField(randomSource(seed)));
				const { count } = engine;
				engine.setSun(azimuthDeg, elevationDeg, false);
				const single = Array.from({ length: count }, (_, i) => engine.share(i));
				engine.setSun(azimuthDeg, elevationDeg);
				const bulk = new Float64Array(count);
				const shaded = engine.shares(bulk);
				const parts = new Float64Array(count);
				const half = count >> 1;
				const shadedParts = engine.shares(parts, 0, half) + engine.shares(parts, half, count);
				single.forEach((share, i) => {
					expect(Math.abs(bulk[i] - share)).toBeLessThan(1e-12);
					expect(parts[i]).toBe(bulk[i]);
					expect(Math.abs(engine.share(i) - share)).toBeLessThan(1e-12);
				});
				expect(shaded).toBe(bulk.filter((share) => share > 0).length);
				expect(shadedParts).toBe(shaded);
			}),
			600
		);
	});

	it('with the light from the sun itself, light and sun are the same question', () => {
		holds(
			fc.property(fc.integer(), between(0, 359), between(0.5, 60), (seed, azimuthDeg, elevationDeg) => {
				const { engine } = prepareField(randomField(randomSource(seed)));
				const a = new Float64Array(engine.count);
				const b = new Float64Array(engine.count);
				engine.setSun(azimuthDeg, elevationDeg);
				engine.shares(a);
				engine.setLight(azimuthDeg, elevationDeg, azimuthDeg, elevationDeg);
				engine.shares(b);
				expect(b).toEqual(a);
			}),
			200
		);
	});
});
