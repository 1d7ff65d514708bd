/** What must hold for any scene: laws of geometry that need no reference value. */
import fc from 'fast-check';
import { describe, expect, it, vi } from 'vitest';
import { shadeScene, type ShadeScene } from '../../src/lib/core';
import { holds, scenes } from './scenes';

// Long only on a machine that is busy with other things.
vi.setConfig({ testTimeout: 300_000 });

const shares = (scene: ShadeScene): number[] => shadeScene(scene).map(({ shadedShare }) => shadedShare);
/** The guards of the core stand at 1e-7 m and 1e-6 of a cosine, which a moved or scaled scene meets a little differently. */
const TOLERANCE = 1e-6;

function expectAlike(a: readonly number[], b: readonly number[], tolerance = TOLERANCE): void {
	expect(a.length).toBe(b.length);
	a.forEach((share, i) =>
		expect(Math.abs(share - b[i]), `table ${i}: ${share}, ${b[i]}`).toBeLessThan(tolerance)
	);
}

const moved = (scene: ShadeScene, eastM: number, northM: number, upM: number): ShadeScene => ({
	...scene,
	tables: scene.tables.map((t) => ({
		...t,
		eastM: t.eastM + eastM,
		northM: t.northM + northM,
		upM: t.upM + upM
	})),
	obstacles: scene.obstacles.map((o) => ({
		...o,
		eastM: o.eastM + eastM,
		northM: o.northM + northM,
		baseM: o.baseM + upM
	}))
});

/** Everything, sky too, clockwise about the origin. */
function turned(scene: ShadeScene, byDeg: number): ShadeScene {
	const t = (byDeg * Math.PI) / 180;
	const place = <T extends { eastM: number; northM: number }>(one: T): T => ({
		...one,
		eastM: one.eastM * Math.cos(t) + one.northM * Math.sin(t),
		northM: -one.eastM * Math.sin(t) + one.northM * Math.cos(t)
	});
	const bearing = (azimuthDeg: number): number => (azimuthDeg + byDeg) % 360;
	return {
		sun: { ...scene.sun, azimuthDeg: bearing(scene.sun.azimuthDeg) },
		tables: scene.tables.map((one) => ({ ...place(one), azimuthDeg: bearing(one.azimuthDeg) })),
		obstacles: scene.obstacles.map((one) =>
			one.kind === 'box' ? { ...place(one), turnDeg: one.turnDeg + byDeg } : place(one)
		),
		skyline: scene.skyline.map((one) => ({ ...one, azimuthDeg: bearing(one.azimuthDeg) }))
	};
}

/** East and west exchanged. */
function mirrored(scene: ShadeScene): ShadeScene {
	const bearing = (azimuthDeg: number): number => (360 - azimuthDeg) % 360;
	return {
		sun: { ...scene.sun, azimuthDeg: bearing(scene.sun.azimuthDeg) },
		tables: scene.tables.map((one) => ({ ...one, eastM: -one.eastM, azimuthDeg: bearing(one.azimuthDeg) })),
		obstacles: scene.obstacles.map((one) =>
			one.kind === 'box'
				? { ...one, eastM: -one.eastM, turnDeg: -one.turnDeg }
				: { ...one, eastM: -one.eastM }
		),
		skyline: []
	};
}

function scaled(scene: ShadeScene, by: number): ShadeScene {
	const lengths = <T extends object>(one: T): T =>
		Object.fromEntries(
			Object.entries(one).map(([key, value]) => [key, /M$/.test(key) ? (value as number) * by : value])
		) as T;
	return { ...scene, tables: scene.tables.map(lengths), obstacles: scene.obstacles.map(lengths) };
}

describe('shade of any scene', () => {
	it('meets partly shaded tables often enough to say something', () => {
		const found = fc.sample(scenes(), { seed: 7, numRuns: 200 }).flatMap(shares);
		const partly = found.filter((share) => share > 0 && share < 1).length;
		expect(partly).toBeGreaterThan(100);
	});

	it('stays when field and obstacles are raised and shifted together', () => {
		const by = fc.double({ min: -300, max: 300, noNaN: true });
		holds(
			fc.property(scenes(), by, by, by, (scene, east, north, up) =>
				expectAlike(shares(moved(scene, east, north, up)), shares(scene))
			)
		);
	});

	it('stays when field and sky are turned together', () => {
		holds(
			fc.property(scenes('boxes'), fc.double({ min: 0, max: 359, noNaN: true }), (scene, by) =>
				expectAlike(shares(turned(scene, by)), shares(scene))
			)
		);
	});

	it('stays when all lengths are scaled', () => {
		// Tables that cut through each other at a small angle are kept apart by 1e-7 m, which does not scale with them.
		holds(
			fc.property(scenes(), fc.double({ min: 0.5, max: 50, noNaN: true }), (scene, by) =>
				expectAlike(shares(scaled(scene, by)), shares(scene), 1e-5)
			)
		);
	});

	it('is that of the other half of the day in the mirrored field', () => {
		holds(fc.property(scenes(), (scene) => expectAlike(shares(mirrored(scene)), shares(scene))));
	});

	it('does not hang on the order of the tables', () => {
		holds(
			fc.property(scenes(), (scene) =>
				expectAlike(shares({ ...scene, tables: [...scene.tables].reverse() }).reverse(), shares(scene), 1e-9)
			)
		);
	});

	it('never grows when a neighbour is removed', () => {
		holds(
			fc.property(scenes(), fc.nat(), (scene, pick) => {
				const gone = pick % scene.tables.length;
				const all = shares(scene).filter((_, i) => i !== gone);
				const rest = shares({ ...scene, tables: scene.tables.filter((_, i) => i !== gone) });
				rest.forEach((share, i) => expect(share).toBeLessThanOrEqual(all[i] + 1e-9));
			})
		);
	});

	it('never grows when an obstacle is removed', () => {
		holds(
			fc.property(scenes(), (scene) => {
				const all = shares(scene);
				shares({ ...scene, obstacles: scene.obstacles.slice(1) }).forEach((share, i) =>
					expect(share).toBeLessThanOrEqual(all[i] + 1e-9)
				);
			})
		);
	});

	it('is nothing on a table alone, and everything on one that shows its back', () => {
		holds(
			fc.property(scenes(), (scene) => {
				for (const table of scene.tables) {
					const [alone] = shadeScene({ ...scene, tables: [table], obstacles: [] });
					expect(alone.shadedShare).toBe(alone.frontLit ? 0 : 1);
				}
			})
		);
	});
});
