/** Arbitrary scenes for properties that hold for all of them. */
import fc from 'fast-check';
import type { SceneObstacle, SceneTable, ShadeScene } from '../../src/lib/core';

const between = (min: number, max: number) => fc.double({ min, max, noNaN: true });

const table = fc.record({
	eastM: between(-15, 15),
	northM: between(-15, 15),
	upM: between(2, 8),
	widthM: between(1, 8),
	heightM: between(1, 6),
	/** 0 looks at the sun, else turned from it and tilted on its own. */
	turnDeg: fc.oneof(fc.constant(0), between(-80, 80)),
	tiltDeg: between(10, 90)
});
const box = fc.record({
	kind: fc.constant('box' as const),
	eastM: between(-15, 15),
	northM: between(-15, 15),
	baseM: between(-1, 2),
	sizeXM: between(0.3, 6),
	sizeYM: between(0.3, 6),
	heightM: between(0.5, 9),
	turnDeg: between(0, 360)
});
const prism = fc.record({
	kind: fc.constant('prism' as const),
	eastM: between(-15, 15),
	northM: between(-15, 15),
	baseM: between(-1, 2),
	sides: fc.integer({ min: 3, max: 12 }),
	bottomRadiusM: between(0.2, 3),
	topRadiusM: fc.oneof(fc.constant(0), between(0.2, 3)),
	heightM: between(0.5, 9)
});

/** Suns from 2 degrees up; two to six tables, half of them looking at the sun; boxes, or boxes and prisms. */
export const scenes = (solids: 'boxes' | 'all' = 'all'): fc.Arbitrary<ShadeScene> =>
	fc
		.record({
			sun: fc.record({ azimuthDeg: between(0, 359), elevationDeg: between(2, 88) }),
			tables: fc.array(table, { minLength: 2, maxLength: 6 }),
			obstacles: fc.array<SceneObstacle>(solids === 'all' ? fc.oneof(box, prism) : box, { maxLength: 2 })
		})
		.map(({ sun, tables, obstacles }) => ({
			sun,
			obstacles,
			skyline: [],
			tables: tables.map(({ turnDeg, tiltDeg, ...one }, k): SceneTable => ({
				...one,
				id: `t${k}`,
				azimuthDeg: (sun.azimuthDeg + turnDeg + 360) % 360,
				tiltDeg: turnDeg === 0 ? 90 - sun.elevationDeg : tiltDeg
			}))
		}));

/**
 * Holds a property over many cases from a seed that is printed when it fails; SEED in the environment chooses another.
 */
export function holds<Ts>(property: fc.IPropertyWithHooks<Ts>, numRuns = 400): void {
	// Shrinking a scene costs minutes and prints pages; the first one that fails says as much.
	fc.assert(property, { seed: Number(process.env.SEED ?? 68_45_40), numRuns, endOnFailure: true });
}
