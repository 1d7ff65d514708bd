/**
 * Random scenes with everything that goes wrong in geometry: coincident edges, grazing suns and suns in the zenith,
 * tables that touch, lie inside one another, straddle the target's plane or stand edge-on, tiny and huge ones.
 */
import type { SceneObstacle, SceneTable, ShadeScene } from '../../core';

type Random = () => number;
const pick = <T>(random: Random, from: readonly T[]): T => from[Math.floor(random() * from.length)];

/** Suns that divide by little: down to 1e-4 degrees, in the zenith, along the compass. */
export function randomSun(random: Random): ShadeScene['sun'] {
	const azimuthDeg = random() < 0.3 ? pick(random, [0, 90, 180, 270, 359.999999]) : 360 * random();
	const elevationDeg = pick(random, [
		10 ** (-4 + 3 * random()),
		30 * random() + 0.1,
		90 * random() + 1e-4,
		90,
		90 - 10 ** (-6 + 5 * random())
	]);
	return { azimuthDeg, elevationDeg: Math.min(90, elevationDeg) };
}

function pose(random: Random, sun: ShadeScene['sun']): { azimuthDeg: number; tiltDeg: number } {
	const kind = random();
	if (kind < 0.45) return { azimuthDeg: sun.azimuthDeg, tiltDeg: 90 - sun.elevationDeg };
	if (kind < 0.55) return { azimuthDeg: sun.azimuthDeg, tiltDeg: 0 };
	// Edge-on to the sun, exactly and nearly.
	if (kind < 0.65) return { azimuthDeg: (sun.azimuthDeg + 90) % 360, tiltDeg: 90 };
	if (kind < 0.72) return { azimuthDeg: (sun.azimuthDeg + 90 + 1e-9 * random()) % 360, tiltDeg: 90 };
	return { azimuthDeg: 360 * random(), tiltDeg: pick(random, [0, 90, 90 * random()]) };
}

function place(random: Random, k: number, before: readonly SceneTable[]): [number, number, number] {
	const last = before[before.length - 1];
	const kind = random();
	if (last && kind < 0.1) return [last.eastM, last.northM, last.upM];
	if (last && kind < 0.2) return [last.eastM + last.widthM, last.northM, last.upM];
	if (last && kind < 0.3) return [last.eastM, last.northM + 1e-7 * (random() - 0.5), last.upM];
	if (kind < 0.6) return [12 * (k % 3), 12 * Math.floor(k / 3), 3];
	return [60 * (random() - 0.5), 60 * (random() - 0.5), 3 + 4 * random()];
}

function size(random: Random): [number, number] {
	const kind = random();
	if (kind < 0.5) return [6, 4];
	if (kind < 0.6) return [1e-4 + 1e-3 * random(), 1e-4 + 1e-3 * random()];
	if (kind < 0.7) return [500 + 500 * random(), 0.01 + 300 * random()];
	return [0.5 + 12 * random(), 0.5 + 8 * random()];
}

export function randomObstacle(random: Random): SceneObstacle {
	const at = { eastM: 50 * (random() - 0.5), northM: 50 * (random() - 0.5), baseM: 2 * random() - 1 };
	const heightM = pick(random, [0.001, 3, 20 * random() + 0.1, 300]);
	if (random() < 0.5) {
		return {
			...at,
			kind: 'box',
			sizeXM: pick(random, [0.001, 4, 30 * random() + 0.1]),
			sizeYM: pick(random, [0.001, 4, 30 * random() + 0.1]),
			heightM,
			turnDeg: pick(random, [0, 45, 90, 360 * random()])
		};
	}
	return {
		...at,
		kind: 'prism',
		// Now and then as many as a round tower drawn finely.
		sides: 3 + Math.floor((random() < 0.06 ? 198 : 20) * random()),
		bottomRadiusM: 0.05 + 5 * random(),
		topRadiusM: random() < 0.4 ? 0 : 0.05 + 5 * random(),
		heightM
	};
}

export function randomScene(random: Random): ShadeScene {
	const sun = randomSun(random);
	const tables: SceneTable[] = [];
	const count = 2 + Math.floor(5 * random());
	for (let k = 0; k < count; k++) {
		const [eastM, northM, upM] = place(random, k, tables);
		const [widthM, heightM] = size(random);
		tables.push({ id: `t${k}`, eastM, northM, upM, widthM, heightM, ...pose(random, sun) });
	}
	const obstacles = Array.from({ length: Math.floor(3 * random()) }, () => randomObstacle(random));
	const skyline =
		random() < 0.1
			? [
					{ azimuthDeg: 0, elevationDeg: 5 * random() },
					{ azimuthDeg: 180, elevationDeg: 5 * random() }
				]
			: [];
	return { sun, tables, obstacles, skyline };
}

/** Scenes without the extremes, for what is only sampled: sizes, distances and suns of a real field. */
export function plainScene(random: Random): ShadeScene {
	const sun = { azimuthDeg: 360 * random(), elevationDeg: 4 + 50 * random() };
	const tables = Array.from({ length: 4 }, (_, k): SceneTable => ({
		id: `t${k}`,
		eastM: 14 * (random() - 0.5),
		northM: 14 * (random() - 0.5),
		upM: 3 + 3 * random(),
		widthM: 3 + 5 * random(),
		heightM: 2 + 4 * random(),
		azimuthDeg: sun.azimuthDeg + (k % 2 === 0 ? 0 : 120 * (random() - 0.5)),
		tiltDeg: k % 2 === 0 ? 90 - sun.elevationDeg : 20 + 70 * random()
	}));
	const obstacles = Array.from({ length: 2 }, (): SceneObstacle => {
		const at = { eastM: 24 * (random() - 0.5), northM: 24 * (random() - 0.5), baseM: 0 };
		return random() < 0.5
			? {
					...at,
					kind: 'box',
					sizeXM: 0.5 + 4 * random(),
					sizeYM: 0.5 + 4 * random(),
					heightM: 2 + 6 * random(),
					turnDeg: 360 * random()
				}
			: {
					...at,
					kind: 'prism',
					sides: 3 + Math.floor(10 * random()),
					bottomRadiusM: 0.3 + 2 * random(),
					topRadiusM: random() < 0.4 ? 0 : 0.3 + 2 * random(),
					heightM: 2 + 8 * random()
				};
	});
	return { sun, tables, obstacles, skyline: [] };
}
